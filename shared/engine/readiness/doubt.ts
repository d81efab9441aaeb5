import { addMonths } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'
import type { Moment } from './moment.ts'
import { policyAt, ruleFor } from './rules-in-force.ts'
import type { Evidence, RaisedCheck } from './types.ts'

/** Why a result does not count for the moment. */
export type Doubt =
  | { readonly kind: 'calibration-lapsed' | 'calibration-failed'; readonly instrument: string }
  | { readonly kind: 'recall'; readonly check: RaisedCheck }

/** A recall of a transformer doubts everything that spoke for its match and loss on that band. */
const DOUBTED_BY_RECALL: Readonly<Partial<Record<Procedure, readonly Procedure[]>>> = {
  'heat-test': ['heat-test', 'pair-loss', 'open-short-load'],
}

/** The doubt about a test on a band, if any: its instrument's calibration, or a recall since. */
export function doubtAbout(moment: Moment, test: Evidence, band: Band | null): Doubt | undefined {
  return calibrationDoubt(moment, test) ?? recallDoubt(moment, test, band)
}

/**
 * A result stands when the last calibration before it was good and had not lapsed, and the next one did not fail. A
 * good calibration after a lapse shows that the instrument had stayed right, and restores what was measured meanwhile.
 */
function calibrationDoubt(moment: Moment, test: Evidence): Doubt | undefined {
  const instrument = moment.state.instruments.find(({ id }) => id === test.instrumentId)
  if (!instrument) return undefined
  const calibrations = moment.tests(instrument.id, 'calibration')
  const after = calibrations.findLast(
    (one) => one.performedAt > test.performedAt && one.recordedAt <= moment.at,
  )
  if (after?.finding === 'fail') return { kind: 'calibration-failed', instrument: instrument.designation }
  if (after) return undefined
  const before = calibrations.find((one) => one.performedAt <= test.performedAt)
  if (!before) return undefined
  if (before.finding === 'fail') return { kind: 'calibration-failed', instrument: instrument.designation }
  const policy = policyAt(moment.state, test.performedAt)
  const subject = { category: instrument.category, facts: {} }
  const months = ruleFor(policy, subject, 'calibration', test.performedOn)?.intervalMonths
  if (!months || addMonths(before.performedOn, months) >= test.performedOn) return undefined
  return { kind: 'calibration-lapsed', instrument: instrument.designation }
}

function recallDoubt(moment: Moment, test: Evidence, band: Band | null): Doubt | undefined {
  const check = moment.state.raisedChecks.find(
    (one) =>
      one.doubtsEarlier &&
      one.subjectId === test.subjectId &&
      one.raisedAt <= moment.at &&
      test.performedAt <= one.raisedAt &&
      (one.band === null || band === null || one.band === band) &&
      (DOUBTED_BY_RECALL[one.procedure] ?? [one.procedure]).includes(test.procedure) &&
      !isAnswered(moment, one),
  )
  return check && { kind: 'recall', check }
}

/** A raised check is answered by a test of its procedure, on its band, made after it was raised and not in doubt itself. */
export function isAnswered(moment: Moment, check: RaisedCheck): boolean {
  return moment
    .tests(check.subjectId, check.procedure)
    .some(
      (test) =>
        test.performedAt > check.raisedAt &&
        test.recordedAt <= moment.at &&
        (check.band === null || test.findings.some(({ band }) => band === null || band === check.band)) &&
        calibrationDoubt(moment, test) === undefined,
    )
}
