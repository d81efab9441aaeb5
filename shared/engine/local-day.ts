/**
 * Which calendar day an instant falls on in an IANA time zone, and when a local day begins.
 * The runtime's own zone database does the conversion; a formatter per zone is kept, because making one
 * costs a hundred times a conversion. Source: IANA time zone database; calculation sheet, section 14.
 */
import { checkNumber, failure, isFailure, type Failure, type Outcome } from './outcome.ts'
import { addDays, epochDay, parseDate, type PlainDate } from './plain-date.ts'

/** Milliseconds since 1970-01-01T00:00Z, or ISO 8601 with Z or an offset (never without: no guessing). */
export type Instant = number | string

const DAY_MS = 86_400_000
const ISO_INSTANT = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d+)?)?(Z|[+-]\d{2}:\d{2})$/
// The years 1000 to 9999 leave room for every zone's offset and print with four digits.
const FIRST_MS = -30_610_137_600_000
const LAST_MS = 253_402_041_600_000

const clocks = new Map<string, Intl.DateTimeFormat>()

/**
 * The local calendar date of an instant. `E_ZONE` for an unknown zone, `E_DATE` for text that is no
 * instant, `E_RANGE` outside the years 1000 to 9999.
 */
export function localDateOf(instant: Instant, zone: string): Outcome<PlainDate> {
  const clock = clockOf(zone)
  if (isFailure(clock)) return clock
  const epochMs = instantMs(instant)
  if (isFailure(epochMs)) return epochMs
  return wallText(clock, epochMs).slice(0, 10)
}

/**
 * The instant (epoch ms) at which a local date begins: local midnight, the first one where the clock
 * shows it twice, and the end of the gap where a clock change skips it. `E_DATE`, `E_ZONE`, `E_RANGE`.
 */
export function startOfDayUtc(date: PlainDate, zone: string): Outcome<number> {
  const day = parseDate(date)
  if (isFailure(day)) return day
  const clock = clockOf(zone)
  if (isFailure(clock)) return clock
  const midnight = epochDay(day) * DAY_MS
  const bad = checkNumber('date', midnight, FIRST_MS + 2 * DAY_MS, LAST_MS - 2 * DAY_MS)
  if (bad) return failure('E_RANGE', 'The date must lie in the years 1000 to 9999.', { field: 'date' })
  const guesses = [-DAY_MS, DAY_MS].map((shift) => midnight - offsetMs(clock, midnight + shift))
  const found = guesses.filter((guess) => guess + offsetMs(clock, guess) === midnight)
  return found.length > 0 ? Math.min(...found) : endOfGap(clock, midnight)
}

/** The instant at which something due on this day becomes overdue: the local midnight after it. */
export function overdueFrom(due: PlainDate, zone: string): Outcome<number> {
  const day = parseDate(due, 'due')
  if (isFailure(day)) return day
  if (day === '9999-12-31')
    return failure('E_RANGE', 'The date must lie before 9999-12-31.', { field: 'due' })
  return startOfDayUtc(addDays(day, 1), zone)
}

/** `E_ZONE` unless the runtime knows the IANA zone; offsets such as +05:30 are not zones. */
export function checkZone(zone: unknown): Failure | undefined {
  const clock = clockOf(zone)
  return isFailure(clock) ? clock : undefined
}

function clockOf(zone: unknown): Outcome<Intl.DateTimeFormat> {
  const known = typeof zone === 'string' ? clocks.get(zone) : undefined
  if (known) return known
  const made = makeClock(zone)
  if (!made)
    return failure('E_ZONE', `${typeof zone === 'string' ? zone : 'That'} is not a known time zone.`, {
      field: 'zone',
    })
  clocks.set(zone as string, made)
  return made
}

function makeClock(zone: unknown): Intl.DateTimeFormat | undefined {
  if (typeof zone !== 'string' || !/^[A-Za-z]/.test(zone)) return undefined
  const pad = '2-digit'
  try {
    // The Swedish form is year-month-day hour:minute:second, in that order and padded.
    return new Intl.DateTimeFormat('sv-SE', {
      timeZone: zone,
      calendar: 'gregory',
      numberingSystem: 'latn',
      hourCycle: 'h23',
      year: 'numeric',
      month: pad,
      day: pad,
      hour: pad,
      minute: pad,
      second: pad,
    })
  } catch {
    return undefined
  }
}

function instantMs(instant: unknown): Outcome<number> {
  const ms = typeof instant === 'string' && ISO_INSTANT.test(instant) ? new Date(instant).getTime() : instant
  if (typeof instant === 'string' && !Number.isFinite(ms))
    return failure('E_DATE', 'The instant must be ISO 8601 with Z or an offset.', { field: 'instant' })
  const bad = checkNumber('instant', ms, FIRST_MS, LAST_MS)
  return bad ?? (ms as number)
}

/** 'YYYY-MM-DD HH:MM:SS' on the zone's wall clock. */
function wallText(clock: Intl.DateTimeFormat, epochMs: number): string {
  return clock.format(epochMs)
}

/** How far the wall clock is ahead of UTC, whole seconds in ms. */
function offsetMs(clock: Intl.DateTimeFormat, epochMs: number): number {
  const wall = wallText(clock, epochMs)
  const [hours, minutes, seconds] = [wall.slice(11, 13), wall.slice(14, 16), wall.slice(17, 19)].map(Number)
  const ofDay = ((hours ?? 0) * 60 + (minutes ?? 0)) * 60 + (seconds ?? 0)
  return epochDay(wall.slice(0, 10)) * DAY_MS + ofDay * 1000 - Math.floor(epochMs / 1000) * 1000
}

/** Midnight is skipped: the first instant whose wall clock reads later, to the second, by halving. */
function endOfGap(clock: Intl.DateTimeFormat, midnight: number): number {
  let before = midnight - DAY_MS - offsetMs(clock, midnight - DAY_MS)
  let after = midnight + DAY_MS - offsetMs(clock, midnight + DAY_MS)
  while (after - before > 1000) {
    const middle = before + Math.floor((after - before) / 2000) * 1000
    if (middle + offsetMs(clock, middle) < midnight) before = middle
    else after = middle
  }
  return after
}
