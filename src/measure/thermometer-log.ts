import { failure, isFailure, type Failure } from '#shared/engine/outcome.ts'
import { celsiusFromFahrenheit } from '#shared/engine/units.ts'
import {
  findColumns,
  readTemperature,
  unitIn,
  type LogColumns,
  type TemperatureColumn,
  type TemperatureUnit,
} from './log-columns.ts'
import { rowsOf, type Row } from './log-rows.ts'
import { meaningOfTwoParts, readAs, readTime, sinceFirst, type ReadTime, type TwoParts } from './log-time.ts'

/** A thermometer's log as a heat test takes it: seconds since its first line and °C. */
export interface ThermometerLog {
  readonly readings: readonly { readonly atS: number; readonly temperatureC: number }[]
  /** Lines of readings in the file; more than `readings` when they were thinned. */
  readonly lines: number
  readonly unit: TemperatureUnit
  readonly columns: readonly TemperatureColumn[]
  /** The column that was read. */
  readonly column: number
}

/** What a person answers where the file does not say. */
export interface LogAnswers {
  readonly unit?: TemperatureUnit | undefined
  /** Place of the temperature column in the file. */
  readonly column?: number | undefined
  /** What `14:05` means in it. */
  readonly times?: TwoParts | undefined
}

export interface LogFault {
  readonly line: number
  readonly column: string
  readonly message: string
}

/** `E_UNIT`: ask °C or °F and read again; `E_TIMES`: ask what its times mean. Every other failure is about the file; `faults` names the lines. */
export interface LogFailure extends Failure {
  readonly faults?: readonly LogFault[]
  readonly columns?: readonly TemperatureColumn[]
}

/** What a test takes; a longer log is thinned evenly, its hottest reading kept. */
export const MOST_READINGS = 500
const MOST_FAULTS = 20

/** Reads a CSV log; all or nothing. */
export function readThermometerLog(
  source: string | Uint8Array,
  answers: LogAnswers = {},
): ThermometerLog | LogFailure {
  const rows = rowsOf(source)
  if (isFailure(rows)) return rows
  const columns = findColumns(rows.map(({ cells }) => cells))
  if (!columns)
    return failure(
      'E_LOG_COLUMNS',
      'No column of times beside a column of temperatures was found. A heading such as "Time, Temperature °C" helps.',
    )
  const column = columns.temperatures.find(({ place }) => place === answers.column) ?? columns.temperatures[0]
  if (!column) return failure('E_LOG_COLUMNS', 'There is no column of temperatures.')
  const heading = columns.time.map((place) => rows[columns.from - 1]?.cells[place] ?? '').join(' ')
  const read = readRows(rows.slice(columns.from), { columns, column, answers, heading })
  // Another column may be the right one: the choice stays where this one cannot be read.
  return isFailure(read) ? { ...read, columns: columns.temperatures } : read
}

interface Plan {
  readonly columns: LogColumns
  readonly column: TemperatureColumn
  readonly answers: LogAnswers
  /** Of the column of times; empty where it has none. */
  readonly heading: string
}

function readRows(rows: readonly Row[], plan: Plan): ThermometerLog | LogFailure {
  const faults: LogFault[] = []
  const read: { line: number; time: ReadTime; figure: number }[] = []
  for (const row of rows) {
    const one = readRow(row, plan)
    if ('message' in one) faults.push(one)
    else read.push({ line: row.line, ...one })
  }
  if (faults.length > 0) return faulty(faults)
  if (read.length < 2)
    return failure(
      'E_TOO_FEW',
      `The log holds ${read.length === 1 ? 'one reading' : 'no reading'}; a heat test needs two.`,
    )
  const times = read.map(({ time }) => time)
  const meaning = plan.answers.times ?? meaningOfTwoParts(times, plan.heading)
  if (meaning === null)
    return failure('E_TIMES', 'Its times may be minutes and seconds since the start, or times of day.')
  const at = sinceFirst(meaning ? readAs(times, meaning) : times)
  const back = at.findIndex((seconds, place) => place > 0 && seconds <= (at[place - 1] ?? 0))
  if (back > 0) {
    const message = 'This time is not after the one before it.'
    return faulty([{ line: read[back]?.line ?? 0, column: 'time', message }])
  }
  const unit = plan.answers.unit ?? plan.column.unit ?? unitIn(rows[0]?.cells[plan.column.place] ?? '')
  const { temperatures } = plan.columns
  if (unit === null) return failure('E_UNIT', 'The log does not say °C or °F.')
  const celsius = (figure: number) => (unit === 'F' ? celsiusFromFahrenheit(figure) : figure)
  const readings = read.map(({ figure }, place) => ({
    atS: at[place] ?? 0,
    temperatureC: Math.round(celsius(figure) * 1000) / 1000,
  }))
  const outside = readings.findIndex(({ temperatureC }) => temperatureC < -40 || temperatureC > 300)
  if (outside >= 0) {
    const message = 'This lies outside −40 to 300 °C: is it another unit, or a probe that came loose?'
    return faulty([{ line: read[outside]?.line ?? 0, column: plan.column.name, message }])
  }
  return {
    readings: thinned(readings),
    lines: readings.length,
    unit,
    columns: temperatures,
    column: plan.column.place,
  }
}

function readRow(
  { line, cells }: Row,
  { columns, column }: Plan,
): { time: ReadTime; figure: number } | LogFault {
  const said = columns.time.map((place) => cells[place] ?? '').join(' ')
  const time = readTime(said, columns.unitS)
  if (!time) return { line, column: 'time', message: `“${said.trim()}” is not a time that can be read.` }
  const cell = cells[column.place] ?? ''
  const figure = readTemperature(cell)
  if (figure === null) return { line, column: column.name, message: `“${cell}” is not a temperature.` }
  return { time, figure }
}

function faulty(faults: readonly LogFault[]): LogFailure {
  const [first] = faults
  const others = faults.length - 1
  const more = others > 0 ? ` ${others} more ${others === 1 ? 'line has' : 'lines have'} a fault.` : ''
  const message = `Line ${first?.line}, ${first?.column}: ${first?.message}${more}`
  return { code: 'E_LOG_LINE', message, line: first?.line ?? 0, faults: faults.slice(0, MOST_FAULTS) }
}

/** Evenly, with the first, the last and the hottest. */
function thinned<Reading extends { readonly temperatureC: number }>(readings: readonly Reading[]): Reading[] {
  if (readings.length <= MOST_READINGS) return [...readings]
  const step = (readings.length - 1) / (MOST_READINGS - 2)
  const places = new Set(Array.from({ length: MOST_READINGS - 1 }, (_, n) => Math.round(n * step)))
  const hottest = readings.reduce((a, b) => (b.temperatureC > a.temperatureC ? b : a))
  return readings.filter((reading, place) => places.has(place) || reading === hottest)
}
