import { shallowRef, type Ref } from 'vue'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { ReadingColumn, ReadingRow } from './band-rows.ts'
import { cellsOf, pasteInto, type PasteFault } from './paste-column.ts'

export interface PasteOutcome {
  readonly taken: number
  readonly faults: readonly PasteFault[]
}

interface Table {
  readonly columns: readonly ReadingColumn[]
  readonly bands: readonly Band[]
}

/** Pasting of several lines into the rows of a form, with what was there before one step away. */
export function usePaste(rows: Ref<ReadingRow[]>, table: () => Table) {
  const report = shallowRef<PasteOutcome | null>(null)
  let before: ReadingRow[] = []

  function paste(event: ClipboardEvent, at: { readonly row: number; readonly column: number }): void {
    const cells = cellsOf(event.clipboardData?.getData('text/plain') ?? '')
    if (!cells) return void (report.value = null)
    event.preventDefault()
    const pasted = pasteInto({ rows: rows.value, ...table(), ...at }, cells)
    report.value = pasted
    if (pasted.faults.length > 0) return
    before = rows.value.map((row) => ({ band: row.band, values: { ...row.values } }))
    rows.value = pasted.rows
  }

  function undo(): void {
    rows.value = before
    report.value = null
  }

  return { report, paste, undo }
}
