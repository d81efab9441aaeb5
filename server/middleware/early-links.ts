import type { RequestHandler } from 'express'
import { SESSION_COOKIE } from './session-cookie.ts'

/**
 * Names to a browser with a session what `early.js` of the board's page asks for, so that it asks a round trip earlier;
 * on a slow line that is felt. The addresses must be those of `early.js`.
 */
export function earlyLinks(): RequestHandler {
  return (req, res, next) => {
    const hasSession = req.get('Cookie')?.includes(`${SESSION_COOKIE}=`) ?? false
    if (req.method === 'GET' && req.path === '/' && hasSession) {
      const query = new URLSearchParams(req.url.split('?')[1])
      query.delete('need')
      query.append('size', '200')
      for (const address of ['/api/v1/session', `/api/v1/board?${query}`])
        res.append('Link', `<${address}>; rel=preload; as=fetch; crossorigin`)
    }
    next()
  }
}
