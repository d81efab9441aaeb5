import { isFailure, type Outcome } from '#shared/engine/outcome.ts'

/** The value of an outcome that a test takes for granted; a failure ends the test with its words. */
export function valueOf<T>(outcome: Outcome<T>): T {
  if (isFailure(outcome)) throw new Error(`${outcome.code}: ${outcome.message}`)
  return outcome
}
