/**
 * Least-squares fit of the warming curve with standard errors and profile intervals. In one dimension:
 * a grid over ln tau, then golden section; a general optimiser would need starting values and can stop in
 * the wrong valley. Raw figures for `heat-fit.ts`, which decides whether they may be shown.
 * Source: profile intervals, Bates and Watts 1988, ch. 6 (from memory, verify); calculation sheet, section 6.
 */
import { isFailure } from './outcome.ts'
import { riseModel, type RiseCurve, type RiseData, type RiseModel } from './rise-model.ts'
import { riseStandardErrors, type RiseStandardErrors } from './rise-standard-errors.ts'
import { fQuantile95 } from './t-quantile.ts'

export interface RiseFit extends RiseCurve, RiseStandardErrors {
  readonly unknowns: 2 | 3
  readonly degrees: number
  /** Variance of one reading: of the residuals, at least that of the thermometer's step. K2. */
  readonly variance: number
  /** Root of SSE over degrees of freedom, K. */
  readonly rmseK: number
  /** How much worse a straight line fits, and the value it must exceed. */
  readonly lineF: number
  readonly criticalF: number
  /** 95 % profile interval of tau, s; the upper end is Infinity when a straight line fits as well. */
  readonly tauLowS: number
  readonly tauHighS: number
}

const GRID_POINTS = 400
const GOLDEN = (Math.sqrt(5) - 1) / 2
/** A noise-free log still has an interval: no thermometer is better than a millionth of a kelvin. */
const LEAST_VARIANCE = 1e-12

/** The fit, or undefined with fewer readings than unknowns plus one. Readings in time order, step in K. */
export function fitRise(data: RiseData, thermometerStepK: number): RiseFit | undefined {
  const model = riseModel(data)
  const { unknowns } = model
  const degrees = data.timesS.length - unknowns
  const criticalF = fQuantile95(degrees)
  if (isFailure(criticalF)) return undefined
  const grid = tauGrid(data, model)
  const best = bestCurve(model, grid)
  const variance = Math.max(best.sse / degrees, thermometerStepK ** 2 / 12, LEAST_VARIANCE)
  const threshold = best.sse + criticalF * variance
  const lineSse = model.line.sse
  return {
    ...best,
    ...riseStandardErrors(data, best, variance),
    unknowns,
    degrees,
    variance,
    rmseK: Math.sqrt(best.sse / degrees),
    lineF: Math.max(0, lineSse - best.sse) / variance,
    criticalF,
    tauLowS: lowEnd(model, grid, best.tauS, threshold),
    tauHighS: lineSse <= threshold ? Infinity : highEnd(model, grid, best.tauS, threshold),
  }
}

interface GridPoint {
  readonly tauS: number
  readonly sse: number
}

/** From a two-hundredth to a thousand times the span of the log, evenly in ln tau. */
function tauGrid(data: RiseData, { curveAt }: RiseModel): GridPoint[] {
  const span = (data.timesS.at(-1) ?? 0) - (data.timesS[0] ?? 0)
  const low = Math.log(span / 200)
  const step = (Math.log(1000 * span) - low) / (GRID_POINTS - 1)
  return Array.from({ length: GRID_POINTS }, (_, i) => curveAt(Math.exp(low + i * step)))
}

function bestCurve(model: RiseModel, grid: readonly GridPoint[]): RiseCurve {
  let at = 0
  grid.forEach((point, i) => {
    if (point.sse < (grid[at]?.sse ?? Infinity)) at = i
  })
  const tauAt = (i: number) => grid[Math.min(Math.max(i, 0), GRID_POINTS - 1)]?.tauS ?? 0
  return goldenSection(model, Math.log(tauAt(at - 1)), Math.log(tauAt(at + 1)))
}

function goldenSection({ curveAt }: RiseModel, from: number, to: number): RiseCurve {
  const at = (lnTau: number) => curveAt(Math.exp(lnTau))
  let [low, high] = [from, to]
  let left = at(high - GOLDEN * (high - low))
  let right = at(low + GOLDEN * (high - low))
  while (high - low > 1e-10) {
    if (left.sse <= right.sse) {
      high = Math.log(right.tauS)
      right = left
      left = at(high - GOLDEN * (high - low))
    } else {
      low = Math.log(left.tauS)
      left = right
      right = at(low + GOLDEN * (high - low))
    }
  }
  return left.sse <= right.sse ? left : right
}

/** The smallest tau inside the interval; 0 when even a sudden step fits as well. */
function lowEnd(model: RiseModel, grid: readonly GridPoint[], bestS: number, threshold: number): number {
  const first = grid.findIndex((point) => point.sse <= threshold)
  if (first === 0) return 0
  const within = Math.min(grid[first]?.tauS ?? bestS, bestS)
  const without = grid.findLast((point) => point.tauS < within)?.tauS ?? within / 10
  return crossing(model, threshold, { within, without })
}

/** The largest tau inside the interval, found outward from the grid where it reaches beyond. */
function highEnd(model: RiseModel, grid: readonly GridPoint[], bestS: number, threshold: number): number {
  const last = grid.findLast((point) => point.sse <= threshold)
  const within = Math.max(last?.tauS ?? bestS, bestS)
  let without = grid.find((point) => point.tauS > within)?.tauS ?? within * 10
  for (let tries = 0; model.curveAt(without).sse <= threshold; tries++) {
    if (tries === 6) return Infinity
    without *= 10
  }
  return crossing(model, threshold, { within, without })
}

/** Halving in ln tau between a tau inside the interval and one outside; answers the inner side. */
function crossing(
  { curveAt }: RiseModel,
  threshold: number,
  ends: { within: number; without: number },
): number {
  let { within, without } = ends
  while (Math.abs(Math.log(without / within)) > 1e-9) {
    const middle = Math.sqrt(within * without)
    if (curveAt(middle).sse <= threshold) within = middle
    else without = middle
  }
  return within
}
