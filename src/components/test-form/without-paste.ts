import type { ReadingRow } from './band-rows.ts'

/** A row that a paste changed or added. */
export interface PastedRow {
  /** Null: the row was not there. */
  readonly before: ReadingRow | null
  readonly pasted: ReadingRow
}

/**
 * The row as it would stand without the paste: a field that still holds what was pasted goes back to what it held, and
 * one that was typed into since stays. A row that the paste added goes, unless something was typed into it.
 */
export function withoutPaste(row: ReadingRow, { before, pasted }: PastedRow): ReadingRow[] {
  const names = new Set([...Object.keys(row.values), ...Object.keys(before?.values ?? {})])
  const values: ReadingRow['values'] = {}
  for (const name of names) {
    const isAsPasted = row.values[name] === pasted.values[name]
    const kept = isAsPasted ? before?.values[name] : row.values[name]
    if (kept !== undefined) values[name] = kept
  }
  const isEmpty = Object.values(values).every((text) => !text?.trim())
  if (before === null && isEmpty) return []
  return [{ band: row.band === pasted.band ? (before?.band ?? row.band) : row.band, values }]
}
