/**
 * Times as thermometers write them: seconds or minutes since the start, `mm:ss`, `hh:mm:ss`, clock times with or
 * without a date, with AM and PM. Only differences count, so the zone does not matter.
 */

export type ReadTime =
  | { readonly kind: 'elapsed' | 'clock'; readonly seconds: number }
  /** `14:05`: minutes and seconds of a log that counts up, or a time of day; null where it is no hour. */
  | { readonly kind: 'two-parts'; readonly counting: number; readonly ofDay: number | null }
  /** Both ways of reading `03/04/2026`; alike where only one is possible. */
  | { readonly kind: 'date'; readonly dayFirst: number; readonly monthFirst: number }

const DAY_S = 86_400
const CLOCK = /^(\d{1,3}):(\d{2})(?::(\d{2}(?:[.,]\d+)?))?\s*([ap]\.?m\.?)?$/i
const DATE = /^(\d{1,4})[-/.](\d{1,2})[-/.](\d{1,4})(?:[T\s,]+(.+?))?(?:Z|[+-]\d{2}:?\d{2})?$/i

/** A bare number counts in `unitS` seconds: 1, or 60 under a heading that says minutes. Null: no time at all. */
export function readTime(text: string, unitS: number): ReadTime | null {
  const cell = text.trim()
  if (/^\d+(?:[.,]\d+)?$/.test(cell))
    return { kind: 'elapsed', seconds: Number(cell.replace(',', '.')) * unitS }
  return readClock(cell) ?? readDate(cell)
}

function readClock(cell: string): ReadTime | null {
  const [, first, second, third, half] = CLOCK.exec(cell) ?? []
  if (first === undefined || second === undefined || Number(second) > 59) return null
  if (third === undefined && half === undefined) {
    const counting = Number(first) * 60 + Number(second)
    return { kind: 'two-parts', counting, ofDay: Number(first) < 24 ? counting * 60 : null }
  }
  const seconds = Number((third ?? '0').replace(',', '.'))
  if (seconds >= 60) return null
  return { kind: 'clock', seconds: hoursOf(Number(first), half) * 3600 + Number(second) * 60 + seconds }
}

function hoursOf(hours: number, half: string | undefined): number {
  if (half === undefined) return hours
  return (hours % 12) + (/^p/i.test(half) ? 12 : 0)
}

function readDate(cell: string): ReadTime | null {
  const [, first, second, third, rest] = DATE.exec(cell) ?? []
  if (first === undefined || second === undefined || third === undefined) return null
  const time = rest === undefined ? 0 : clockOfDay(rest)
  if (time === null) return null
  if (first.length === 4) return both(dayNumber(first, second, third), time)
  const dayFirst = dayNumber(third, second, first)
  const monthFirst = dayNumber(third, first, second)
  if (dayFirst === null || monthFirst === null) return both(dayFirst ?? monthFirst, time)
  return { kind: 'date', dayFirst: dayFirst * DAY_S + time, monthFirst: monthFirst * DAY_S + time }
}

function both(day: number | null, time: number): ReadTime | null {
  return day === null ? null : { kind: 'date', dayFirst: day * DAY_S + time, monthFirst: day * DAY_S + time }
}

/** With a date before it, two parts are hours and minutes. */
function clockOfDay(text: string): number | null {
  const bare = text.replace(/Z$/i, '').trim()
  const whole = /^\d{1,2}:\d{2}$/.test(bare) ? `${bare}:00` : bare
  const read = readClock(whole)
  return read?.kind === 'clock' ? read.seconds : null
}

function dayNumber(year: string, month: string, day: string): number | null {
  const y = Number(year) + (year.length <= 2 ? 2000 : 0)
  const at = new Date(Date.UTC(y, Number(month) - 1, Number(day)))
  return at.getUTCMonth() === Number(month) - 1 && at.getUTCDate() === Number(day)
    ? at.getTime() / 1000 / DAY_S
    : null
}

/** What a column of two-part times means. */
export type TwoParts = 'counting' | 'of-day'

/**
 * A heading may say it, and so does a column that goes past 23, or that begins below a minute as a log that counts up
 * does and a test after midnight does not. Null: nothing tells, and a person must. Undefined: there is nothing to tell.
 */
export function meaningOfTwoParts(times: readonly ReadTime[], heading: string): TwoParts | null | undefined {
  const short = times.flatMap((time) => (time.kind === 'two-parts' ? [time] : []))
  if (short.length === 0) return undefined
  if (/h:mm|clock|of day/i.test(heading)) return 'of-day'
  if (/elapsed|m:ss|min/i.test(heading)) return 'counting'
  if (short.some(({ ofDay }) => ofDay === null) || (short[0]?.counting ?? 0) < 60) return 'counting'
  return null
}

/** The same times with those of two parts read in one of the two ways. */
export function readAs(times: readonly ReadTime[], meaning: TwoParts): ReadTime[] {
  return times.map((time) => {
    if (time.kind !== 'two-parts') return time
    return meaning === 'counting'
      ? { kind: 'elapsed', seconds: time.counting }
      : { kind: 'clock', seconds: time.ofDay ?? 0 }
  })
}

/**
 * Seconds since the first time. A clock that passes midnight goes on; of the two ways of reading a date the one
 * that makes the shorter log counts. Null where a time is missing.
 */
export function sinceFirst(times: readonly ReadTime[]): number[] {
  if (times.every((time) => time.kind === 'date')) {
    const day = elapsed(times.map((time) => time.dayFirst))
    const month = elapsed(times.map((time) => time.monthFirst))
    const span = (list: readonly number[]) => Math.abs(list.at(-1) ?? 0)
    return span(day) < span(month) ? day : month
  }
  return elapsed(pastMidnight(times.map(secondsOf)))
}

function secondsOf(time: ReadTime): number {
  if (time.kind === 'date') return time.dayFirst
  return time.kind === 'two-parts' ? time.counting : time.seconds
}

function elapsed(seconds: readonly number[]): number[] {
  const first = seconds[0] ?? 0
  // Milliseconds are as fine as any thermometer, and binary fractions are not shown.
  return seconds.map((at) => Math.round((at - first) * 1000) / 1000)
}

function pastMidnight(seconds: readonly number[]): number[] {
  let days = 0
  return seconds.map((at, place) => {
    const before = seconds[place - 1]
    if (before !== undefined && before - at > DAY_S / 2) days += DAY_S
    return at + days
  })
}
