import { BANDS, type Band } from '#shared/engine/vocabulary.ts'
import { typedNumber } from '@/format/typed-number.ts'
import type { ReadingColumn, ReadingRow } from './band-rows.ts'

/** What is wrong with one pasted cell, counted as the person sees the pasted lines: from 1. */
export interface PasteFault {
  readonly row: number
  readonly column: string
  readonly message: string
}

export interface Pasted {
  readonly rows: ReadingRow[]
  /** Lines that were taken over. */
  readonly taken: number
  /** With any fault nothing was taken over. */
  readonly faults: readonly PasteFault[]
}

interface Target {
  readonly rows: readonly ReadingRow[]
  readonly columns: readonly ReadingColumn[]
  readonly bands: readonly Band[]
  /** Where the cursor stands. */
  readonly row: number
  readonly column: number
}

/** More rows than any test takes: whoever pastes more has pasted something else. */
const MOST_LINES = 200

/**
 * Lines and cells of what a spreadsheet puts on the clipboard: tabs between cells, or semicolons where there are no
 * tabs. Null for a single value, which the browser pastes by itself.
 */
export function cellsOf(text: string): string[][] | null {
  const lines = text.replace(/\r\n?/g, '\n').replace(/\n+$/, '').split('\n')
  const separator = text.includes('\t') ? '\t' : ';'
  const cells = lines.map((line) => line.split(separator).map((cell) => cell.trim()))
  return cells.length === 1 && cells[0]?.length === 1 ? null : cells
}

/** Fills the rows from the cursor down and to the right; rows that are missing are added. All or nothing. */
export function pasteInto(target: Target, cells: readonly string[][]): Pasted {
  const kept = [...target.rows]
  const lines = withoutHeading(cells)
  const heading = cells.length - lines.length
  const faults: PasteFault[] =
    lines.length > MOST_LINES
      ? [{ row: 1, column: '', message: `${lines.length} lines are more than a test takes (${MOST_LINES}).` }]
      : []
  const rows = [...kept]
  for (const [index, line] of lines.slice(0, MOST_LINES).entries()) {
    const place = target.row + index
    const read = readLine(line, target, heading + index + 1)
    faults.push(...read.faults)
    const before = rows[place] ?? { band: read.band ?? nextBand(rows, target.bands), values: {} }
    rows[place] = { band: read.band ?? before.band, values: { ...before.values, ...read.values } }
  }
  return faults.length > 0 ? { rows: kept, taken: 0, faults } : { rows, taken: lines.length, faults }
}

/** A first line without any digit is the head of the column. */
function withoutHeading(cells: readonly string[][]): readonly string[][] {
  const [first] = cells
  const isHeading = cells.length > 1 && first?.some((cell) => cell !== '') && !/\d/.test(first.join(''))
  return isHeading ? cells.slice(1) : cells
}

interface ReadLine {
  readonly band: Band | null
  readonly values: Record<string, string>
  readonly faults: readonly PasteFault[]
}

function readLine(line: readonly string[], { columns, column }: Target, row: number): ReadLine {
  const band = bandOf(line[0] ?? '')
  const cells = band ? line.slice(1) : line
  const from = band ? 0 : column
  const values: Record<string, string> = {}
  const faults: PasteFault[] = []
  for (const [index, cell] of cells.entries()) {
    if (cell === '') continue
    const into = columns[from + index]
    const read = into ? plainNumber(cell, into.unit) : { fault: 'there is no field for this cell.' }
    if ('fault' in read) faults.push({ row, column: into?.label ?? `cell ${index + 1}`, message: read.fault })
    else if (into) values[into.key] = read.text
  }
  return { band, values, faults }
}

/** `40 m`, `40m` and `70 cm` name a band; `40` alone may be a figure. */
function bandOf(cell: string): Band | null {
  const tight = cell.replace(/\s/g, '').toLowerCase()
  return BANDS.find((band) => band.replace(' ', '') === tight) ?? null
}

function nextBand(rows: readonly (ReadingRow | undefined)[], bands: readonly Band[]): Band {
  const used = new Set(rows.map((row) => row?.band))
  return bands.find((band) => !used.has(band)) ?? rows.at(-1)?.band ?? bands[0] ?? '40 m'
}

const SPELLINGS: Readonly<Record<string, readonly string[]>> = {
  '°C': ['c', 'degc', '℃', '°c'],
  '°F': ['f', 'degf', '℉', '°f'],
}

/** The figure of a cell as it is typed, without its unit; another unit is a fault, not a guess. */
export function plainNumber(cell: string, unit = ''): { text: string } | { fault: string } {
  const [, figure = '', said = ''] = /^([-+\u2212]?[\d.,]*\d[\d.,]*)\s*(.*)$/.exec(cell) ?? []
  const value = typedNumber(figure)
  if (typeof value !== 'number')
    return { fault: `“${cell}” is not a number this field can take: write it like 12.5 or 12,5.` }
  if (said !== '' && !isUnit(said, unit)) {
    const wanted = unit === '' ? 'a figure without a unit' : unit
    return { fault: `“${cell}” is in ${said}, the field takes ${wanted}.` }
  }
  return { text: String(value) }
}

function isUnit(said: string, unit: string): boolean {
  // Letter case tells mW from MW, so only where nothing else differs may it be ignored.
  if (said === unit) return true
  if (/^m[^Hh]/.test(said)) return false
  const bare = said.toLowerCase()
  return bare === unit.toLowerCase() || (SPELLINGS[unit]?.includes(bare) ?? false)
}
