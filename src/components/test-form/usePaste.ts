import { shallowRef, toRaw, type Ref } from 'vue'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { ReadingColumn, ReadingRow } from './band-rows.ts'
import { cellsOf, pasteInto, type PasteFault } from './paste-column.ts'
import { withoutPaste, type PastedRow } from './without-paste.ts'

export interface PasteOutcome {
  readonly taken: number
  readonly faults: readonly PasteFault[]
}

const copyOf = ({ band, values }: ReadingRow): ReadingRow => ({ band, values: { ...values } })

interface Table {
  readonly columns: readonly ReadingColumn[]
  readonly bands: readonly Band[]
}

/** Pasting of several lines into the rows of a form, with what was there before one step away: undoing leaves what was typed since. */
export function usePaste(rows: Ref<ReadingRow[]>, table: () => Table) {
  const report = shallowRef<PasteOutcome | null>(null)
  /** Each row that the paste made, with what stood there before and what was put in. */
  let changed = new Map<ReadingRow, PastedRow>()

  function paste(event: ClipboardEvent, at: { readonly row: number; readonly column: number }): void {
    const cells = cellsOf(event.clipboardData?.getData('text/plain') ?? '')
    if (!cells) return void (report.value = null)
    event.preventDefault()
    const pasted = pasteInto({ rows: rows.value, ...table(), ...at }, cells)
    report.value = pasted
    if (pasted.faults.length > 0) return
    const old = rows.value.map(copyOf)
    const raw = new Set(rows.value.map((row) => toRaw(row)))
    changed = new Map(
      pasted.rows.flatMap((row, place): [ReadingRow, PastedRow][] =>
        raw.has(toRaw(row)) ? [] : [[row, { before: old[place] ?? null, pasted: copyOf(row) }]],
      ),
    )
    rows.value = pasted.rows
  }

  function undo(): void {
    rows.value = rows.value.flatMap((row) => {
      const paste = changed.get(toRaw(row))
      return paste ? withoutPaste(row, paste) : [row]
    })
    changed.clear()
    report.value = null
  }

  return { report, paste, undo }
}
