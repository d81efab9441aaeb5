import type { Request, RequestHandler } from 'express'
import session from 'express-session'
import type { Caller } from '../caller.ts'
import type { AppContext } from '../context.ts'
import { poolOf } from '../pool.ts'
import { needsRenewal, rolesInForce } from '../services/session-limits.ts'
import { renewSession } from '../services/sessions.ts'
import { SESSION_COOKIE } from './session-cookie.ts'
import { SessionStore, type SessionMember } from './session-store.ts'

/** Reads who calls from the session cookie into `req.caller`. Without a valid cookie the request goes on signed out. */
export function readSession(ctx: AppContext): RequestHandler[] {
  const secret = ctx.config.sessionSecret
  const load = session({
    store: new SessionStore(ctx),
    name: SESSION_COOKIE,
    secret,
    resave: false,
    rolling: false,
    saveUninitialized: false,
  })
  const identify: RequestHandler = (req, _res, next) => {
    // For `res.cookie(…, { signed: true })`: the same signature that the reader above checks.
    req.secret = secret
    if (req.sessionMember) identifyCaller(ctx, req, req.sessionMember)
    next()
  }
  return [load, identify]
}

function identifyCaller(ctx: AppContext, req: Request, member: SessionMember): void {
  const now = ctx.clock.now()
  req.caller = callerOf(req, member, now)
  if (!needsRenewal(member.facts, now)) return
  // Beside the request, not in its way: a renewal lost is made up by the next request.
  Promise.resolve()
    .then(() => renewSession(poolOf(ctx.db), req.sessionID, member.facts, now))
    .catch((error: unknown) => ctx.log.warn({ err: error, requestId: req.requestId }, 'session not renewed'))
}

function callerOf(req: Request, member: SessionMember, now: Date): Caller {
  const { memberId, groupId, name, roles, facts } = member
  return {
    memberId,
    groupId,
    name,
    roles: rolesInForce(roles, facts, now),
    heldRoles: roles,
    sessionId: req.sessionID,
    actor: { memberId, name, address: req.ip ?? '', requestId: req.requestId },
  }
}
