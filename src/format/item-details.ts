import { DETAIL_FIELDS } from '#shared/contracts/item-detail-fields.ts'
import type { z } from 'zod'
import type { itemDetailsRecord } from '#shared/contracts/item-details.ts'
import { BANDS, type Category } from '#shared/engine/vocabulary.ts'
import { detailField, type DetailField } from './detail-fields.ts'
import { quantityText } from './quantity.ts'

export type StoredDetails = z.output<typeof itemDetailsRecord>

type QuantityWriter = (value: number, unit: string, digits?: number) => string

interface DetailRow {
  readonly name: string
  readonly label: string
  readonly text: string
}

/** The fields of a category in the order in which they are asked for. */
export function detailNames(category: Category): string[] {
  return Object.keys(DETAIL_FIELDS[category])
}

/** What is known of an item, one row a field, in the member's units. */
export function detailRows(details: StoredDetails, text: QuantityWriter): DetailRow[] {
  const values = details as Readonly<Record<string, unknown>>
  return detailNames(details.category).flatMap((name) => {
    const field = detailField(details.category, name)
    const shown = values[name] === undefined ? '' : detailText(field, values[name], text)
    return shown === '' ? [] : [{ name, label: field.label, text: shown }]
  })
}

/** The first few facts in one line, for a row of a list. */
export function detailsSummary(details: StoredDetails, text: QuantityWriter): string {
  return detailRows(details, text)
    .slice(0, 5)
    .map((row) => `${row.label.toLowerCase()} ${row.text}`)
    .join(', ')
}

/** One value as people read it; empty where there is none. */
export function detailText(field: DetailField, value: unknown, text: QuantityWriter): string {
  if (value === undefined || value === null || value === '') return ''
  if (field.kind === 'number') return numberShown(field, value, text)
  if (field.kind === 'bands') return bandsShown(value as readonly string[])
  if (field.kind === 'loss-by-band') return lossShown(value as Readonly<Record<string, number>>)
  if (field.kind === 'draw') return drawShown(value as readonly Draw[])
  if (field.kind === 'choice') return labelOf(field.options, String(value))
  if (field.kind === 'choices')
    return (value as string[]).map((one) => labelOf(field.options, one)).join(', ')
  return String(value)
}

interface Draw {
  readonly watts: number
  readonly amps: number
}

/** What was typed and is no number yet stands as it was typed. */
function numberShown(
  { unit, digits }: Extract<DetailField, { kind: 'number' }>,
  value: unknown,
  text: QuantityWriter,
): string {
  return typeof value === 'number' ? text(value, unit, digits).trim() : String(value)
}

const bandsShown = (bands: readonly string[]) => BANDS.filter((band) => bands.includes(band)).join(', ')

function lossShown(loss: Readonly<Record<string, unknown>>): string {
  return BANDS.filter((band) => typeof loss[band] === 'number')
    .map((band) => `${band} ${quantityText(Number(loss[band]), 'dB', 2)}`)
    .join(', ')
}

const drawShown = (draw: readonly Draw[]) =>
  [...draw]
    .sort((a, b) => b.watts - a.watts)
    .map(({ watts, amps }) => `${quantityText(amps, 'A', 2)} at ${quantityText(watts, 'W', 1)}`)
    .join(', ')

function labelOf(options: readonly { value: string; label: string }[], value: string): string {
  return options.find((option) => option.value === value)?.label ?? value
}

/** Details as the contract takes them: what was left empty is not known, and is left out. */
export function withoutBlanks(values: Readonly<Record<string, unknown>>): Record<string, unknown> {
  const cleaned = Object.entries(values).map(([name, value]) => [name, cleanedValue(value)] as const)
  return Object.fromEntries(cleaned.filter(([, value]) => value !== undefined))
}

function cleanedValue(value: unknown): unknown {
  if (value === null || value === '' || value === undefined) return undefined
  if (Array.isArray(value)) return value.length > 0 ? value : undefined
  if (typeof value !== 'object') return value
  const parts = withoutBlanks(value as Record<string, unknown>)
  return Object.keys(parts).length > 0 ? parts : undefined
}

interface TypedDetails {
  readonly category: Category | null
  readonly [name: string]: unknown
}

/** Typed details as the contract takes them: only what the category has, and only what was filled in. */
export function detailsBody({ category, ...values }: TypedDetails): Record<string, unknown> {
  const names = new Set(category ? detailNames(category) : [])
  const own = Object.entries(withoutBlanks(values)).filter(([name]) => names.has(name))
  return { category, ...Object.fromEntries(own) }
}

/** Typed details by their labels, as two versions are laid side by side. */
export function describeDetails(details: TypedDetails, text: QuantityWriter): Record<string, string> {
  const { category } = details
  if (!category) return {}
  const lines = detailNames(category).map((name) => {
    const field = detailField(category, name)
    return [field.label, detailText(field, details[name], text)]
  })
  return Object.fromEntries(lines)
}
