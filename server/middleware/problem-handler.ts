import type { ErrorRequestHandler, Request, Response } from 'express'
import { PROBLEMS, type ProblemCode, type ProblemDetails } from '#shared/contracts/problems.ts'
import type { AppContext } from '../context.ts'
import { AppError } from '../errors.ts'
import { fromDatabaseError } from './database-problem.ts'

/** Writes every error as RFC 9457 problem details. What nobody expected goes to the log whole and out as nothing. */
export function problemHandler({ log }: AppContext): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    if (res.headersSent) return next(error)
    const known = toAppError(error)
    if (known.code === 'internal-error')
      log.error({ err: error, requestId: req.requestId }, 'unexpected error')
    else if (known.code === 'unavailable') log.warn({ err: error, requestId: req.requestId }, 'unavailable')
    sendProblem(req, res, known)
  }
}

export function sendProblem(req: Request, res: Response, error: AppError): void {
  const { status } = PROBLEMS[error.code]
  for (const [name, value] of Object.entries(error.extras.headers ?? {})) res.set(name, value)
  const retryAfter = error.extras.retryAfterSeconds ?? (error.code === 'unavailable' ? 2 : undefined)
  if (retryAfter !== undefined) res.set('Retry-After', String(Math.max(1, Math.ceil(retryAfter))))
  res.set('Cache-Control', 'no-store')
  res
    .status(status)
    .type('application/problem+json')
    .send(JSON.stringify(problemBody(req, error)))
}

function problemBody(req: Request, error: AppError): ProblemDetails {
  const { status, title } = PROBLEMS[error.code]
  return {
    type: `/problems/${error.code}`,
    title,
    status,
    code: error.code,
    detail: error.detail,
    requestId: req.requestId,
    ...(error.extras.errors && { errors: error.extras.errors }),
    ...(error.extras.current !== undefined && { current: error.extras.current }),
  }
}

function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error
  const fromDatabase = fromDatabaseError(error)
  if (fromDatabase) return fromDatabase
  const code = parserProblem(error)
  if (code) return new AppError(code, PROBLEMS[code].title)
  return new AppError(
    'internal-error',
    'It was noted with the request id. Nothing was stored; please try again.',
  )
}

/** Express and its body parser mark their own errors with a status. */
function parserProblem(error: unknown): ProblemCode | undefined {
  const status = (error as { status?: unknown }).status
  if (status === 413) return 'body-too-large'
  if (status === 415) return 'content-type-refused'
  if (status === 404) return 'not-found'
  if (typeof status === 'number' && status >= 400 && status < 500) return 'request-malformed'
  return undefined
}
