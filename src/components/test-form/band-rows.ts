import type { Band } from '#shared/engine/vocabulary.ts'

export interface ReadingColumn {
  readonly key: string
  readonly label: string
  readonly unit?: string
  readonly optional?: boolean
}

/** A row as typed: text, so that half a number is not lost. */
export interface ReadingRow {
  band: Band
  values: Record<string, string | undefined>
}

export function rowsFor(bands: readonly Band[]): ReadingRow[] {
  return (bands.length > 0 ? bands : (['40 m'] as const)).map((band) => ({ band, values: {} }))
}

/** Rows in which something was typed, in order: the place of a row here is its place in what is sent. */
export function filledRows(rows: readonly ReadingRow[]): ReadingRow[] {
  return rows.filter(({ values }) => Object.values(values).some((text) => text?.trim()))
}

/** What is sent. Text that is no number is sent as it stands, so that the service names the field. */
export function sentRows(rows: readonly ReadingRow[], columns: readonly ReadingColumn[]): object[] {
  return filledRows(rows).map(({ band, values }) => ({
    band,
    ...Object.fromEntries(columns.flatMap(({ key }) => sentValue(key, values[key]))),
  }))
}

function sentValue(key: string, typed: string | undefined): [string, number | string][] {
  const value = typedNumber(typed)
  return value === undefined ? [] : [[key, value]]
}

/** A number as people type it, with point or comma; other text unchanged; nothing for an empty field. */
export function typedNumber(typed: string | undefined): number | string | undefined {
  const text = typed?.trim().replace(',', '.') ?? ''
  if (text === '') return undefined
  const value = Number(text)
  return Number.isFinite(value) ? value : text
}
