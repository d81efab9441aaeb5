/**
 * Calendar dates without a time: 'YYYY-MM-DD', proleptic Gregorian, 0001-01-01 to 9999-12-31.
 * Arithmetic counts days as integers (era arithmetic of 400 years = 146,097 days) and never builds a
 * date from a string, which would read it as UTC and lose a day west of Greenwich.
 * The functions on a `PlainDate` trust it to be one (parsed at the edge by `parseDate`) and throw a
 * RangeError otherwise, because that cannot be.
 * Source: ISO 8601-1:2019; calculation sheet, section 14.
 */
import { failure, type Outcome } from './outcome.ts'

/** 'YYYY-MM-DD', a real day. Plain strings sort in calendar order. */
export type PlainDate = string

const PATTERN = /^(\d{4})-(\d{2})-(\d{2})$/
const DAYS_PER_ERA = 146_097
const FIRST_DAY = dayNumber(1, 1, 1)
const LAST_DAY = dayNumber(9999, 12, 31)

export function isPlainDate(value: unknown): value is PlainDate {
  return parts(value) !== undefined
}

/** The date itself, or `E_MISSING` / `E_DATE` when it is no real day (2027-02-29, 2026-13-01). */
export function parseDate(value: unknown, field = 'date'): Outcome<PlainDate> {
  if (value === undefined || value === null || value === '')
    return failure('E_MISSING', `${field} is missing: enter a date.`, { field })
  if (isPlainDate(value)) return value
  return failure('E_DATE', `${field} is not a real date: write it as YYYY-MM-DD.`, { field })
}

/** Whole months later (or earlier), from the day given; a day the month lacks becomes its last day. */
export function addMonths(date: PlainDate, months: number): PlainDate {
  if (!Number.isInteger(months)) throw new RangeError(`Not a whole number of months: ${months}`)
  const [year, month, day] = trusted(date)
  const count = year * 12 + (month - 1) + months
  const toYear = Math.floor(count / 12)
  const toMonth = count - toYear * 12 + 1
  return fromParts(toYear, toMonth, Math.min(day, daysInMonth(toYear, toMonth)))
}

/** Whole days later (or earlier). */
export function addDays(date: PlainDate, days: number): PlainDate {
  return fromDayNumber(dayNumber(...trusted(date)) + days)
}

/** Calendar days from the first date to the second; negative when the second is earlier. */
export function daysBetween(from: PlainDate, to: PlainDate): number {
  return dayNumber(...trusted(to)) - dayNumber(...trusted(from))
}

/** -1, 0 or 1, for sorting. */
export function compareDates(a: PlainDate, b: PlainDate): -1 | 0 | 1 {
  if (a === b) return 0
  return a < b ? -1 : 1
}

/** The earliest of the dates that exist, or undefined when there is none. */
export function earliestDate(dates: Iterable<PlainDate | null | undefined>): PlainDate | undefined {
  let earliest: PlainDate | undefined
  for (const date of dates) if (date && (earliest === undefined || date < earliest)) earliest = date
  return earliest
}

/** Days since 1970-01-01 of a date: the integer to plot or to subtract. */
export function epochDay(date: PlainDate): number {
  return dayNumber(...trusted(date))
}

/** The date of an epoch day (an integer). */
export function fromEpochDay(days: number): PlainDate {
  return fromDayNumber(days)
}

type Parts = readonly [year: number, month: number, day: number]

function parts(value: unknown): Parts | undefined {
  const match = typeof value === 'string' ? PATTERN.exec(value) : null
  if (!match) return undefined
  const [year, month, day] = [Number(match[1]), Number(match[2]), Number(match[3])]
  const real = year >= 1 && month >= 1 && month <= 12 && day >= 1 && day <= daysInMonth(year, month)
  return real ? [year, month, day] : undefined
}

function trusted(date: PlainDate): Parts {
  const found = parts(date)
  if (!found) throw new RangeError(`Not a calendar date: ${String(date)}`)
  return found
}

function daysInMonth(year: number, month: number): number {
  if (month === 2) return isLeapYear(year) ? 29 : 28
  return month === 4 || month === 6 || month === 9 || month === 11 ? 30 : 31
}

function isLeapYear(year: number): boolean {
  return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0)
}

/** Days since 1970-01-01; the year is taken to begin in March, so the leap day comes last. */
function dayNumber(year: number, month: number, day: number): number {
  const y = month <= 2 ? year - 1 : year
  const era = Math.floor(y / 400)
  const yearOfEra = y - era * 400
  const dayOfYear = Math.floor((153 * ((month + 9) % 12) + 2) / 5) + day - 1
  const dayOfEra = yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear
  return era * DAYS_PER_ERA + dayOfEra - 719_468
}

function fromDayNumber(days: number): PlainDate {
  if (!Number.isInteger(days) || days < FIRST_DAY || days > LAST_DAY)
    throw new RangeError(`No calendar date: day ${days}`)
  const shifted = days + 719_468
  const era = Math.floor(shifted / DAYS_PER_ERA)
  const ofEra = shifted - era * DAYS_PER_ERA
  const yearOfEra = Math.floor(
    (ofEra - Math.floor(ofEra / 1460) + Math.floor(ofEra / 36_524) - Math.floor(ofEra / 146_096)) / 365,
  )
  const ofYear = ofEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100))
  const shiftedMonth = Math.floor((5 * ofYear + 2) / 153)
  const month = ((shiftedMonth + 2) % 12) + 1
  const year = yearOfEra + era * 400 + (month <= 2 ? 1 : 0)
  return fromParts(year, month, ofYear - Math.floor((153 * shiftedMonth + 2) / 5) + 1)
}

function fromParts(year: number, month: number, day: number): PlainDate {
  if (!Number.isInteger(year) || year < 1 || year > 9999)
    throw new RangeError(`No calendar date in year ${year}`)
  return `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`
}
