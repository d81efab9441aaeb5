/**
 * From an instrument's data sheet to the uncertainty of one reading. A data-sheet limit of +-a counts as rectangular,
 * a/sqrt(3), and the parts add as squares; expanded uncertainty is k = 2. Source: calculation sheet, section 3;
 * JCGM 100:2008 (GUM), 4.3.7 and 5.1.
 */
import { DEFAULT_READING_ERROR } from '../reading-error.ts'

export interface Accuracy {
  readonly accuracyPercentOfReading?: number
  readonly accuracyPercentOfFullScale?: number
  /** In the unit of the reading. */
  readonly accuracyAbsolute?: number
  readonly fullScale?: number
  /** The smallest step the instrument shows, in the unit of the reading. */
  readonly resolution?: number
  /** Analyzers: standard error of the real and of the imaginary part of a reflection or transmission. */
  readonly reflectionError?: number
}

export const COVERAGE_FACTOR = 2

/** What a sweep is uncertain by: the analyzer's own figure, else that of a small one with a user calibration. */
export function reflectionErrorOf(analyzer: Accuracy | null): number {
  return analyzer?.reflectionError ?? DEFAULT_READING_ERROR
}

/** Standard uncertainty of a reading in its unit; null where the data sheet's figure is not known. */
export function standardUncertainty(accuracy: Accuracy | null, reading: number): number | null {
  if (!accuracy) return null
  const { accuracyPercentOfReading, accuracyPercentOfFullScale, accuracyAbsolute, fullScale } = accuracy
  const limits = [
    accuracyPercentOfReading === undefined ? undefined : (accuracyPercentOfReading / 100) * Math.abs(reading),
    accuracyPercentOfFullScale === undefined || fullScale === undefined
      ? undefined
      : (accuracyPercentOfFullScale / 100) * fullScale,
    accuracyAbsolute,
  ].filter((limit) => limit !== undefined)
  if (limits.length === 0) return null
  // Half a step either way, which is a limit too.
  const half = (accuracy.resolution ?? 0) / 2
  return Math.sqrt([...limits, half].reduce((sum, limit) => sum + (limit * limit) / 3, 0))
}

/** Expanded uncertainty (k = 2) of a reading in its unit, or null. */
export function expandedUncertainty(accuracy: Accuracy | null, reading: number): number | null {
  const standard = standardUncertainty(accuracy, reading)
  return standard === null ? null : COVERAGE_FACTOR * standard
}

/** Standard uncertainty as a fraction of the reading, or null. */
export function relativeUncertainty(accuracy: Accuracy | null, reading: number): number | null {
  const standard = standardUncertainty(accuracy, reading)
  return standard === null || reading === 0 ? null : standard / Math.abs(reading)
}
