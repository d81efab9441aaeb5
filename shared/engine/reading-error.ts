import { checkNumber, type Failure } from './outcome.ts'

/**
 * Standard error of the real and of the imaginary part of a reflection or transmission as an analyzer reads
 * it. Our choice for a small analyzer with a user calibration; the instrument's own data replaces it.
 */
export const DEFAULT_READING_ERROR = 0.01

/** `E_NUMBER` or `E_RANGE` unless 0..0.5. */
export function checkReadingError(readingError: number): Failure | undefined {
  return checkNumber('readingError', readingError, 0, 0.5)
}
