import type { RequestHandler } from 'express'
import type { Config } from '../config.ts'
import { AppError } from '../errors.ts'

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS'])

/**
 * No foreign page can act (P21): a changing request needs our exact Origin, or, where the browser sends none,
 * `Sec-Fetch-Site: same-origin`. One-click unsubscribe comes from mail programs, which send neither (RFC 8058).
 */
export function requireSameOrigin(config: Config, openPaths: RegExp): RequestHandler {
  const own = new URL(config.publicUrl).origin
  return (req, _res, next) => {
    if (SAFE.has(req.method) || openPaths.test(req.path)) return next()
    const origin = req.get('Origin')
    const allowed = origin === undefined ? req.get('Sec-Fetch-Site') === 'same-origin' : origin === own
    if (!allowed) throw new AppError('origin-refused', 'Changes are taken from this site’s own pages only.')
    next()
  }
}
