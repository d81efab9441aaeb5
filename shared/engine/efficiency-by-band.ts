import { median } from './median.ts'
import { failure, isFailure, type Failure, type Outcome } from './outcome.ts'
import type { SweepPoint } from './sweep-point.ts'

export interface FrequencyBand {
  readonly name: string
  readonly lowHz: number
  readonly highHz: number
}

/** The figures that a pair and an open/short/load sweep have in common. */
export interface EfficiencyFigures {
  readonly efficiency: number
  readonly uEfficiency: number
  readonly lossDb: number
  readonly uLossDb: number
}

export interface BandEfficiency {
  readonly band: string
  /** The worst point of the band: the one to judge. */
  readonly worst: EfficiencyFigures & { readonly frequencyHz: number }
  readonly medianEfficiency: number
  readonly points: number
  /** Points of the band that could not be used, and why the first of them. */
  readonly refusedPoints: number
  readonly firstRefusal?: Failure
}

/**
 * Efficiency in one band, both edges included. `E_NO_TEST_FOR_BAND` when no point of the sweep lies in it;
 * when every point that does was refused, the refusal of the first. The worst point counts: our choice.
 */
export function efficiencyInBand(
  points: readonly SweepPoint<EfficiencyFigures>[],
  band: FrequencyBand,
): Outcome<BandEfficiency> {
  const good: (EfficiencyFigures & { frequencyHz: number })[] = []
  const refusals: Failure[] = []
  for (const { frequencyHz, result } of points) {
    if (frequencyHz < band.lowHz || frequencyHz > band.highHz) continue
    if (isFailure(result)) refusals.push(result)
    else {
      const { efficiency, uEfficiency, lossDb, uLossDb } = result
      good.push({ frequencyHz, efficiency, uEfficiency, lossDb, uLossDb })
    }
  }
  const [first] = good
  if (!first) return refusals[0] ?? failure('E_NO_TEST_FOR_BAND', `No test point lies in ${band.name}.`)
  return {
    band: band.name,
    worst: good.reduce((worst, point) => (point.efficiency < worst.efficiency ? point : worst), first),
    medianEfficiency: median(good.map((point) => point.efficiency)),
    points: good.length,
    refusedPoints: refusals.length,
    firstRefusal: refusals[0],
  }
}
