import { addDays, epochDay, type PlainDate } from '../plain-date.ts'
import type { Procedure } from '../vocabulary.ts'
import { MINUTES } from './actions.ts'

/** A check with the day on which it falls due. */
export interface DatedCheck {
  readonly procedure: Procedure
  readonly vital: boolean
  readonly dueOn: PlainDate
}

/** What falls due in the seven days from a Monday on. */
export interface WeekLoad {
  readonly monday: PlainDate
  readonly checks: number
  readonly vital: number
  /** Attended. */
  readonly minutes: number
}

/** 1970-01-01 was a Thursday. */
const mondayOf = (day: PlainDate): PlainDate => addDays(day, -((epochDay(day) + 3) % 7))

/**
 * The work that falls due week by week, from the week of `from` to that of `to`, both inclusive; weeks without any are
 * among them. Checks that were due before `from` or are due after that are not: what is overdue has its own list.
 */
export function loadByWeek(checks: readonly DatedCheck[], from: PlainDate, to: PlainDate): WeekLoad[] {
  const weeks: WeekLoad[] = []
  for (let monday = mondayOf(from); monday <= to; monday = addDays(monday, 7)) {
    const sunday = addDays(monday, 6)
    const due = checks.filter(({ dueOn }) => dueOn >= from && dueOn >= monday && dueOn <= sunday)
    weeks.push({
      monday,
      checks: due.length,
      vital: due.filter(({ vital }) => vital).length,
      minutes: due.reduce((sum, { procedure }) => sum + MINUTES[procedure], 0),
    })
  }
  return weeks
}
