import type { CookieOptions, Request, Response } from 'express'
import { cookieAgeMs } from '../services/session-limits.ts'

/** `__Host-` binds the cookie to this very host: no subdomain and no plain-http page can set or read it. */
export const SESSION_COOKIE = '__Host-halyard'

const OPTIONS: CookieOptions = { httpOnly: true, secure: true, sameSite: 'lax', path: '/' }

/** Gives the browser its session id, signed with the session secret. */
export function setSessionCookie(res: Response, sid: string, ownDevice: boolean): void {
  const maxAge = cookieAgeMs(ownDevice)
  res.cookie(SESSION_COOKIE, sid, { ...OPTIONS, signed: true, ...(maxAge !== undefined && { maxAge }) })
}

export function clearSessionCookie(res: Response): void {
  res.clearCookie(SESSION_COOKIE, OPTIONS)
}

/** What a browser says about itself, for the member's list of sessions. */
export function deviceOf(req: Request): string {
  return (req.get('User-Agent') ?? '').replace(/[^\x20-\x7E]/g, '')
}
