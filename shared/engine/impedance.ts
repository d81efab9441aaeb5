import { add, divide, magnitude, ONE, scale, subtract, ZERO, type Complex } from './complex.ts'
import { checkNumber, failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'
import { checkPassive, clampWarnings, reflectionFromGamma, type Reflection } from './reflection.ts'

/** Impedance and admittance behind a reflection. An open has infinite impedance, a short admittance. */
export interface Impedance {
  /** ohm */
  readonly impedance: Complex
  /** siemens */
  readonly admittance: Complex
  readonly warnings: readonly Warning[]
}

/** Far above any impedance that can be measured; keeps every quotient a finite double. */
const MAX_OHM = 1e12
/** Above 0, and large enough that its inverse is a finite double. */
const MIN_Z0_OHM = 1e-12
const INFINITE: Complex = { re: Infinity, im: 0 }

/**
 * `Gamma = (Z - Z0)/(Z + Z0)`. Z in ohm, its real part 0 or more and each part up to 1e12; a real part of
 * Infinity is an open. Z0 real, above 0, default 50 ohm. `E_ACTIVE` for a negative real part.
 * Source: Pozar, Microwave Engineering, 4th ed. 2012, sec. 2.3 (from memory, verify).
 */
export function gammaFromImpedance(z: Complex, z0Ohm = 50): Outcome<Complex> {
  const badZ0 = checkZ0(z0Ohm)
  if (badZ0) return badZ0
  if (z.re === Infinity) return ONE
  const bad =
    checkNumber('resistanceOhm', z.re, -MAX_OHM, MAX_OHM) ??
    checkNumber('reactanceOhm', z.im, -MAX_OHM, MAX_OHM)
  if (bad) return bad
  if (z.re < 0) {
    const message = 'Resistance below 0, a reflection above 1: check the calibration.'
    return failure('E_ACTIVE', message, { field: 'resistanceOhm' })
  }
  return divide({ re: z.re - z0Ohm, im: z.im }, { re: z.re + z0Ohm, im: z.im })
}

/** Every way of writing the match of an impedance; ranges, errors and source as for `gammaFromImpedance`. */
export function reflectionFromImpedance(z: Complex, z0Ohm = 50): Outcome<Reflection> {
  const gamma = gammaFromImpedance(z, z0Ohm)
  return isFailure(gamma) ? gamma : reflectionFromGamma(gamma)
}

/**
 * `Z = Z0 (1 + Gamma)/(1 - Gamma)`, `Y = 1/Z`. |Gamma| up to 1.05 counts as 1 with `W_CLAMPED`, beyond that
 * `E_ACTIVE`; Gamma = 1 gives Z Infinity and Y 0. Source: as for `gammaFromImpedance`.
 */
export function impedanceFromGamma(gamma: Complex, z0Ohm = 50): Outcome<Impedance> {
  const bad = checkZ0(z0Ohm) ?? checkNumber('gamma', gamma.re) ?? checkNumber('gamma', gamma.im)
  if (bad) return bad
  const size = magnitude(gamma)
  const active = checkPassive(size)
  if (active) return active
  const passive = scale(gamma, 1 / Math.max(1, size))
  const above = add(ONE, passive)
  const below = subtract(ONE, passive)
  return {
    impedance: quotient(above, below, z0Ohm),
    admittance: quotient(below, above, 1 / z0Ohm),
    warnings: clampWarnings(size),
  }
}

/** `factor * a / b`, Infinity where b is 0 to the precision of a reflection. */
function quotient(a: Complex, b: Complex, factor: number): Complex {
  if (magnitude(b) < 1e-15) return INFINITE
  if (magnitude(a) < 1e-15) return ZERO
  return scale(divide(a, b), factor)
}

function checkZ0(z0Ohm: number): Failure | undefined {
  const bad = checkNumber('z0Ohm', z0Ohm)
  if (bad || (z0Ohm >= MIN_Z0_OHM && z0Ohm <= MAX_OHM)) return bad
  return failure('E_RANGE', `Z0 is ${z0Ohm}: it must be above 0 and up to 1e12 ohm.`, { field: 'z0Ohm' })
}
