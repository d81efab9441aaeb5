import { median } from './median.ts'
import { checkNumber, failure, type Outcome } from './outcome.ts'

/** How far one unit stands from its siblings. */
export interface RobustZ {
  readonly median: number
  /** Robust standard deviation: 1.4826 times the median absolute deviation, never below the resolution. */
  readonly spread: number
  /** One score a value, in the order given. */
  readonly scores: readonly number[]
  /** Places of the values whose score is beyond the limit. */
  readonly departing: readonly number[]
}

/** Fewer siblings have no spread worth the name. Our choice. */
export const MIN_UNITS = 5
/** A score beyond 3.5 departs: Iglewicz and Hoaglin, 1993 (from memory, verify). */
export const MAX_SCORE = 3.5
/** Makes the median absolute deviation of a normal sample its standard deviation; textbook. */
const MAD_TO_SIGMA = 1.4826
/** The same for the mean absolute deviation. */
const MEAN_AD_TO_SIGMA = 1.2533

/**
 * Robust z-scores `(x - median)/spread` of the like units of a build, so that one bad unit cannot hide
 * itself by widening the spread. `resolution` (0 or more, in the values' unit) is the smallest spread that
 * the instrument can tell from none. `E_TOO_FEW` below five values, `E_NUMBER` or `E_RANGE` for a value
 * beyond 1e12.
 * Source: Iglewicz and Hoaglin, How to Detect and Handle Outliers, 1993 (from memory, verify).
 */
export function robustZ(values: readonly number[], resolution = 0): Outcome<RobustZ> {
  if (values.length < MIN_UNITS) {
    const message = `${values.length} units are too few to tell one from its siblings: it takes ${MIN_UNITS}.`
    return failure('E_TOO_FEW', message)
  }
  for (const [at, value] of values.entries()) {
    const bad = checkNumber(`values.${at}`, value, -1e12, 1e12)
    if (bad) return bad
  }
  const badResolution = checkNumber('resolution', resolution, 0, 1e12)
  if (badResolution) return badResolution
  const middle = median(values)
  const deviations = values.map((value) => Math.abs(value - middle))
  const spread = Math.max(robustSpread(deviations), resolution)
  const scores = values.map((value) => (value === middle ? 0 : (value - middle) / spread))
  const departing = scores.flatMap((score, at) => (Math.abs(score) > MAX_SCORE ? [at] : []))
  return { median: middle, spread, scores, departing }
}

/**
 * When over half the units are alike to the last digit the median deviation is 0: then the mean one serves.
 */
function robustSpread(deviations: readonly number[]): number {
  const medianDeviation = median(deviations)
  if (medianDeviation > 0) return MAD_TO_SIGMA * medianDeviation
  return (MEAN_AD_TO_SIGMA * deviations.reduce((sum, deviation) => sum + deviation, 0)) / deviations.length
}
