import { onScopeDispose, shallowRef } from 'vue'
import { downloadAttachment } from '#shared/contracts/attachments.ts'
import type { TestForm } from '#shared/contracts/test-form.ts'
import { callForFile } from '@/api/call-api.ts'
import { askEngine } from '@/measure/ask-engine.ts'

/**
 * Hands the sweep that a new one is compared with to the worker. Answers whether it is there: null while it is asked
 * for, and where there is none to fetch.
 */
export function useBaselineSweep({ known }: TestForm) {
  const here = shallowRef<boolean | null>(null)
  const id = known.sweep.baseline?.file
  let isHandedOver = false
  let isGone = false

  async function fetchSweep(attachmentId: string): Promise<void> {
    try {
      const file = await callForFile(downloadAttachment, { params: { attachmentId } })
      const bytes = new Uint8Array(await file.arrayBuffer())
      if (isGone) return
      isHandedOver = true
      const facts = await askEngine('read-file', { id: attachmentId, fileName: 'baseline.s1p', bytes })
      here.value = !('code' in facts)
    } catch {
      here.value = false
    }
  }

  if (id) void fetchSweep(id)
  onScopeDispose(() => {
    isGone = true
    if (id && isHandedOver) void askEngine('forget-file', { id }).catch(() => undefined)
  })
  return here
}
