import { add, divide, magnitude, multiply, ONE, type Complex } from './complex.ts'
import { failure, type Outcome } from './outcome.ts'

/**
 * A reflection measured against `fromOhm`, as it reads against `toOhm`; both real and above 0. The same as
 * going through the impedance, in one step that also takes an open: with `g = (R - R')/(R + R')`, `Gamma' =
 * (Gamma + g)/(1 + g Gamma)`. `E_ACTIVE` for the reflection above 1 that has no counterpart.
 * Source: Pozar, Microwave Engineering, 4th ed. 2012, sec. 2.3 (from memory, verify).
 */
export function renormaliseGamma(gamma: Complex, fromOhm: number, toOhm: number): Outcome<Complex> {
  if (fromOhm === toOhm) return gamma
  const g: Complex = { re: (fromOhm - toOhm) / (fromOhm + toOhm), im: 0 }
  const below = add(ONE, multiply(g, gamma))
  if (magnitude(below) < 1e-9) return failure('E_ACTIVE', 'Reflection above 1: check the calibration.')
  return divide(add(gamma, g), below)
}
