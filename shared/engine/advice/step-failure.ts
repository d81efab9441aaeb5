import { failure, type Failure } from '../outcome.ts'

/** A failure that names its step by its place: `steps[2]`. */
export function stepFailure({ code, message }: Failure, place: number): Failure {
  return failure(code, message, { field: `steps[${place}]` })
}
