/**
 * When the next test is due and what to call today. Source: calculation sheet, section 14.
 * Due dates are counted from the test, never from the last due date, so that 31 January does not drift.
 */
import { checkWhole } from './check-range.ts'
import { failure, isFailure, type Failure, type Outcome } from './outcome.ts'
import { addMonths, daysBetween, parseDate, type PlainDate } from './plain-date.ts'

export type DueState = 'OVERDUE' | 'DUE_SOON' | 'CURRENT' | 'NEVER_TESTED'

/** `days` from today to the due day; negative when past. Null when there is no passed test. */
export type DueStatus =
  | { readonly state: 'NEVER_TESTED'; readonly days: null }
  | { readonly state: Exclude<DueState, 'NEVER_TESTED'>; readonly days: number }

export const DEFAULT_DUE_WINDOW_DAYS = 30
export const MAX_INTERVAL_MONTHS = 120

/** The due date of a passed test; months an integer 1 to 120. `E_DATE`, `E_RANGE`. */
export function dueOn(testedOn: PlainDate, months: number): Outcome<PlainDate> {
  const day = parseDate(testedOn, 'testedOn')
  if (isFailure(day)) return day
  const bad = checkWhole('months', months, 1, MAX_INTERVAL_MONTHS)
  if (bad) return bad
  if (day >= '9990')
    return failure('E_RANGE', 'testedOn must lie before the year 9990.', { field: 'testedOn' })
  return addMonths(day, months)
}

/**
 * What to call today for a due date. The due day itself is still in date; no due date (no passed test)
 * is `NEVER_TESTED`. `windowDays` 0 to 365. `E_DATE`, `E_RANGE`.
 */
export function dueState(
  today: PlainDate,
  due: PlainDate | null,
  windowDays = DEFAULT_DUE_WINDOW_DAYS,
): Outcome<DueStatus> {
  const now = parseDate(today, 'today')
  if (isFailure(now)) return now
  const badWindow = checkWhole('windowDays', windowDays, 0, 365)
  if (badWindow) return badWindow
  if (due === null || due === undefined) return { state: 'NEVER_TESTED', days: null }
  const day = parseDate(due, 'due')
  if (isFailure(day)) return day
  const days = daysBetween(now, day)
  if (days < 0) return { state: 'OVERDUE', days }
  return { state: days <= windowDays ? 'DUE_SOON' : 'CURRENT', days }
}

/** `E_DATE`, or `E_FUTURE` when a test is dated after today. */
export function checkTestedOn(testedOn: PlainDate, today: PlainDate): Failure | undefined {
  for (const [field, value] of [
    ['testedOn', testedOn],
    ['today', today],
  ] as const) {
    const day = parseDate(value, field)
    if (isFailure(day)) return day
  }
  if (testedOn <= today) return undefined
  return failure('E_FUTURE', `testedOn is after today (${today}): a test cannot be dated ahead.`, {
    field: 'testedOn',
  })
}
