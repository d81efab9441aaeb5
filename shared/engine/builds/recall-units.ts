/** Which units of a batch a recall asks for a test, and which tests of theirs speak for one. */
import { answeringProcedures, openRecall } from '../readiness/doubt.ts'
import type { Moment } from '../readiness/moment.ts'
import { candidates, type Candidate } from '../readiness/standing.ts'
import type { EpochMs } from '../readiness/types.ts'
import type { Band, Category, Condition, Procedure } from '../vocabulary.ts'

export interface BatchUnit {
  readonly id: string
  readonly designation: string
  readonly category: Category
  readonly condition: Condition
  readonly isRetired: boolean
  /** That the unit is for; absent: not entered. */
  readonly bands?: readonly Band[]
}

/** What a recall asks for: a test on one band, or on all of them (null). */
export interface RecallScope {
  readonly procedure: Procedure
  readonly band: Band | null
}

/** A broken or retired unit goes into no kit: there is nothing to prove. */
export const isInUse = ({ isRetired, condition }: BatchUnit) => !isRetired && condition !== 'unserviceable'

/**
 * Units that work, are not asked already, and are not known to fail there themselves: those have their answer.
 */
export function unitsToRecall(moment: Moment, units: readonly BatchUnit[], scope: RecallScope): BatchUnit[] {
  return units.filter(
    (unit) =>
      isInUse(unit) &&
      !openRecall(moment, unit.id, scope.procedure, scope.band) &&
      !standingFailure(moment, unit.id, scope),
  )
}

/**
 * The newest failure that no later test has answered. A heat test that passes at less power only says what is left; any
 * other newer result replaces the older one.
 */
export function standingFailure(
  moment: Moment,
  unitId: string,
  { procedure, band }: RecallScope,
): Candidate | undefined {
  const newer: Candidate[] = []
  for (const candidate of candidates(moment, {
    subjectId: unitId,
    procedures: answeringProcedures(procedure),
    band,
  })) {
    if (candidate.finding.finding === 'fail') return isAnswered(candidate, newer) ? undefined : candidate
    newer.push(candidate)
  }
  return undefined
}

function isAnswered({ test, finding }: Candidate, newer: readonly Candidate[]): boolean {
  if (test.procedure !== 'heat-test') return newer.length > 0
  return newer.some(
    (pass) => pass.finding.band === finding.band && (pass.finding.powerW ?? 0) >= (finding.powerW ?? 0),
  )
}

/** Tested on the band by the procedure since then, whatever it found. */
export function isTestedSince(
  moment: Moment,
  unitId: string,
  { procedure, band, since }: RecallScope & { since: EpochMs },
): boolean {
  return candidates(moment, { subjectId: unitId, procedures: answeringProcedures(procedure), band }).some(
    ({ test }) => test.performedAt > since,
  )
}
