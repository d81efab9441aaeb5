/**
 * The units of a batch in order against the median and the robust limits of their siblings and against the policy's
 * limit. Every measure is the better the lower, so there is one policy limit, above. Robust limits stand where a score
 * departs (3.5 robust deviations from the median) and need five units: a smaller batch is held against all units made
 * by its build sheet. The early warning comes two robust deviations below the policy limit, the place of the warning
 * line of a common control chart.
 */
import { median } from '../median.ts'
import { isFailure } from '../outcome.ts'
import { MAX_SCORE, MIN_UNITS, robustZ } from '../robust-z.ts'
import { RESOLUTIONS, type BuildMeasure } from './matching.ts'

/** Common practice for the inner lines of a control chart, no source. */
const WARNING_SCORE = 2

export interface ChartUnit {
  readonly unitId: string
  readonly value: number
}

export type PointState = 'in-line' | 'near-limit' | 'departs' | 'over-limit'

export interface ChartPoint extends ChartUnit {
  /** Null where there are too few siblings. */
  readonly score: number | null
  readonly state: PointState
}

export interface ChartLines {
  readonly median: number
  /** Never below 0: none of the measures is. */
  readonly lower: number
  readonly upper: number
  readonly units: number
  readonly from: 'batch' | 'build-sheet'
}

export interface ControlChart {
  readonly points: readonly ChartPoint[]
  /** Of the batch itself; null without a unit. */
  readonly batchMedian: number | null
  readonly lines: ChartLines | null
  readonly limit: number | null
  /** From here on to the limit a unit is near it; null without a limit or without lines. */
  readonly warnFrom: number | null
  /** No unit is over the limit, but the batch reaches for it; or the batch as a whole stands apart. */
  readonly sentences: readonly string[]
}

export interface ChartInput {
  readonly measure: BuildMeasure
  /** In the order of the chart. */
  readonly units: readonly ChartUnit[]
  /** Values of the other units by the same build sheet. */
  readonly others: readonly number[]
  readonly limit: number | null
}

export function controlChart({ measure, units, others, limit }: ChartInput): ControlChart {
  const own = units.map(({ value }) => value)
  const batchMedian = own.length > 0 ? median(own) : null
  const reference = referenceOf(own, others, RESOLUTIONS[measure])
  const lines = reference && linesOf(reference)
  const warnFrom = limit !== null && reference ? Math.max(0, limit - WARNING_SCORE * reference.spread) : null
  const points = units.map((unit): ChartPoint => {
    const score = reference ? (unit.value - reference.median) / reference.spread : null
    return { ...unit, score, state: stateOf(unit.value, { score, limit, warnFrom }) }
  })
  const apart = batchMedian === null ? null : batchApart(batchMedian, others, RESOLUTIONS[measure])
  return {
    points,
    batchMedian,
    lines,
    limit,
    warnFrom,
    sentences: [...earlySentence(points, { lines, limit }), ...(apart ? [apart] : [])],
  }
}

interface Reference {
  readonly median: number
  readonly spread: number
  readonly units: number
  readonly from: ChartLines['from']
}

function referenceOf(
  own: readonly number[],
  others: readonly number[],
  resolution: number,
): Reference | null {
  const [values, from] =
    own.length >= MIN_UNITS ? [own, 'batch' as const] : [[...own, ...others], 'build-sheet' as const]
  const scored = robustZ(values, resolution)
  return isFailure(scored)
    ? null
    : { median: scored.median, spread: scored.spread, units: values.length, from }
}

function linesOf({ median: middle, spread, units, from }: Reference): ChartLines {
  const reach = MAX_SCORE * spread
  return { median: middle, lower: Math.max(0, middle - reach), upper: middle + reach, units, from }
}

function stateOf(
  value: number,
  against: { score: number | null; limit: number | null; warnFrom: number | null },
): PointState {
  const { score, limit, warnFrom } = against
  if (limit !== null && value > limit) return 'over-limit'
  if (score !== null && Math.abs(score) > MAX_SCORE) return 'departs'
  return warnFrom !== null && value > warnFrom ? 'near-limit' : 'in-line'
}

/** Before the first unit fails: one stands near the limit, or the usual spread reaches it. */
function earlySentence(
  points: readonly ChartPoint[],
  { lines, limit }: { lines: ChartLines | null; limit: number | null },
): string[] {
  if (limit === null || !lines || points.length === 0) return []
  if (points.some(({ state }) => state === 'over-limit')) return []
  const near = points.filter(({ state }) => state === 'near-limit').length
  if (near > 0) {
    const who = near === 1 ? 'One unit stands' : `${near} units stand`
    return [`${who} within ${WARNING_SCORE} usual spreads of the limit: the next test may fail.`]
  }
  if (lines.upper <= limit) return []
  return ['No unit is over the limit, but the usual spread reaches it: the next one made like these may be.']
}

/** What the limits inside a batch cannot show: that all its units are off together. */
function batchApart(batchMedian: number, others: readonly number[], resolution: number): string | null {
  const scored = robustZ(others, resolution)
  if (isFailure(scored)) return null
  const score = (batchMedian - scored.median) / scored.spread
  if (Math.abs(score) <= MAX_SCORE) return null
  const away = `${Math.abs(score).toFixed(1)} times the usual spread ${score > 0 ? 'worse' : 'better'}`
  return `The batch as a whole stands apart: its median is ${away} than that of the ${others.length} other units by this build sheet.`
}
