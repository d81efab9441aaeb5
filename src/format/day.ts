import { daysBetween, type PlainDate } from '#shared/engine/plain-date.ts'

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const

/** `14 Mar 2026`: the month as a word, so that nobody can swap it with the day. */
export function dayText(day: PlainDate): string {
  const [year, month, date] = day.split('-').map(Number)
  return `${date} ${MONTHS[(month ?? 1) - 1]} ${year}`
}

/** `14 Mar`, for places where the year is plain from the context. */
export function shortDayText(day: PlainDate): string {
  return dayText(day).replace(/ \d{4}$/, '')
}

export function monthName(month: number): string {
  return MONTHS[month - 1] ?? ''
}

/** `today`, `in 12 days`, `3 days ago`; months and years once days stop meaning much. */
export function daysAway(day: PlainDate, today: PlainDate): string {
  const days = daysBetween(today, day)
  if (days === 0) return 'today'
  if (days === 1) return 'tomorrow'
  if (days === -1) return 'yesterday'
  const count = countText(Math.abs(days))
  return days > 0 ? `in ${count}` : `${count} ago`
}

function countText(days: number): string {
  if (days < 60) return `${days} days`
  if (days < 730) return `${Math.round(days / 30.44)} months`
  return `${Math.round(days / 365.25)} years`
}

/** Wall-clock parts of an instant in an IANA zone: the day and `HH:MM` on 24 hours. */
export function wallClock(at: string | number | Date, zone: string): { day: PlainDate; time: string } {
  const text = clockOf(zone).format(new Date(at))
  return { day: text.slice(0, 10), time: text.slice(11, 16) }
}

/** `31 Oct 2026, 18:00` in the group's zone. */
export function instantText(at: string | number | Date, zone: string): string {
  const { day, time } = wallClock(at, zone)
  return `${dayText(day)}, ${time}`
}

const clocks = new Map<string, Intl.DateTimeFormat>()

function clockOf(zone: string): Intl.DateTimeFormat {
  const known = clocks.get(zone)
  if (known) return known
  // The Swedish form is year-month-day hour:minute, in that order and padded.
  const made = new Intl.DateTimeFormat('sv-SE', { timeZone: zone, dateStyle: 'short', timeStyle: 'short' })
  clocks.set(zone, made)
  return made
}

/**
 * The instant, as ISO text in UTC, at which a wall clock in the zone shows this day and time. A time that a clock
 * change skips becomes the moment just after the gap; one that comes twice means the first.
 */
export function instantOfWall(day: PlainDate, time: string, zone: string): string {
  const wanted = Date.parse(`${day}T${time}:00Z`)
  const guesses = [-DAY_MS, 0, DAY_MS]
    .map((shift) => wanted - offsetMs(wanted + shift, zone))
    .sort((a, b) => a - b)
  const exact = guesses.find((guess) => guess + offsetMs(guess, zone) === wanted)
  return new Date(exact ?? guesses[guesses.length - 1] ?? wanted).toISOString()
}

const DAY_MS = 86_400_000

/** How far the zone's wall clock is ahead of UTC at an instant, in whole minutes. */
function offsetMs(atMs: number, zone: string): number {
  const { day, time } = wallClock(atMs, zone)
  return Date.parse(`${day}T${time}:00Z`) - Math.floor(atMs / 60_000) * 60_000
}
