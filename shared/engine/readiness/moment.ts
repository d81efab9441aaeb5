import { localDateOf, overdueFrom } from '../local-day.ts'
import { isFailure, type Outcome } from '../outcome.ts'
import type { PlainDate } from '../plain-date.ts'
import { groupBy } from '../group-by.ts'
import type { Procedure } from '../vocabulary.ts'
import { policyAt } from './rules-in-force.ts'
import type { EpochMs, Evidence, KitState, Policy } from './types.ts'

/** A kit's state prepared once for all the instants at which it is judged. */
export interface Dossier {
  readonly state: KitState
  /** Tests of one subject by one procedure, newest first. */
  tests(subjectId: string, procedure: Procedure): readonly Evidence[]
  /** The instant at which a due day has passed: the next local midnight. */
  passedAt(due: PlainDate): EpochMs
  /** The local day of an instant. */
  dayOf(at: EpochMs): PlainDate
}

/** One instant at which a kit is judged. */
export interface Moment extends Dossier {
  readonly at: EpochMs
  readonly today: PlainDate
  readonly policy: Policy | undefined
}

export function dossierOf(state: KitState): Dossier {
  const bySubject = groupBy(state.evidence, (test) => `${test.subjectId} ${test.procedure}`)
  for (const tests of bySubject.values()) tests.sort(newestFirst)
  const ends = new Map<PlainDate, EpochMs>()
  return {
    state,
    tests: (subjectId, procedure) => bySubject.get(`${subjectId} ${procedure}`) ?? [],
    dayOf: (at) => certain(localDateOf(at, state.zone)),
    passedAt: (due) => {
      const known = ends.get(due)
      if (known !== undefined) return known
      const end = certain<number>(overdueFrom(due, state.zone))
      ends.set(due, end)
      return end
    },
  }
}

export function momentOf(dossier: Dossier, at: EpochMs): Moment {
  const today = certain<PlainDate>(localDateOf(at, dossier.state.zone))
  return { ...dossier, at, today, policy: policyAt(dossier.state, at) }
}

function newestFirst(a: Evidence, b: Evidence): number {
  return b.performedAt - a.performedAt || b.recordedAt - a.recordedAt || (a.id < b.id ? 1 : -1)
}

/** Days and zones come checked from the database: a failure here cannot be. */
function certain<T extends string | number>(outcome: Outcome<T>): T {
  if (isFailure(outcome)) throw new RangeError(outcome.message)
  return outcome
}
