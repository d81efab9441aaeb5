/** Range checks that go beyond `checkNumber`: open at zero, whole numbers, several inputs at once. */
import { checkNumber, failure, type Failure, type Outcome } from './outcome.ts'

/** `E_MISSING`, `E_NUMBER`, or `E_RANGE` unless 0 < value <= max. */
export function checkPositive(field: string, value: unknown, max: number): Failure | undefined {
  const bad = checkNumber(field, value, 0, max)
  if (bad || value !== 0) return bad
  return failure('E_RANGE', `${field} is 0: it must be above 0 and at most ${max}.`, { field })
}

/** `E_MISSING`, `E_NUMBER`, or `E_RANGE` unless a whole number from min to max. */
export function checkWhole(field: string, value: unknown, min: number, max: number): Failure | undefined {
  const bad = checkNumber(field, value, min, max)
  if (bad || Number.isInteger(value)) return bad
  return failure('E_RANGE', `${field} must be a whole number from ${min} to ${max}.`, { field })
}

/** The computed number, or `E_RANGE` when extreme inputs overflow: no function answers Infinity by accident. */
export function finiteResult(value: number): Outcome<number> {
  if (Number.isFinite(value)) return value
  return failure('E_RANGE', 'These inputs give no finite result: check their size.')
}
