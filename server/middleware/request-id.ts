import { randomUUID } from 'node:crypto'
import type { RequestHandler } from 'express'
import type { AppContext } from '../context.ts'

/** Gives every request an id of our own, and writes one structured line when its answer has gone. */
export function requestId({ log }: AppContext): RequestHandler {
  return (req, res, next) => {
    const startedAt = performance.now()
    req.requestId = randomUUID()
    res.set('X-Request-Id', req.requestId)
    res.on('finish', () => {
      log.info(
        {
          requestId: req.requestId,
          method: req.method,
          path: req.path,
          status: res.statusCode,
          ms: Math.round(performance.now() - startedAt),
        },
        'request',
      )
    })
    next()
  }
}
