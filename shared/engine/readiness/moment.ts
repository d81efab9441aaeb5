import { groupBy } from '../group-by.ts'
import type { PlainDate } from '../plain-date.ts'
import type { Procedure } from '../vocabulary.ts'
import { policyAt } from './rules-in-force.ts'
import type { EpochMs, Evidence, KitState, Policy } from './types.ts'
import { zoneDays, type ZoneDays } from './zone-days.ts'

/** A kit's state prepared once for all the instants at which it is judged. */
export interface Dossier extends ZoneDays {
  readonly state: KitState
  /** Tests of one subject by one procedure, newest first. */
  tests(subjectId: string, procedure: Procedure): readonly Evidence[]
}

/** One instant at which a kit is judged. */
export interface Moment extends Dossier {
  readonly at: EpochMs
  readonly today: PlainDate
  readonly policy: Policy | undefined
}

const NONE: readonly Evidence[] = []

export function dossierOf(state: KitState): Dossier {
  const bySubject = groupBy(state.evidence, (test) => test.subjectId)
  const sorted = new Map<string, Map<Procedure, Evidence[]>>()
  for (const [subjectId, tests] of bySubject) {
    const byProcedure = groupBy(tests, (test) => test.procedure)
    for (const list of byProcedure.values()) list.sort(newestFirst)
    sorted.set(subjectId, byProcedure)
  }
  const { passedAt, dayOf } = zoneDays(state.zone)
  const tests = (subjectId: string, procedure: Procedure) => sorted.get(subjectId)?.get(procedure) ?? NONE
  return { state, tests, passedAt, dayOf }
}

export function momentOf(dossier: Dossier, at: EpochMs): Moment {
  const { state, tests, passedAt, dayOf } = dossier
  return { state, tests, passedAt, dayOf, at, today: dayOf(at), policy: policyAt(state, at) }
}

function newestFirst(a: Evidence, b: Evidence): number {
  return b.performedAt - a.performedAt || b.recordedAt - a.recordedAt || (a.id < b.id ? 1 : -1)
}
