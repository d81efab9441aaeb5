/**
 * What the profile interval of tau means for other figures of the same fit: every curve that fits within
 * the F limit is a possible truth. Source: Bates and Watts 1988, ch. 6 (from memory, verify).
 */
import type { RiseFit } from './rise-fit.ts'
import { leverageAt, riseModel, type RiseCurve, type RiseData } from './rise-model.ts'

const STEPS = 64

/** The best curves of tau values across the finite interval of a fit, the best of all among them. */
export function profileCurves(data: RiseData, fit: RiseFit): RiseCurve[] {
  const { curveAt } = riseModel(data)
  const low = Math.log(Math.max(fit.tauLowS, fit.tauS / 1000))
  const high = Math.log(Math.min(fit.tauHighS, fit.tauS * 1000))
  const across = Array.from({ length: STEPS + 1 }, (_, i) =>
    curveAt(Math.exp(low + ((high - low) * i) / STEPS)),
  )
  return [...across, fit]
}

/** 95 % profile interval of the end temperature T0 + A, deg C. */
export function endRange(curves: readonly RiseCurve[], fit: RiseFit): { lowC: number; highC: number } {
  return rangeAt(curves, fit, Infinity)
}

/** 95 % profile interval of the temperature at a time since key-down, s, deg C; Infinity is the end temperature. */
export function rangeAt(
  curves: readonly RiseCurve[],
  fit: RiseFit,
  atS: number,
): { lowC: number; highC: number } {
  let [lowC, highC] = [Infinity, -Infinity]
  for (const curve of curves) {
    const shape = -Math.expm1(-atS / curve.tauS)
    const [middle, reach] = [curve.startC + curve.riseK * shape, reachAt(curve, fit, shape)]
    lowC = Math.min(lowC, middle - reach)
    highC = Math.max(highC, middle + reach)
  }
  return { lowC, highC }
}

/**
 * 95 % profile interval of the time from key-down at which the temperature meets a limit, s, sought from
 * `fromS` on; Infinity where a curve within the F limit never meets it.
 */
export function crossingRange(
  curves: readonly RiseCurve[],
  fit: RiseFit,
  at: { limitC: number; fromS: number },
): { soonestS: number; latestS: number } {
  let [soonestS, latestS] = [Infinity, at.fromS]
  for (const curve of curves) {
    soonestS = Math.min(
      soonestS,
      crossingOf(curve, at, (shape) => reachAt(curve, fit, shape)),
    )
    latestS = Math.max(
      latestS,
      crossingOf(curve, at, (shape) => -reachAt(curve, fit, shape)),
    )
  }
  return { soonestS, latestS }
}

/** When one curve, raised by `raise` (K, by the part of its way gone), meets the limit: by halving. */
export function crossingOf(
  curve: RiseCurve,
  { limitC, fromS }: { limitC: number; fromS: number },
  raise: (shape: number) => number = () => 0,
): number {
  const meets = (shape: number) => curve.startC + curve.riseK * shape + raise(shape) >= limitC
  const from = -Math.expm1(-fromS / curve.tauS)
  if (meets(from)) return fromS
  if (!meets(1)) return Infinity
  let [below, above] = [from, 1]
  for (let step = 0; step < 50; step++) {
    const middle = (below + above) / 2
    if (meets(middle)) above = middle
    else below = middle
  }
  return Math.max(fromS, -curve.tauS * Math.log1p(-below))
}

/** How far the temperature of a curve may lie from its best before the fit leaves the F limit, K. */
function reachAt(curve: RiseCurve, fit: RiseFit, shape: number): number {
  const slack = fit.sse + fit.criticalF * fit.variance - curve.sse
  return Math.sqrt(Math.max(0, slack) * leverageAt(curve, shape))
}
