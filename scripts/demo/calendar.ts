import { isFailure } from '#shared/engine/outcome.ts'
import { localDateOf } from '#shared/engine/local-day.ts'
import { addDays, daysBetween, type PlainDate } from '#shared/engine/plain-date.ts'

/** Seven hours behind UTC all year: a fixed offset, so that a shift by whole days keeps every wall clock. */
export const ZONE = 'Etc/GMT+7'
const OFFSET = '-07:00'

/** The day at which everything the demo group is told to be holds. */
export const D0_ON: PlainDate = '2026-10-31'

/** Wall clock of the group, in the scenario's own days: '2026-06-13 19:00'. */
export type Local = `${number}-${number}-${number} ${number}:${number}`

/** The calendar day on the group's own clock. */
export function localDayOf(at: Date): PlainDate {
  const day = localDateOf(at.getTime(), ZONE)
  if (isFailure(day)) throw new RangeError(day.message)
  return day
}

/** The scenario's days moved by one whole number of days, so that D0 falls on the day asked for. */
export class Calendar {
  readonly #days: number

  /** `asOf`: any instant of the day on which D0 shall fall. */
  constructor(asOf: Date) {
    this.#days = daysBetween(D0_ON, localDayOf(asOf))
  }

  day(scenarioDay: PlainDate): PlainDate {
    return addDays(scenarioDay, this.#days)
  }

  at(local: Local): Date {
    const [day = '', time = ''] = local.split(' ')
    return new Date(`${this.day(day)}T${time}:00${OFFSET}`)
  }

  instant(local: Local): string {
    return this.at(local).toISOString()
  }
}

/** The same wall clock so many minutes later (or earlier). */
export function later(local: Local, minutes: number): Local {
  const at = new Date(`${local.replace(' ', 'T')}:00Z`)
  const moved = new Date(at.getTime() + Math.round(minutes) * 60_000).toISOString()
  return `${moved.slice(0, 10)} ${moved.slice(11, 16)}` as Local
}

export const onDay = (day: PlainDate, time: string): Local => `${day} ${time}` as Local
