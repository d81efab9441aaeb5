import { addMonths, daysBetween, type PlainDate } from '#shared/engine/plain-date.ts'
import { monthName } from '@/format/day.ts'
import type { Range, Scale } from './scale.ts'
import { linearScale } from './scale.ts'

/** Calendar days on an axis. A day's number counts from this one, so that any two can be compared. */
const FIRST: PlainDate = '2000-01-01'

export const dayNumber = (day: PlainDate) => daysBetween(FIRST, day)

export interface DayTick {
  readonly day: PlainDate
  readonly label: string
}

const STEP_MONTHS = [1, 2, 3, 6, 12, 24, 60, 120] as const

/** The first of months between two days, at most `most`; the year is said at its first tick. */
export function dayTicks(from: PlainDate, to: PlainDate, most: number): DayTick[] {
  for (const step of STEP_MONTHS) {
    const days = firstsOf(from, to, step)
    if (days.length <= most) return days.map((day, index) => ({ day, label: labelOf(day, days[index - 1]) }))
  }
  return []
}

function firstsOf(from: PlainDate, to: PlainDate, step: number): PlainDate[] {
  const [year = 0, month = 1] = from.split('-').map(Number)
  // Steps are counted from January, of years from the year 2000, so that they do not wander with the data.
  const months = Math.ceil(((year - 2000) * 12 + month - 1) / step) * step
  const days: PlainDate[] = []
  for (let day = addMonths(FIRST, months); day <= to; day = addMonths(day, step))
    if (day >= from) days.push(day)
  return days
}

function labelOf(day: PlainDate, before: PlainDate | undefined): string {
  const month = monthName(Number(day.slice(5, 7)))
  return before?.slice(0, 4) === day.slice(0, 4) ? month : `${month} ${day.slice(0, 4)}`
}

export function dayScale(
  from: PlainDate,
  to: PlainDate,
  start: number,
  end: number,
): (day: PlainDate) => number {
  const range: Range = { low: dayNumber(from), high: dayNumber(to) }
  const scale: Scale = linearScale(range, start, end)
  return (day) => scale(dayNumber(day))
}
