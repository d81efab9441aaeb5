import {
  changePassword,
  confirmPassword,
  endSession,
  listSessions,
  readSession,
  signIn,
  signOut,
  signOutEverywhere,
} from '#shared/contracts/session.ts'
import type { AppContext } from '../context.ts'
import { clearSessionCookie, deviceOf, setSessionCookie } from '../middleware/session-cookie.ts'
import { changeOwnPassword } from '../services/sign-in/change-password.ts'
import { confirmOwnPassword } from '../services/sign-in/confirm-password.ts'
import { readFreshSessionView, readSessionView, SIGNED_OUT } from '../services/sign-in/read-session.ts'
import * as signInService from '../services/sign-in/sign-in.ts'
import * as signOutService from '../services/sign-in/sign-out.ts'
import { PasswordThrottle } from '../services/sign-in/throttle.ts'
import type { EndpointRouter } from './endpoint.ts'

export function sessionRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  const desk = { ctx, throttle: new PasswordThrottle(ctx) }
  addSigningIn(endpoints, desk)
  addSigningOut(endpoints, ctx)
  addPasswords(endpoints, desk)
}

function addSigningIn(endpoints: EndpointRouter, desk: signInService.SignInDesk): void {
  const { ctx } = desk
  endpoints.add(readSession, async ({ by }) => (by ? readSessionView(ctx, by) : SIGNED_OUT))
  endpoints.add(signIn, async ({ body, by, actor, req, res }) => {
    const signedIn = await signInService.signIn(desk, {
      ...body,
      device: deviceOf(req),
      // Nobody is signed in yet, whoever was here before.
      actor: { ...actor, memberId: null, name: 'Signed out' },
      old: by && { sid: by.sessionId, memberId: by.memberId },
    })
    setSessionCookie(res, signedIn.sid, body.ownDevice)
    return readFreshSessionView(ctx, signedIn, actor)
  })
}

function addSigningOut(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(signOut, async ({ by, res }) => {
    if (by) await signOutService.signOut(ctx, by)
    clearSessionCookie(res)
  })
  endpoints.add(signOutEverywhere, async ({ by, res }) => {
    await signOutService.signOutEverywhere(ctx, by)
    clearSessionCookie(res)
  })
  endpoints.add(listSessions, ({ by }) => signOutService.listOwnSessions(ctx, by))
  endpoints.add(endSession, ({ by, params }) => signOutService.signOutElsewhere(ctx, by, params.sessionId))
}

function addPasswords(endpoints: EndpointRouter, desk: signInService.SignInDesk): void {
  endpoints.add(confirmPassword, async ({ by, body, req, res }) => {
    const sid = await confirmOwnPassword(desk, by, body.password)
    setSessionCookie(res, sid, req.sessionMember?.facts.ownDevice ?? false)
    return readFreshSessionView(desk.ctx, by, by.actor)
  })
  endpoints.add(changePassword, async ({ by, body, req, res }) => {
    const sid = await changeOwnPassword(desk, by, body)
    setSessionCookie(res, sid, req.sessionMember?.facts.ownDevice ?? false)
  })
}
