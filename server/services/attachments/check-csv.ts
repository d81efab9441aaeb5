import { isUtf8 } from 'node:buffer'
import { CsvError, parse } from 'csv-parse/sync'
import { MAX_CSV_ROWS } from '#shared/contracts/attachments.ts'
import { fileFault, otherKind, type CheckedFile } from './checked-file.ts'

const MAX_COLUMNS = 100
const MAX_ROW_CHARACTERS = 20_000
const MAX_FAULTS = 20
/** Anything but tab and line ends. */
const CONTROL = /[\u0000-\u0008\u000B\u000C\u000E-\u001F\u007F]/

interface Row {
  readonly record: readonly string[]
  readonly info: { readonly lines: number }
}

/** A log of readings as instruments write it: UTF-8, at most 5,000 rows, as many columns in each as in the first. */
export function checkCsv(bytes: Buffer): CheckedFile {
  if (!isUtf8(bytes)) throw otherKind('The file is not UTF-8 text: save it as CSV in UTF-8.')
  const text = bytes.toString('utf8')
  const control = CONTROL.exec(text)
  if (control) throw otherKind(`Line ${lineAt(text, control.index)}: this is no text file.`)
  const rows = readRows(text)
  const [first] = rows
  if (!first || rows.length < 2)
    throw fileFault('The file holds no readings: a heading and one row at least.')
  if (first.record.length > MAX_COLUMNS) throw fileFault(`Line 1: more than ${MAX_COLUMNS} columns.`)
  const faults = rows
    .filter(({ record }) => record.length !== first.record.length)
    .map(
      ({ record, info }) => `Line ${info.lines}: ${record.length} columns instead of ${first.record.length}.`,
    )
  const [fault, ...more] = faults
  if (fault) throw fileFault(fault, more.slice(0, MAX_FAULTS))
  return { content: bytes, mediaType: 'text/csv' }
}

function readRows(text: string): Row[] {
  try {
    const rows = parse(text, {
      bom: true,
      delimiter: [',', ';', '\t'],
      info: true,
      max_record_size: MAX_ROW_CHARACTERS,
      relax_column_count: true,
      skip_empty_lines: true,
      to: MAX_CSV_ROWS + 1,
    }) as unknown as Row[]
    if (rows.length <= MAX_CSV_ROWS) return rows
  } catch (error) {
    if (!(error instanceof CsvError)) throw error
    const line = typeof error.lines === 'number' ? `Line ${error.lines}: ` : ''
    throw fileFault(`${line}${WORDS[error.code] ?? 'this row cannot be read as CSV.'}`)
  }
  throw fileFault(`More than ${MAX_CSV_ROWS} rows.`)
}

const WORDS: Readonly<Record<string, string>> = {
  CSV_MAX_RECORD_SIZE: `a row of more than ${MAX_ROW_CHARACTERS} characters, or a quote that is never closed.`,
  CSV_QUOTE_NOT_CLOSED: 'a quote that is never closed.',
  CSV_INVALID_CLOSING_QUOTE: 'something stands after a closing quote.',
  INVALID_OPENING_QUOTE: 'a quote inside a value that does not begin with one.',
}

function lineAt(text: string, index: number): number {
  return text.slice(0, index).split(/\r\n|\r|\n/).length
}
