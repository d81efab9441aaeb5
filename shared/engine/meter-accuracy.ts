import { checkPositive } from './check-range.ts'
import { checkNumber, type Failure, type Outcome } from './outcome.ts'

/** What a wattmeter's data sheet promises: a limit in percent of the reading or of the full scale. */
export type MeterAccuracy =
  | { readonly kind: 'of-reading'; readonly percent: number }
  | { readonly kind: 'of-full-scale'; readonly percent: number; readonly fullScaleW: number }

const MAX_W = 1e6

/**
 * The limit `a` at one reading, as a fraction of the reading. Percent 0..100, watts above 0 and up to 1e6;
 * `E_RANGE` otherwise. A percentage of full scale grows as the reading falls:
 * `percent/100 * fullscale/reading`.
 */
export function meterLimit(accuracy: MeterAccuracy, readingW: number): Outcome<number> {
  const bad = checkNumber('percent', accuracy.percent, 0, 100) ?? checkPositive('readingW', readingW, MAX_W)
  if (bad) return bad
  const share = accuracy.percent / 100
  if (accuracy.kind === 'of-reading') return share
  return checkPositive('fullScaleW', accuracy.fullScaleW, MAX_W) ?? (share * accuracy.fullScaleW) / readingW
}

/**
 * Standard uncertainty behind a data-sheet limit of +-a: rectangular, `a/sqrt(3)`.
 * Source: JCGM 100:2008 (GUM), 4.3.7 (from memory, verify the clause number).
 */
export function standardFromLimit(limit: number): number {
  return limit / Math.sqrt(3)
}

/** `E_NUMBER` or `E_RANGE` unless a relative standard uncertainty of 0..0.5. */
export function checkRelative(field: string, relative: number): Failure | undefined {
  return checkNumber(field, relative, 0, 0.5)
}
