import type { Request } from 'express'
import type { z } from 'zod'
import type { Endpoint } from '#shared/contracts/endpoint.ts'
import type { FieldProblem } from '#shared/contracts/problems.ts'
import { AppError } from '../errors.ts'

/** A path that holds no valid id names nothing: the same answer as for a record that does not exist. */
export function parseParams(endpoint: Endpoint, req: Request): unknown {
  if (!endpoint.params) return {}
  const parsed = endpoint.params.safeParse(req.params)
  if (!parsed.success) throw new AppError('not-found', 'There is no such thing in your group.')
  return parsed.data
}

/** Query strings are flat: a name given twice, or one that is not known, is refused. */
export function parseQuery(endpoint: Endpoint, req: Request): unknown {
  const entries = [...new URL(req.originalUrl, 'http://local').searchParams]
  const flat = Object.fromEntries(entries)
  if (Object.keys(flat).length !== entries.length) {
    throw new AppError('request-malformed', 'A query parameter is given twice.')
  }
  if (!endpoint.query) return {}
  const parsed = endpoint.query.safeParse(flat)
  if (!parsed.success) {
    throw new AppError('request-malformed', 'Check the query parameters.', {
      errors: fieldProblems(parsed.error),
    })
  }
  return parsed.data
}

export function parseBody(endpoint: Endpoint, body: unknown): unknown {
  const parsed = endpoint.body!.safeParse(body)
  if (parsed.success) return parsed.data
  const errors = fieldProblems(parsed.error)
  throw new AppError('request-invalid', 'Nothing was saved. Correct the fields named and send again.', {
    errors,
  })
}

/** Faults as RFC 6901 pointers, at most 100 of them. */
function fieldProblems(error: z.ZodError): FieldProblem[] {
  return error.issues.slice(0, 100).flatMap((issue) => {
    const base = pointer(issue.path)
    if (issue.code !== 'unrecognized_keys') return [{ pointer: base, detail: issue.message }]
    return issue.keys.slice(0, 20).map((key) => ({
      pointer: pointer([...issue.path, key]),
      detail: 'This field is not known here.',
    }))
  })
}

function pointer(path: readonly PropertyKey[]): string {
  const parts = path.map((part) => String(part).slice(0, 80).replaceAll('~', '~0').replaceAll('/', '~1'))
  return ['#', ...parts].join('/')
}
