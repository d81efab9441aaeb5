import { onScopeDispose, shallowRef } from 'vue'
import { ATTACHMENT_BYTES, type AttachmentKind } from '#shared/contracts/attachments.ts'
import { isFailure, type Failure } from '#shared/engine/outcome.ts'
import { uuidv7 } from '@/api/new-id.ts'
import { askEngine } from '@/measure/ask-engine.ts'
import type { FileFacts } from '@/measure/questions.ts'
import { UNREADABLE } from '@/measure/unreadable.ts'

/** A file in the hands of a form: its bytes stay in memory until the test that it belongs to is recorded. */
export interface HeldFile {
  /** Made once: uploading the same file again under it stores it once. */
  readonly id: string
  readonly name: string
  readonly kind: AttachmentKind
  readonly content: Blob
  readonly state: 'reading' | 'read' | 'refused'
  /** What was recognised of a Touchstone file. */
  readonly facts: FileFacts | null
  /** Why it was refused; `line` names the line of the file. */
  readonly failure: Failure | null
  readonly uploaded: boolean
}

export interface HeldFiles {
  readonly list: Readonly<{ value: readonly HeldFile[] }>
  add(files: Iterable<File>, kind?: AttachmentKind): Promise<void>
  remove(id: string): void
  markUploaded(id: string): void
}

/**
 * Files that were chosen or dropped. Touchstone files are read in the worker at once, so that a fault shows before
 * anything is sent. `most`: the newest stay when more are added.
 */
export function useHeldFiles(usualKind: AttachmentKind, most: number): HeldFiles {
  const list = shallowRef<readonly HeldFile[]>([])
  let isGone = false

  const change = (id: string, changes: Partial<HeldFile>) =>
    void (list.value = list.value.map((held) => (held.id === id ? { ...held, ...changes } : held)))

  async function add(files: Iterable<File>, kind = usualKind): Promise<void> {
    const added = await Promise.all([...files].slice(-most).map((file) => hold(file, kind)))
    const all = [...list.value, ...added]
    for (const { id } of all.slice(0, -most)) forget(id)
    list.value = all.slice(-most)
    await Promise.all(added.filter(({ state }) => state === 'reading').map(read))
  }

  async function read({ id, name, content }: HeldFile): Promise<void> {
    const bytes = new Uint8Array(await content.arrayBuffer())
    // Taken out meanwhile: what the worker gets now nobody would take back from it.
    if (isGone || !list.value.some((held) => held.id === id)) return
    try {
      const facts = await askEngine('read-file', { id, fileName: name, bytes })
      if (isFailure(facts)) change(id, { state: 'refused', failure: facts })
      else change(id, { state: 'read', facts })
    } catch {
      // Without the worker nothing can be shown beforehand; the service reads the file when it is sent.
      change(id, { state: 'read' })
    }
  }

  function remove(id: string): void {
    forget(id)
    list.value = list.value.filter((held) => held.id !== id)
  }

  function forget(id: string): void {
    if (list.value.some((held) => held.id === id && held.kind === 'touchstone' && held.content.size > 0))
      void askEngine('forget-file', { id }).catch(() => undefined)
  }

  onScopeDispose(() => {
    isGone = true
    list.value.forEach(({ id }) => forget(id))
  })

  return { list, add, remove, markUploaded: (id) => change(id, { uploaded: true }) }
}

/** The bytes are read at once: on a phone the file may be gone or changed when it is sent. */
async function hold(file: File, kind: AttachmentKind): Promise<HeldFile> {
  const held = { id: uuidv7(), name: file.name, kind, facts: null, uploaded: false }
  if (file.size > ATTACHMENT_BYTES[kind]) {
    const mib = ATTACHMENT_BYTES[kind] / 1024 / 1024
    const failure = { code: 'E_SIZE', message: `Larger than ${mib} MiB: make a smaller one.` }
    return { ...held, content: new Blob(), state: 'refused', failure }
  }
  try {
    const content = new Blob([await file.arrayBuffer()], { type: file.type })
    return { ...held, content, state: kind === 'touchstone' ? 'reading' : 'read', failure: null }
  } catch {
    return { ...held, content: new Blob(), state: 'refused', failure: UNREADABLE }
  }
}
