import type { FrequencyBand } from './efficiency-by-band.ts'
import { failure, isFailure, type Outcome } from './outcome.ts'
import type { SweepPoint } from './sweep-point.ts'

/**
 * The usable test point of a band (edges included) nearest to `frequencyHz`, the lower one of two that are
 * equally near; `E_NO_TEST_FOR_BAND` when there is none. A point of another band says nothing about this one.
 */
export function nearestInBand<T>(
  points: readonly SweepPoint<T>[],
  band: FrequencyBand,
  frequencyHz: number,
): Outcome<{ frequencyHz: number; value: T }> {
  let best: { frequencyHz: number; value: T } | undefined
  for (const point of points) {
    if (point.frequencyHz < band.lowHz || point.frequencyHz > band.highHz || isFailure(point.result)) continue
    const distance = Math.abs(point.frequencyHz - frequencyHz)
    if (best && distance >= Math.abs(best.frequencyHz - frequencyHz)) continue
    best = { frequencyHz: point.frequencyHz, value: point.result }
  }
  return best ?? failure('E_NO_TEST_FOR_BAND', `No usable test point lies in ${band.name}.`)
}
