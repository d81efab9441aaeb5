import { uploadAttachment } from '#shared/contracts/attachments.ts'
import type { HeldFile, HeldFiles } from '@/composables/useHeldFiles.ts'
import { callApi } from './call-api.ts'

/** The files that can be sent: those that were refused on this device would be refused by the service too. */
export function soundFiles({ list }: HeldFiles): HeldFile[] {
  return list.value.filter(({ state }) => state === 'read')
}

/** One after the other, each once: on a slow line one whole file is worth more than three halves. */
export async function uploadFiles(all: readonly (HeldFiles | undefined)[]): Promise<void> {
  for (const held of all) {
    if (!held) continue
    for (const file of soundFiles(held).filter(({ uploaded }) => !uploaded)) {
      await uploadFile(file)
      held.markUploaded(file.id)
    }
  }
}

/** Under the id that the form made for it: sending the same file again stores it once. */
async function uploadFile({ id, name, kind, content }: HeldFile): Promise<void> {
  const form = new FormData()
  form.append('file', content, name)
  await callApi(uploadAttachment, { params: { attachmentId: id }, query: { kind }, form })
}
