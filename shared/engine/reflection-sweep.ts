/** A one-port sweep as reflections: what drift against a baseline is computed from. */
import { magnitude, type Complex } from './complex.ts'
import { failure, isFailure, type Outcome } from './outcome.ts'
import { magnitudeFromSwr, reflectionFromGamma } from './reflection.ts'
import { checkSweep, firstAtOrAbove, type SwrSample } from './swr-sweep.ts'

export interface ReflectionPoint {
  readonly frequencyHz: number
  readonly gamma: Complex
}

export interface ReflectionSweep {
  /** Real reference resistance of every gamma, ohm. */
  readonly referenceOhm: number
  readonly points: readonly ReflectionPoint[]
}

/**
 * SWR at every point. `E_ACTIVE` with the row where a reflection exceeds 1.05: the calibration is wrong, so
 * the sweep is not to be summarised. Otherwise errors of `checkSweep`.
 */
export function swrOfSweep(sweep: ReflectionSweep): Outcome<SwrSample[]> {
  if (!Array.isArray(sweep?.points))
    return failure('E_MISSING', 'The sweep has no points.', { field: 'points' })
  const samples: SwrSample[] = []
  for (const [row, point] of sweep.points.entries()) {
    if (typeof point?.gamma !== 'object' || point.gamma === null)
      return failure('E_MISSING', 'A point has no reflection.', { field: 'gamma', line: row + 1 })
    const reflection = reflectionFromGamma(point.gamma)
    if (isFailure(reflection)) return { ...reflection, line: row + 1 }
    samples.push({ frequencyHz: point.frequencyHz, swr: reflection.swr })
  }
  return checkSweep(samples) ?? samples
}

/** Hand-entered SWR as reflections without phase: between samples |Gamma| then runs straight. */
export function sweepOfSwr(samples: readonly SwrSample[]): Outcome<ReflectionSweep> {
  const bad = checkSweep(samples)
  if (bad) return bad
  const points = samples.map(({ frequencyHz, swr }) => {
    const size = magnitudeFromSwr(swr)
    return { frequencyHz, gamma: { re: isFailure(size) ? 1 : size, im: 0 } }
  })
  return { referenceOhm: 50, points }
}

/**
 * The points on a grid of frequencies, by linear interpolation of gamma (real and imaginary); frequencies
 * beyond the sweep are left out. Both must be in order.
 */
export function resample(points: readonly ReflectionPoint[], gridHz: readonly number[]): ReflectionPoint[] {
  const [first, last] = [points[0]?.frequencyHz ?? Infinity, points.at(-1)?.frequencyHz ?? -Infinity]
  return gridHz
    .filter((frequencyHz) => frequencyHz >= first && frequencyHz <= last)
    .map((frequencyHz) => ({ frequencyHz, gamma: gammaAt(points, frequencyHz) }))
}

export function sizeOfGamma(point: ReflectionPoint): number {
  return Math.min(1, magnitude(point.gamma))
}

function gammaAt(points: readonly ReflectionPoint[], frequencyHz: number): Complex {
  const upper = firstAtOrAbove(points, frequencyHz)
  const b = points[upper] as ReflectionPoint
  const a = points[upper - 1]
  if (!a || b.frequencyHz === frequencyHz) return b.gamma
  const part = (frequencyHz - a.frequencyHz) / (b.frequencyHz - a.frequencyHz)
  return {
    re: a.gamma.re + part * (b.gamma.re - a.gamma.re),
    im: a.gamma.im + part * (b.gamma.im - a.gamma.im),
  }
}
