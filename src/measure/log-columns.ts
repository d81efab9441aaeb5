/** Which columns of a thermometer's log hold the time and the temperatures. */
import { readTime } from './log-time.ts'

export type TemperatureUnit = 'C' | 'F'

export interface TemperatureColumn {
  readonly place: number
  readonly name: string
  /** As the heading says it; null where it does not. */
  readonly unit: TemperatureUnit | null
}

export interface LogColumns {
  /** Index of the first row of readings. */
  readonly from: number
  /** One column, or a date and a time beside it. */
  readonly time: readonly number[]
  /** Seconds that a bare number of the time column stands for. */
  readonly unitS: number
  readonly temperatures: readonly TemperatureColumn[]
}

const TIME_WORD = /\b(?:time|elapsed|seconds?|secs?|minutes?|mins?|timestamp|s)\b/i
const DATE_WORD = /\bdate\b/i
const TEMPERATURE_WORD = /temp|°\s*[cf]|℃|℉|\bdeg|celsius|fahrenheit|\bprobe\b|\bt\d?\b|\bch\s?\d\b/i
/** Loggers write what they are before the table; a heading further down than this is none. */
const LAST_HEADING_ROW = 60

/** By the headings, else by what the cells of the first rows look like; null when there is no such table. */
export function findColumns(rows: readonly (readonly string[])[]): LogColumns | null {
  for (const [index, row] of rows.slice(0, LAST_HEADING_ROW).entries()) {
    const columns = byHeading(row, index + 1)
    if (columns) return columns
  }
  return byShape(rows)
}

function byHeading(row: readonly string[], from: number): LogColumns | null {
  const times = placesWhere(row, (cell) => TIME_WORD.test(cell) && !isTemperature(cell))
  const dates = placesWhere(row, (cell) => DATE_WORD.test(cell) && !TIME_WORD.test(cell))
  const temperatures = row.flatMap((name, place) =>
    isTemperature(name) && !isLimit(name) ? [{ place, name, unit: unitIn(name) }] : [],
  )
  const [time] = times
  const [date] = dates
  if (temperatures.length === 0 || (time === undefined && date === undefined)) return null
  const both = [date, time].filter((place) => place !== undefined)
  const minutes = time !== undefined && /\bmin/i.test(row[time] ?? '')
  return { from, time: both, unitS: minutes ? 60 : 1, temperatures }
}

/** `time` stands in "Time", `t` in "T1": the words for a temperature go first only when they are alone. */
function isTemperature(cell: string): boolean {
  return TEMPERATURE_WORD.test(cell) && !/^\s*(?:date\s*)?time\b/i.test(cell)
}

/** Alarm limits and extremes stand beside the reading in some logs. */
const isLimit = (cell: string) => /alarm|limit|\bmax|\bmin\b|high|low/i.test(cell)

function byShape(rows: readonly (readonly string[])[]): LogColumns | null {
  const from = rows.findIndex((row) => row.length >= 2 && shapeOf(row) !== null)
  const shape = shapeOf(rows[from] ?? [])
  if (from < 0 || !shape) return null
  const [temperature] = shape.temperatures
  const unit = temperature === undefined ? null : unitIn(rows[from]?.[temperature] ?? '')
  const temperatures = shape.temperatures.map((place) => ({ place, name: `Column ${place + 1}`, unit }))
  return { from, time: shape.time, unitS: 1, temperatures }
}

function shapeOf(row: readonly string[]): { time: number[]; temperatures: number[] } | null {
  const time = row.findIndex((cell) => readTime(cell, 1) !== null)
  if (time < 0) return null
  const next = row[time + 1]
  const isDateAlone = /^[\d/.-]+$/.test(row[time] ?? '') && readTime(row[time] ?? '', 1)?.kind === 'date'
  const both = isDateAlone && next !== undefined && isClock(next)
  const last = both ? time + 1 : time
  const temperatures = placesWhere(row, (cell, place) => place > last && readTemperature(cell) !== null)
  return temperatures.length === 0 ? null : { time: both ? [time, time + 1] : [time], temperatures }
}

function isClock(cell: string): boolean {
  const kind = readTime(cell, 1)?.kind
  return kind === 'clock' || kind === 'two-parts'
}

function placesWhere(row: readonly string[], holds: (cell: string, place: number) => boolean): number[] {
  return row.flatMap((cell, place) => (holds(cell, place) ? [place] : []))
}

/** °C or °F where a heading or a cell says so. */
export function unitIn(text: string): TemperatureUnit | null {
  if (/°\s*f\b|℉|fahrenheit|\bdeg\s?f\b|[([]\s*f\s*[)\]]|\d\s*f\s*$/i.test(text)) return 'F'
  if (/°\s*c\b|℃|celsius|\bdeg\s?c\b|[([]\s*c\s*[)\]]|\d\s*c\s*$/i.test(text)) return 'C'
  return null
}

/** The figure of a cell, its unit taken off; null where there is none. */
export function readTemperature(cell: string): number | null {
  const [, figure] = /^\s*([-+\u2212]?\d+(?:[.,]\d+)?)\s*(?:(?:°|deg)?\s*[cf]|℃|℉)?\s*$/i.exec(cell) ?? []
  return figure === undefined ? null : Number(figure.replace(',', '.').replace('\u2212', '-'))
}
