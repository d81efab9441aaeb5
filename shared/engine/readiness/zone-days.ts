import { localDateOf, overdueFrom } from '../local-day.ts'
import { isFailure, type Outcome } from '../outcome.ts'
import type { PlainDate } from '../plain-date.ts'
import type { EpochMs } from './types.ts'

/** Days and instants of one time zone. */
export interface ZoneDays {
  /** The instant at which a due day has passed: the next local midnight. */
  passedAt(due: PlainDate): EpochMs
  /** The local day of an instant. */
  dayOf(at: EpochMs): PlainDate
}

/**
 * Kits share their due days, and a conversion by the runtime's zone database costs as much as a judgement: answers are
 * kept by zone, and dropped all at once when there are too many.
 */
const KEPT = 10_000
const zones = new Map<string, ZoneDays>()

export function zoneDays(zone: string): ZoneDays {
  const known = zones.get(zone)
  if (known) return known
  const made: ZoneDays = {
    passedAt: kept((due: PlainDate) => certain<number>(overdueFrom(due, zone))),
    dayOf: kept((at: EpochMs) => certain<PlainDate>(localDateOf(at, zone))),
  }
  zones.set(zone, made)
  return made
}

function kept<Key, Value>(compute: (key: Key) => Value): (key: Key) => Value {
  const answers = new Map<Key, Value>()
  return (key) => {
    const known = answers.get(key)
    if (known !== undefined) return known
    if (answers.size >= KEPT) answers.clear()
    const value = compute(key)
    answers.set(key, value)
    return value
  }
}

/** Days and zones come checked from the database: a failure here cannot be. */
function certain<T extends string | number>(outcome: Outcome<T>): T {
  if (isFailure(outcome)) throw new RangeError(outcome.message)
  return outcome
}
