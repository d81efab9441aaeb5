/**
 * What a thermal model allows per emission: the radio's full power without a break, or less. Information
 * beside the judged limit, never in its place. Source: calculation sheet, section 6.
 */
import { checkPositive } from './check-range.ts'
import { EMISSION_DUTIES, type EmissionId } from './emission-duty.ts'
import { keyDownTime } from './key-down-time.ts'
import { checkNumber, failure, isFailure, type Outcome } from './outcome.ts'
import { MAX_POWER_W, maximumPower } from './thermal.ts'

export interface PowerAllowance {
  readonly emission: EmissionId
  /** PEP or carrier at the device's input that may be used transmitting without a break, W. */
  readonly withoutBreakW: number
  /** True when that is all the radio has. */
  readonly fullPower: boolean
  /** One over at the radio's full power from ambient, s; null when it never meets the limit. */
  readonly longestOverS: number | null
}

/**
 * Per emission, for continuous use at an ambient temperature. `radioW` at the device's input, above 0 to
 * 100,000 W. `E_RANGE` as for `maximumPower` and `keyDownTime`; an efficiency of 1 is refused.
 */
export function powerAllowance(use: {
  emission: EmissionId
  radioW: number
  resistanceKPerW: number
  tauS: number
  efficiency: number
  ambientC: number
  limitC: number
}): Outcome<PowerAllowance> {
  const { emission, radioW, resistanceKPerW, tauS, efficiency, ambientC, limitC } = use
  const bad = checkPositive('radioW', radioW, MAX_POWER_W) ?? checkNumber('efficiency', efficiency, 0, 1)
  if (bad) return bad
  if (!Object.hasOwn(EMISSION_DUTIES, emission))
    return failure('E_RANGE', 'emission is not one of the table.', { field: 'emission' })
  const { duty } = EMISSION_DUTIES[emission]
  const mostW = maximumPower({ ambientC, resistanceKPerW, efficiency, limitC, duty })
  if (isFailure(mostW)) return mostW
  const steadyRiseK = resistanceKPerW * radioW * (1 - efficiency) * duty
  const overS = keyDownTime({ limitC, ambientC, steadyRiseK, tauS })
  if (isFailure(overS)) return overS
  return {
    emission,
    withoutBreakW: Math.min(mostW, radioW),
    fullPower: mostW >= radioW,
    longestOverS: Number.isFinite(overS) ? overS : null,
  }
}
