import { addMonths, type PlainDate } from '../plain-date.ts'
import type { EpochMs, Evidence } from './types.ts'

/**
 * How an instrument's calibration speaks for what it measured: `in-date`, `confirmed` by a good calibration since
 * (also after a lapse: the instrument had stayed right), `lapsed`, `failed` before or after, or `none` on record.
 */
export type CalibrationState = 'in-date' | 'confirmed' | 'lapsed' | 'failed' | 'none'

export interface CalibrationStanding {
  readonly state: CalibrationState
  /** The last calibration before the measurement, and the first after it. */
  readonly before: Evidence | null
  readonly after: Evidence | null
  /** Last day that the calibration before was good for; null: none, or no rule asks for another. */
  readonly untilOn: PlainDate | null
}

interface Asked {
  /** Calibrations that are known and count, newest first. */
  readonly calibrations: readonly Evidence[]
  readonly performedAt: EpochMs
  readonly performedOn: PlainDate
  /** How long the rule of that day lets a calibration stand; null: for good. */
  readonly months: number | null
}

export function calibrationStanding({
  calibrations,
  performedAt,
  performedOn,
  months,
}: Asked): CalibrationStanding {
  const after = calibrations.findLast((one) => one.performedAt > performedAt) ?? null
  const before = calibrations.find((one) => one.performedAt <= performedAt) ?? null
  const untilOn = before && months ? addMonths(before.performedOn, months) : null
  const stateOf = (): CalibrationState => {
    if (after) return after.finding === 'fail' ? 'failed' : 'confirmed'
    if (!before) return 'none'
    if (before.finding === 'fail') return 'failed'
    return untilOn === null || untilOn >= performedOn ? 'in-date' : 'lapsed'
  }
  return { state: stateOf(), before, after, untilOn }
}
