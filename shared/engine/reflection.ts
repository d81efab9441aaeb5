import { magnitude as sizeOf, type Complex } from './complex.ts'
import { checkNumber, failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'

/**
 * One match written in every way. Magnitude 1 gives SWR and mismatch loss Infinity; magnitude 0 gives a
 * return loss of Infinity. Mismatch loss is power not accepted, compared with a matched load: it is not heat.
 */
export interface Reflection {
  /** |Gamma|, 0..1. */
  readonly magnitude: number
  /** dB, 0 or more: positive for a passive load. */
  readonly returnLossDb: number
  /** 1 or more; charts cap it at 99, stored values are not capped. */
  readonly swr: number
  /** dB, 0 or more. */
  readonly mismatchLossDb: number
  readonly warnings: readonly Warning[]
}

/** Above this a reflection is no rounding of a total one. */
export const MAX_REFLECTION = 1.05

/**
 * From |Gamma|, 0..1. Up to 1.05 counts as exactly 1 with `W_CLAMPED`, beyond that `E_ACTIVE`.
 * Source: Pozar, Microwave Engineering, 4th ed. 2012, sec. 2.3 (from memory, verify); sign of the return
 * loss: Bird, IEEE Antennas and Propagation Magazine 51(2), 2009, 166-167 (from memory, verify).
 */
export function reflectionFromMagnitude(magnitude: number): Outcome<Reflection> {
  const bad = checkNumber('magnitude', magnitude, 0) ?? checkPassive(magnitude)
  if (bad) return bad
  const clamped = Math.min(magnitude, 1)
  return {
    magnitude: clamped,
    returnLossDb: returnLossOf(clamped),
    swr: swrOf(clamped),
    mismatchLossDb: mismatchLossOf(clamped),
    warnings: clampWarnings(magnitude),
  }
}

/** The root in |Gamma| rounds; a total reflection stays one, and its SWR Infinity. */
const ROUNDING = 1e-12

/** From a complex reflection; limits and source as for `reflectionFromMagnitude`. */
export function reflectionFromGamma(gamma: Complex): Outcome<Reflection> {
  const bad = checkNumber('gamma', gamma.re) ?? checkNumber('gamma', gamma.im)
  if (bad) return bad
  const size = sizeOf(gamma)
  return reflectionFromMagnitude(Math.abs(size - 1) < ROUNDING ? 1 : size)
}

/** From an SWR, 1 or more; Infinity is a total reflection. Source: Pozar sec. 2.3 (from memory, verify). */
export function reflectionFromSwr(swr: number): Outcome<Reflection> {
  const size = magnitudeFromSwr(swr)
  return isFailure(size) ? size : reflectionFromMagnitude(size)
}

/** From a return loss in dB, 0 or more; Infinity is a perfect match. Source: Pozar sec. 2.3 (from memory). */
export function reflectionFromReturnLoss(returnLossDb: number): Outcome<Reflection> {
  if (returnLossDb === Infinity) return reflectionFromMagnitude(0)
  const bad = checkNumber('returnLossDb', returnLossDb)
  if (bad) return bad
  if (returnLossDb < 0) {
    const message = 'Return loss is entered as a positive number of dB.'
    return failure('E_RANGE', message, { field: 'returnLossDb' })
  }
  return reflectionFromMagnitude(10 ** (-returnLossDb / 20))
}

/** |Gamma| for an SWR of 1 or more (Infinity gives 1), or `E_RANGE`. */
export function magnitudeFromSwr(swr: number, field = 'swr'): Outcome<number> {
  if (swr === Infinity) return 1
  const bad = checkNumber(field, swr)
  if (bad) return bad
  if (swr < 1) return failure('E_RANGE', 'SWR cannot be below 1.', { field })
  return (swr - 1) / (swr + 1)
}

/** SWR of a magnitude in 0..1, which the caller has checked; Infinity from 1 on. */
export function swrOf(magnitude: number): number {
  return magnitude >= 1 ? Infinity : (1 + magnitude) / (1 - magnitude)
}

/** Return loss in dB of a checked magnitude. Adding 0 turns -0 into 0. */
export function returnLossOf(magnitude: number): number {
  return -20 * Math.log10(magnitude) + 0
}

function mismatchLossOf(magnitude: number): number {
  return -10 * Math.log10(1 - magnitude * magnitude) + 0
}

/** `E_ACTIVE` for a reflection beyond what rounding and calibration explain. */
export function checkPassive(magnitude: number, field = 'gamma'): Failure | undefined {
  if (magnitude <= MAX_REFLECTION) return undefined
  return failure('E_ACTIVE', `Reflection above 1 (${magnitude.toPrecision(4)}): check the calibration.`, {
    field,
  })
}

export function clampWarnings(magnitude: number): Warning[] {
  if (magnitude <= 1) return []
  const message = `A reflection of ${magnitude.toPrecision(4)} was taken as 1: check the calibration.`
  return [{ code: 'W_CLAMPED', message }]
}
