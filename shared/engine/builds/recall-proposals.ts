import { groupBy } from '../group-by.ts'
import { addDays } from '../plain-date.ts'
import type { Moment } from '../readiness/moment.ts'
import type { EpochMs, RaisedCheck } from '../readiness/types.ts'
import { BANDS, type Band } from '../vocabulary.ts'
import type { Departure } from './departures.ts'
import { matchingProcedures, PROCEDURE_OF_MEASURE, type RecallProcedure } from './matching.ts'
import { isTestedSince, standingFailure, unitsToRecall, type BatchUnit } from './recall-units.ts'

/** What a unit did that may ail its siblings too. */
export interface RecallCause {
  readonly unitId: string
  readonly kind: 'failed' | 'departs'
  readonly testId: string
  readonly performedAt: EpochMs
  /** Without the unit's name: "reached 85 °C after 8.2 min at 50 W". */
  readonly text: string
}

/** A recall that somebody should decide on: nothing asks for these siblings' tests yet. */
export interface RecallProposal {
  readonly procedure: RecallProcedure
  readonly band: Band
  readonly causes: readonly RecallCause[]
  readonly siblingIds: readonly string[]
}

interface Input {
  readonly units: readonly BatchUnit[]
  /** Of these units, by the figures of the whole build sheet. */
  readonly departures: readonly Departure[]
  /** Recalls of these units, taken back ones too: what was decided once is not proposed again. */
  readonly asked: readonly RaisedCheck[]
}

/**
 * A failed or departing unit proposes a recall of its batch on that band, as long as a sibling in use has neither been
 * asked nor been tested since. One proposal for each procedure and band, whatever number of units speak for it.
 */
export function recallProposals(moment: Moment, input: Input): RecallProposal[] {
  const found = [...failures(moment, input.units), ...departing(moment, input)]
  return [...groupBy(found, ({ procedure, band }) => `${procedure} ${band}`).values()]
    .flatMap((seeds): RecallProposal[] => {
      const [first] = seeds
      if (!first) return []
      const { procedure, band } = first
      const siblingIds = unitsToRecall(moment, input.units, { procedure, band })
        .filter(({ id }) => seeds.some((seed) => asksFor(moment, seed, { id, ...input })))
        .map(({ id }) => id)
      const causes = seeds.map(({ cause }) => cause)
      return siblingIds.length > 0 ? [{ procedure, band, causes, siblingIds }] : []
    })
    .toSorted((a, b) => BANDS.indexOf(a.band) - BANDS.indexOf(b.band))
}

interface Seed {
  readonly procedure: RecallProcedure
  readonly band: Band
  readonly cause: RecallCause
}

function failures(moment: Moment, units: readonly BatchUnit[]): Seed[] {
  return units.flatMap(({ id, category }) =>
    matchingProcedures(category).flatMap((procedure) =>
      BANDS.flatMap((band): Seed[] => {
        const failed = standingFailure(moment, id, { procedure, band })
        if (!failed) return []
        const { test, finding } = failed
        const cause = { unitId: id, testId: test.id, performedAt: test.performedAt, text: finding.text }
        return [{ procedure, band, cause: { ...cause, kind: 'failed' } }]
      }),
    ),
  )
}

/** A unit that is better than the others is worth a look, but no reason to doubt them. */
function departing(moment: Moment, { units, departures }: Input): Seed[] {
  const own = new Set(units.map(({ id }) => id))
  return departures.flatMap(({ unitId, measure, band, testId, text, isWorse }): Seed[] => {
    const procedure = PROCEDURE_OF_MEASURE[measure]
    const test = moment.state.evidence.find(({ id }) => id === testId)
    if (!isWorse || !own.has(unitId) || !test || standingFailure(moment, unitId, { procedure, band }))
      return []
    const cause = { unitId, testId, performedAt: test.performedAt, text }
    return [{ procedure, band, cause: { ...cause, kind: 'departs' } }]
  })
}

function asksFor(
  moment: Moment,
  { procedure, band, cause }: Seed,
  { id, asked, departures }: Pick<Input, 'asked' | 'departures'> & { id: string },
): boolean {
  if (cause.kind === 'departs' && hasOwnAnswer(moment, { procedure, band, cause }, { id, departures }))
    return false
  const since = cause.performedAt
  const isAsked = asked.some(
    (check) =>
      check.subjectId === id &&
      check.procedure === procedure &&
      (check.band === null || check.band === band) &&
      check.raisedAt >= since,
  )
  return id !== cause.unitId && !isAsked && !isTestedSince(moment, id, { procedure, band, since })
}

/**
 * A unit that departs is no failure: a sibling that stands apart on the same band as well is known already, and one
 * that was measured on the same day, at the same bench, has shown what it does.
 */
function hasOwnAnswer(
  moment: Moment,
  { procedure, band, cause }: Seed,
  { id, departures }: { id: string; departures: readonly Departure[] },
): boolean {
  const departs = departures.some(
    (one) => one.unitId === id && one.band === band && PROCEDURE_OF_MEASURE[one.measure] === procedure,
  )
  if (departs) return true
  const since = moment.passedAt(addDays(moment.dayOf(cause.performedAt), -1)) - 1
  return isTestedSince(moment, id, { procedure, band, since })
}
