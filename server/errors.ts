import type { FieldProblem, ProblemCode } from '#shared/contracts/problems.ts'

interface ProblemExtras {
  errors?: readonly FieldProblem[]
  /** `version-stale`: the record as it is now, so that both versions can be shown. */
  current?: unknown
  retryAfterSeconds?: number
  headers?: Record<string, string>
}

/** The one error that services throw for an expected "no"; `problem-handler` maps it to an answer. */
export class AppError extends Error {
  constructor(
    readonly code: ProblemCode,
    readonly detail: string,
    readonly extras: ProblemExtras = {},
  ) {
    super(`${code}: ${detail}`)
    this.name = 'AppError'
  }
}

/** A field at fault that only the database or the engine could see. `pointer` e.g. `#/serial`. */
export function invalidField(pointer: string, detail: string): AppError {
  return new AppError('request-invalid', detail, { errors: [{ pointer, detail }] })
}

export function notFound(what: string): AppError {
  return new AppError('not-found', `There is no such ${what} in your group.`)
}
