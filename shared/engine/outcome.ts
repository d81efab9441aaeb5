/**
 * The engine's two answers: a value, or a failure that says what is wrong, where, and what to do.
 * Nothing in `shared/engine` throws for bad input and nothing returns NaN.
 */

/** An expected "no". `field` names the input, `line` the 1-based physical line of a file or the row of a table. */
export interface Failure {
  readonly code: string
  readonly message: string
  readonly field?: string
  readonly line?: number
}

/** Something a person should know about a value that nevertheless stands. */
export interface Warning {
  readonly code: string
  readonly message: string
}

export type Outcome<T> = T | Failure

/** True for a failure; narrows both branches. A value object of the engine never has a `code` of its own. */
export function isFailure<T>(outcome: Outcome<T>): outcome is Failure {
  return typeof outcome === 'object' && outcome !== null && 'code' in outcome && 'message' in outcome
}

export function failure(
  code: string,
  message: string,
  where: { field?: string; line?: number } = {},
): Failure {
  return { code, message, ...where }
}

/**
 * Checks one numeric input: `E_MISSING`, `E_NUMBER` or `E_RANGE`, or undefined when it is fine.
 * The range is inclusive and stands in the message.
 */
export function checkNumber(
  field: string,
  value: unknown,
  min = -Infinity,
  max = Infinity,
): Failure | undefined {
  if (value === undefined || value === null)
    return failure('E_MISSING', `${field} is missing: enter a number.`, { field })
  if (typeof value !== 'number' || !Number.isFinite(value)) {
    return failure('E_NUMBER', `${field} is not a number.`, { field })
  }
  if (value < min || value > max) {
    return failure('E_RANGE', `${field} is ${value}: it must be ${rangeText(min, max)}.`, { field })
  }
  return undefined
}

function rangeText(min: number, max: number): string {
  if (max === Infinity) return `${min} or more`
  if (min === -Infinity) return `${max} or less`
  return `from ${min} to ${max}`
}
