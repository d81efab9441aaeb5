import { Router } from 'express'
import type { Endpoint } from '#shared/contracts/endpoint.ts'
import { AppError } from '../errors.ts'

/** Answers 405 with `Allow` where the path exists and the method does not. */
export function methodGuard(endpoints: readonly Endpoint[]): Router {
  const router = Router({ caseSensitive: true, strict: true })
  const methods = new Map<string, Set<string>>()
  for (const { path, method } of endpoints) {
    const known = methods.get(path) ?? new Set()
    methods.set(path, known.add(method.toUpperCase()))
  }
  for (const [path, known] of methods) {
    const allow = [...known, ...(known.has('GET') ? ['HEAD'] : [])].sort().join(', ')
    router.all(path, (req) => {
      throw new AppError('method-not-allowed', `${req.method} is not taken here.`, {
        headers: { Allow: allow },
      })
    })
  }
  return router
}
