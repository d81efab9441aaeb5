/**
 * How long the device may be keyed before it reaches a limit temperature.
 * Source: calculation sheet, section 6; lumped capacitance.
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkNumber, failure, isFailure, type Outcome } from './outcome.ts'

export interface KeyDownQuestion {
  /** -40 to 1000 deg C. */
  readonly limitC: number
  /** -40 to 85 deg C. */
  readonly ambientC: number
  /** End temperature above ambient at this power, K, 0 to 1e6. */
  readonly steadyRiseK: number
  /** Above 0, to 1e9 s. */
  readonly tauS: number
  /** Temperature at key-down, -40 to 1000 deg C; ambient unless given. */
  readonly startC?: number
}

/**
 * Seconds from key-down to the limit; 0 when already there, Infinity (unlimited) when the end temperature
 * does not exceed the limit. `E_RANGE`, `E_NUMBER`, `E_MISSING`.
 */
export function keyDownTime(question: KeyDownQuestion): Outcome<number> {
  const { limitC, ambientC, steadyRiseK, tauS, startC = ambientC } = question
  const bad =
    checkNumber('limitC', limitC, -40, 1000) ??
    checkNumber('ambientC', ambientC, -40, 85) ??
    checkNumber('startC', startC, -40, 1000) ??
    checkNumber('steadyRiseK', steadyRiseK, 0, 1e6) ??
    checkPositive('tauS', tauS, 1e9)
  if (bad) return bad
  const steadyC = ambientC + steadyRiseK
  if (startC >= limitC) return 0
  if (steadyC <= limitC) return Infinity
  return tauS * Math.log((steadyC - startC) / (steadyC - limitC))
}

export type SlopeKeyDown =
  | { readonly known: true; readonly seconds: number }
  /** The straight line is only safe beyond the logged time, where a real curve has bent down. */
  | { readonly known: false; readonly reason: 'shorter-than-log' }

/**
 * The same from the slope of a log that is too short for a curve. `heatRatio` = heat asked for over heat in
 * the test (0 to 1e6, above 0). Errs on the safe side beyond the logged time; not known inside it.
 * `E_RANGE`; `E_NO_RISE` for a slope of 0 or less.
 */
export function keyDownTimeBySlope(question: {
  limitC: number
  startC: number
  slopeKPerS: number
  loggedS: number
  heatRatio?: number
}): Outcome<SlopeKeyDown> {
  const { limitC, startC, slopeKPerS, loggedS, heatRatio = 1 } = question
  const bad =
    checkNumber('limitC', limitC, -40, 1000) ??
    checkNumber('startC', startC, -40, 1000) ??
    checkNumber('slopeKPerS', slopeKPerS, -1e6, 1e6) ??
    checkNumber('loggedS', loggedS, 0, 604_800) ??
    checkPositive('heatRatio', heatRatio, 1e6)
  if (bad) return bad
  if (startC >= limitC) return { known: true, seconds: 0 }
  if (slopeKPerS <= 0)
    return failure('E_NO_RISE', 'A slope of 0 or less reaches no limit.', { field: 'slopeKPerS' })
  const seconds = finiteResult((limitC - startC) / (slopeKPerS * heatRatio))
  if (isFailure(seconds)) return seconds
  return seconds < loggedS ? { known: false, reason: 'shorter-than-log' } : { known: true, seconds }
}
