import { add, divide, magnitude, magnitudeSquared, multiply, ONE, subtract, type Complex } from './complex.ts'
import { checkPositive } from './check-range.ts'
import { checkNumber, failure, type Outcome, type Warning } from './outcome.ts'
import type { ReciprocalTwoPort } from './terminations.ts'

/** An efficiency, and whether rounding or reading errors had to be cut off it. */
export interface Efficiency {
  /** 0..1 */
  readonly efficiency: number
  readonly warnings: readonly Warning[]
}

/** Most that reading errors may add to an efficiency of 1 (the sheet's choice). */
export const MAX_EFFICIENCY = 1.02

/**
 * Into the load resistance itself: `|P| / (1 - |S11|^2)`, unchecked. It does not contain the resistance, so
 * a load that is not quite what it says costs nothing here.
 */
export function rawEfficiencyIntoReference({ s11, p }: ReciprocalTwoPort): number {
  return magnitude(p) / (1 - magnitudeSquared(s11))
}

/**
 * Into another load of `z` ohm (real part above 0), from a two-port whose port 2 is referred to `loadOhm`:
 * `eta = |P| (1 - |GL|^2) / (|1 - S22 GL|^2 (1 - |Gin|^2))`, `Gin = S11 + P GL/(1 - S22 GL)`.
 * `E_RANGE` for loads out of range, `E_NOT_PHYSICAL` for an efficiency above 1.02, `W_CLAMPED` just above 1.
 * Source: Pozar, Microwave Engineering, 4th ed. 2012, sec. 12.1-12.3 (from memory, verify).
 */
export function efficiencyIntoLoad(
  twoPort: ReciprocalTwoPort,
  z: Complex,
  loadOhm: number,
): Outcome<Efficiency> {
  const bad =
    checkPositive('loadOhm', loadOhm, 1e9) ??
    checkPositive('resistanceOhm', z.re, 1e9) ??
    checkNumber('reactanceOhm', z.im, -1e9, 1e9)
  if (bad) return bad
  const { s11, s22, p } = twoPort
  const gl = divide({ re: z.re - loadOhm, im: z.im }, { re: z.re + loadOhm, im: z.im })
  const loop = subtract(ONE, multiply(s22, gl))
  if (!(magnitude(loop) > 0)) return notPhysical()
  const gin = add(s11, divide(multiply(p, gl), loop))
  const accepted = magnitudeSquared(loop) * (1 - magnitudeSquared(gin))
  return limitEfficiency((magnitude(p) * (1 - magnitudeSquared(gl))) / accepted)
}

/** An efficiency up to 1.02 as 0..1, with `W_CLAMPED` above 1; `E_NOT_PHYSICAL` for anything else. */
export function limitEfficiency(raw: number): Outcome<Efficiency> {
  if (!(raw >= 0 && raw <= MAX_EFFICIENCY)) return notPhysical()
  if (raw <= 1) return { efficiency: raw, warnings: [] }
  const message = `The readings give an efficiency of ${raw.toFixed(4)}: taken as 1.`
  return { efficiency: 1, warnings: [{ code: 'W_CLAMPED', message }] }
}

/** Best possible power gain, with a conjugate match at both ends. */
export interface MaximumGain {
  /** 0..1, null when reading errors hide it. */
  readonly gMax: number | null
  /** `-10 log Gmax` in dB, null likewise. */
  readonly intrinsicLossDb: number | null
}

/** A lossless two-port has K = 1 and |D| = 1; rounding may carry it this far over the edge. */
const ROUNDING = 1e-12

/**
 * `D = S11 S22 - P`, `K = (1 - |S11|^2 - |S22|^2 + |D|^2)/(2|P|)`, `Gmax = 1/(K + sqrt(K^2 - 1))`. A bound,
 * not the operating efficiency: 50 and 2450 ohm are usually far from the best terminations. Do not grade on
 * it.
 * Source: Pozar, Microwave Engineering, 4th ed. 2012, sec. 12.1-12.3 (from memory, verify).
 */
export function maximumGain({ s11, s22, p }: ReciprocalTwoPort): MaximumGain {
  const d = subtract(multiply(s11, s22), p)
  const size = magnitude(p)
  const k = (1 - magnitudeSquared(s11) - magnitudeSquared(s22) + magnitudeSquared(d)) / (2 * size)
  // |D| above 1 is an active two-port, for which the formula gives no bound.
  const isPassive = k >= 1 - ROUNDING && k < Infinity && magnitude(d) <= 1 + ROUNDING
  if (!isPassive) return { gMax: null, intrinsicLossDb: null }
  const limited = Math.max(1, k)
  const gMax = 1 / (limited + Math.sqrt(limited * limited - 1))
  return gMax > 0
    ? { gMax, intrinsicLossDb: -10 * Math.log10(gMax) + 0 }
    : { gMax: null, intrinsicLossDb: null }
}

function notPhysical(): Outcome<never> {
  const message = 'More power out than in: the open or short standard is not what it should be.'
  return failure('E_NOT_PHYSICAL', message)
}
