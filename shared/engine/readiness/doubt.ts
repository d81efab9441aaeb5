import type { Band, Procedure } from '../vocabulary.ts'
import { calibrationStanding } from './calibration-state.ts'
import type { Moment } from './moment.ts'
import { policyAt, ruleFor } from './rules-in-force.ts'
import type { Evidence, RaisedCheck } from './types.ts'

/** Why a result does not count for the moment. */
export type Doubt =
  | {
      readonly kind: 'calibration-lapsed' | 'calibration-failed' | 'session-check-failed'
      readonly instrument: string
    }
  | { readonly kind: 'recall'; readonly check: RaisedCheck }

/** Two ways to measure how much a transformer loses: each answers for the other. */
const LOSS_TESTS: readonly Procedure[] = ['pair-loss', 'open-short-load']

/** A recall of a transformer doubts everything that spoke for its match and loss on that band. */
const DOUBTED_BY_RECALL: Readonly<Partial<Record<Procedure, readonly Procedure[]>>> = {
  'heat-test': ['heat-test', ...LOSS_TESTS],
  'pair-loss': LOSS_TESTS,
  'open-short-load': LOSS_TESTS,
}

/** The procedures that answer a check of one: the usual one first. */
export function answeringProcedures(procedure: Procedure): readonly Procedure[] {
  return LOSS_TESTS.includes(procedure) ? LOSS_TESTS : [procedure]
}

/** The doubt about a test on a band, if any: its instrument's calibration, or a recall since. */
export function doubtAbout(moment: Moment, test: Evidence, band: Band | null): Doubt | undefined {
  return calibrationDoubt(moment, test) ?? recallDoubt(moment, test, band)
}

/**
 * A result stands when the last calibration before it was good and had not lapsed, and the next one did not fail. A
 * good calibration after a lapse shows that the instrument had stayed right, and restores what was measured meanwhile;
 * a session check against a reference part speaks between calibrations.
 */
function calibrationDoubt(moment: Moment, test: Evidence): Doubt | undefined {
  if (test.instrumentId === null) return undefined
  const instrument = moment.state.instruments.find(({ id }) => id === test.instrumentId)
  if (!instrument) return undefined
  const policy = policyAt(moment.state, test.performedAt)
  const subject = { category: instrument.category, facts: {} }
  const known = (procedure: Procedure) =>
    moment.tests(instrument.id, procedure).filter((one) => one.recordedAt <= moment.at)
  const { state } = calibrationStanding({
    calibrations: known('calibration'),
    sessionChecks: known('session-check'),
    performedAt: test.performedAt,
    performedOn: test.performedOn,
    months: ruleFor(policy, subject, 'calibration', test.performedOn)?.intervalMonths ?? null,
  })
  if (state === 'check-failed') return { kind: 'session-check-failed', instrument: instrument.designation }
  if (state !== 'failed' && state !== 'lapsed') return undefined
  return { kind: `calibration-${state}`, instrument: instrument.designation }
}

function recallDoubt(moment: Moment, test: Evidence, band: Band | null): Doubt | undefined {
  const check = openRecall(moment, test.subjectId, test.procedure, band)
  return check && test.performedAt <= check.raisedAt ? { kind: 'recall', check } : undefined
}

/** The recall that nobody has answered and that doubts results of this procedure on this band. */
export function openRecall(
  moment: Moment,
  subjectId: string,
  procedure: Procedure,
  band: Band | null,
): RaisedCheck | undefined {
  return moment.state.raisedChecks.find(
    (one) =>
      one.doubtsEarlier &&
      one.subjectId === subjectId &&
      one.raisedAt <= moment.at &&
      (one.band === null || band === null || one.band === band) &&
      (DOUBTED_BY_RECALL[one.procedure] ?? [one.procedure]).includes(procedure) &&
      !isAnswered(moment, one, band),
  )
}

/**
 * A raised check is answered by a test of its procedure made after it was raised and not in doubt itself: on its band,
 * or for a check of all bands on the band asked about.
 */
export function isAnswered(moment: Moment, check: RaisedCheck, band: Band | null): boolean {
  return answerOf(moment, check, band) !== undefined
}

/** The first test that answered a raised check; of two procedures that do, the usual one's. */
export function answerOf(moment: Moment, check: RaisedCheck, band: Band | null): Evidence | undefined {
  const on = check.band ?? band
  for (const procedure of answeringProcedures(check.procedure)) {
    const answer = moment
      .tests(check.subjectId, procedure)
      .findLast(
        (test) =>
          test.performedAt > check.raisedAt &&
          test.recordedAt <= moment.at &&
          (on === null || test.findings.some((finding) => finding.band === null || finding.band === on)) &&
          calibrationDoubt(moment, test) === undefined,
      )
    if (answer) return answer
  }
  return undefined
}
