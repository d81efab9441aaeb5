import { addMonths, type PlainDate } from '../plain-date.ts'
import type { EpochMs, Evidence } from './types.ts'

/**
 * How an instrument's calibration speaks for what it measured: `in-date`, `confirmed` by a good calibration since
 * (also after a lapse: the instrument had stayed right), `vouched` for by a session check after a lapse, `lapsed`,
 * `failed` before or after, `check-failed` in the session before or after, or `none` on record.
 */
export type CalibrationState =
  'in-date' | 'confirmed' | 'vouched' | 'lapsed' | 'failed' | 'check-failed' | 'none'

export interface CalibrationStanding {
  readonly state: CalibrationState
  /** The last calibration before the measurement, and the first after it. */
  readonly before: Evidence | null
  readonly after: Evidence | null
  /** Last day that the calibration before was good for; null: none, or no rule asks for another. */
  readonly untilOn: PlainDate | null
  /** The session check that vouches or failed. */
  readonly check: Evidence | null
}

interface Asked {
  /** Calibrations that are known and count, newest first. */
  readonly calibrations: readonly Evidence[]
  /** Session checks of the instrument against a reference part, likewise. */
  readonly sessionChecks?: readonly Evidence[]
  readonly performedAt: EpochMs
  readonly performedOn: PlainDate
  /** How long the rule of that day lets a calibration stand; null: for good. */
  readonly months: number | null
}

export function calibrationStanding(asked: Asked): CalibrationStanding {
  const { calibrations, performedAt, performedOn, months } = asked
  const after = calibrations.findLast((one) => one.performedAt > performedAt) ?? null
  const before = calibrations.find((one) => one.performedAt <= performedAt) ?? null
  const untilOn = before && months ? addMonths(before.performedOn, months) : null
  const stateOf = (): CalibrationState => {
    if (after) return after.finding === 'fail' ? 'failed' : 'confirmed'
    if (!before) return 'none'
    if (before.finding === 'fail') return 'failed'
    return untilOn === null || untilOn >= performedOn ? 'in-date' : 'lapsed'
  }
  return { ...checked(stateOf(), asked, { before, after }), before, after, untilOn }
}

/**
 * A session check sees one value of one part, so it never stands in for a first calibration, nor against what a
 * calibration has said since. One that failed doubts what was measured back to the last good one, and on to the next;
 * one that passed vouches for an instrument whose calibration has lapsed: for the rest of its day, and for all that
 * was measured before it, since the instrument had stayed right.
 */
function checked(
  state: CalibrationState,
  { sessionChecks = [], performedAt, performedOn }: Asked,
  { before, after }: Pick<CalibrationStanding, 'before' | 'after'>,
): Pick<CalibrationStanding, 'state' | 'check'> {
  if (state === 'confirmed' || state === 'failed') return { state, check: null }
  const between = sessionChecks.filter(
    (one) =>
      one.performedAt > (before?.performedAt ?? -Infinity) &&
      one.performedAt < (after?.performedAt ?? Infinity),
  )
  const next = between.findLast((one) => one.performedAt > performedAt)
  const last = between.find((one) => one.performedAt <= performedAt)
  const failed = [next, last].find((one) => one?.finding === 'fail')
  if (failed) return { state: 'check-failed', check: failed }
  const vouching = next ?? (last?.performedOn === performedOn ? last : undefined)
  return state === 'lapsed' && vouching ? { state: 'vouched', check: vouching } : { state, check: null }
}
