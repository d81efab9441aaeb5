import { parse } from 'csv-parse/browser/esm/sync'
import { failure, type Outcome } from '#shared/engine/outcome.ts'

/** A line of a log that holds something: its number in the file, and its cells. */
export interface Row {
  readonly line: number
  readonly cells: readonly string[]
}

/** Promise P26: what may be uploaded. */
const MOST_BYTES = 2 * 1024 * 1024
const MOST_ROWS = 5000

/** The lines of a CSV log, whatever stands between its cells. */
export function rowsOf(source: string | Uint8Array): Outcome<Row[]> {
  if (source.length > MOST_BYTES)
    return failure('E_LOG_SIZE', 'The file is larger than 2 MiB: export a shorter log.')
  const text = typeof source === 'string' ? source : decode(source)
  if (text === null)
    return failure('E_LOG_ENCODING', 'The file is not text in UTF-8: export it as CSV (UTF-8).')
  try {
    const records = parse(text.replace(/\r\n?/g, '\n'), {
      delimiter: delimiterOf(text),
      record_delimiter: '\n',
      relax_column_count: true,
      relax_quotes: true,
      bom: true,
      trim: true,
      info: true,
    }) as unknown as { record: string[]; info: { lines: number } }[]
    const rows = records.map(({ record, info }) => ({ line: info.lines, cells: record }))
    const filled = rows.filter(({ cells }) => cells.some((cell) => cell !== ''))
    return filled.length > MOST_ROWS
      ? failure('E_LOG_SIZE', `${filled.length} lines are more than ${MOST_ROWS}: export a shorter log.`)
      : filled
  } catch (error) {
    const { lines, message } = error as { lines?: number; message: string }
    return failure('E_LOG_CSV', `This is no table that can be read: ${message}.`, { line: lines ?? 1 })
  }
}

function decode(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch {
    return null
  }
}

/** Of tab, semicolon and comma the one that stands in most lines: with a semicolon, commas are decimals. */
function delimiterOf(text: string): string {
  const lines = text.split(/\r\n?|\n/).slice(0, 200)
  const withOne = (delimiter: string) => lines.filter((line) => line.includes(delimiter)).length
  const tabs = withOne('\t')
  const semicolons = withOne(';')
  if (tabs > 0 && tabs >= semicolons) return '\t'
  return semicolons > 0 && semicolons >= withOne(',') / 2 ? ';' : ','
}
