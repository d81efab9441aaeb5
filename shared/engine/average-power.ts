/**
 * Average power over an exposure window: PEP x emission duty x worst share of time transmitting.
 * Source: FCC OET Bulletin 65 Supplement B, Edition 97-01, worked example 500 W x 0.4 x 45/360.
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkNumber, failure, type Outcome } from './outcome.ts'

/**
 * The largest share of any window that a cycle of `on` then `off` transmits, 0 to 1; all in the same unit,
 * up to 1e6. `E_RANGE`, also when both are 0.
 */
export function worstOnFraction(cycle: { on: number; off: number; window: number }): Outcome<number> {
  const { on, off, window } = cycle
  const bad =
    checkNumber('on', on, 0, 1e6) ?? checkNumber('off', off, 0, 1e6) ?? checkPositive('window', window, 1e6)
  if (bad) return bad
  const period = on + off
  if (period === 0) return failure('E_RANGE', 'on and off are both 0: enter one of them.', { field: 'on' })
  // A cycle far shorter than the window: the remainder no longer counts, and the count loses its digits.
  if (window / period > 1e12) return on / period
  const whole = Math.floor(window / period)
  const rest = Math.max(0, window - whole * period)
  return Math.min(1, (whole * on + Math.min(rest, on)) / window)
}

/** PEP at the antenna 0 to 100,000 W, emission duty and share of time 0 to 1; W. `E_RANGE`. */
export function averagePowerW(use: {
  pepW: number
  emissionDuty: number
  onFraction: number
}): Outcome<number> {
  const bad =
    checkNumber('pepW', use.pepW, 0, 100_000) ??
    checkNumber('emissionDuty', use.emissionDuty, 0, 1) ??
    checkNumber('onFraction', use.onFraction, 0, 1)
  return bad ?? finiteResult(use.pepW * use.emissionDuty * use.onFraction)
}
