import type { Caller } from '../../caller.ts'
import { notFound } from '../../errors.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { sessionEndsAt } from '../session-limits.ts'
import { endSession, endSessionByRef, endSessionsOf, sessionsOf } from '../sessions.ts'

/** Ends the caller's session on the server: a copy of its cookie is worth nothing from then on. */
export function signOut(ctx: AppContext, by: Caller): Promise<void> {
  return inGroup(ctx, by, async (tx) => {
    await endSession(tx, { sid: by.sessionId, memberId: by.memberId })
    await recordSignOut(tx, by, 'signed out')
  })
}

export function signOutEverywhere(ctx: AppContext, by: Caller): Promise<void> {
  return inGroup(ctx, by, async (tx) => {
    await endSessionsOf(tx, by.memberId)
    await recordSignOut(tx, by, 'signed out everywhere')
  })
}

/** @throws AppError `not-found` for a session that is not the caller's own. */
export function signOutElsewhere(ctx: AppContext, by: Caller, ref: string): Promise<void> {
  return inGroup(ctx, by, async (tx) => {
    if (!(await endSessionByRef(tx, by.memberId, ref))) throw notFound('session')
    await recordSignOut(tx, by, 'ended a session on another device')
  })
}

/** Where the caller is signed in, latest use first. */
export async function listOwnSessions(ctx: AppContext, by: Caller) {
  const sessions = await inGroup(ctx, by, (tx) => sessionsOf(tx, by.memberId))
  const rows = sessions.map(({ sid, sess }) => ({
    id: sess.ref,
    current: sid === by.sessionId,
    device: sess.device,
    address: sess.address,
    ownDevice: sess.ownDevice,
    signedInAt: sess.signedInAt,
    seenAt: sess.seenAt,
    endsAt: sessionEndsAt(sess).toISOString(),
  }))
  return { rows, total: rows.length }
}

function recordSignOut(tx: GroupTx, by: Caller, summary: string): Promise<void> {
  return record(tx, { action: 'signed-out', subjectType: 'member', subjectId: by.memberId, summary })
}
