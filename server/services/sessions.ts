import { randomBytes, randomUUID } from 'node:crypto'
import type { Pool } from 'pg'
import { AppError } from '../errors.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'
import { sessionEndsAt, type SessionFacts } from './session-limits.ts'

export interface NewSession {
  readonly memberId: string
  readonly ownDevice: boolean
  readonly device: string
  readonly address: string
}

const DEVICE_LENGTH = 200

const INSERT: Statement = {
  name: 'insert-session',
  text: 'INSERT INTO session (sid, sess, expire) VALUES ($1, $2, $3)',
}
const RENEW: Statement = {
  name: 'renew-session',
  text: `UPDATE session SET sess = jsonb_set(sess, '{seenAt}', to_jsonb($2::text)), expire = $3 WHERE sid = $1`,
}
const STEP_UP: Statement = {
  name: 'step-up-session',
  text: `UPDATE session SET sid = $2, sess = jsonb_set(sess, '{passwordAt}', to_jsonb($3::text))
    WHERE sid = $1 RETURNING sid`,
}
const END: Statement = { name: 'end-session', text: 'DELETE FROM session WHERE sid = $1' }
const END_BY_REF: Statement = {
  name: 'end-session-by-ref',
  text: `DELETE FROM session WHERE member_id = $1 AND sess ->> 'ref' = $2 RETURNING sid`,
}
const END_ALL: Statement = {
  name: 'end-sessions-of-member',
  text: 'DELETE FROM session WHERE member_id = $1 AND sid <> $2',
}
const LIST: Statement = {
  name: 'list-sessions-of-member',
  text: `SELECT sid, sess FROM session WHERE member_id = $1 AND expire > $2 ORDER BY sess ->> 'seenAt' DESC LIMIT 100`,
}
/** Open event streams of the member look again at their session when they hear this. */
const TELL: Statement = { name: 'tell-session-ended', text: `SELECT pg_notify('halyard_session_ended', $1)` }

const newSessionId = () => randomBytes(32).toString('base64url')

/** Opens a session of 256 random bits in the caller's transaction and returns its id. */
export async function openSession(tx: GroupTx, session: NewSession): Promise<string> {
  const at = tx.now.toISOString()
  const facts: SessionFacts = {
    ref: randomUUID(),
    memberId: session.memberId,
    ownDevice: session.ownDevice,
    signedInAt: at,
    passwordAt: at,
    seenAt: at,
    device: session.device.slice(0, DEVICE_LENGTH),
    address: session.address,
  }
  const sid = newSessionId()
  await tx.sql(INSERT, [sid, JSON.stringify(facts), sessionEndsAt(facts)])
  return sid
}

/** Notes a use. An UPDATE only: a request in flight must not bring back a session that was ended meanwhile. */
export async function renewSession(pool: Pool, sid: string, facts: SessionFacts, now: Date): Promise<void> {
  const seenAt = now.toISOString()
  await pool.query({ ...RENEW, values: [sid, seenAt, sessionEndsAt({ ...facts, seenAt })] })
}

/**
 * The password was given again: the session goes on under a new id, which is returned.
 * @throws AppError `sign-in-needed` when the session was ended meanwhile.
 */
export async function stepUpSession(tx: GroupTx, sid: string): Promise<string> {
  const renewed = newSessionId()
  const found = await tx.sql(STEP_UP, [sid, renewed, tx.now.toISOString()])
  if (found.length === 0) throw new AppError('sign-in-needed', 'This session was ended meanwhile.')
  return renewed
}

export async function endSession(
  tx: GroupTx,
  { sid, memberId }: { sid: string; memberId: string },
): Promise<void> {
  await Promise.all([tx.sql(END, [sid]), tx.sql(TELL, [memberId])])
}

/** Ends one session of a member by the name it has in the member's list. False when there is none. */
export async function endSessionByRef(tx: GroupTx, memberId: string, ref: string): Promise<boolean> {
  const [ended] = await Promise.all([tx.sql(END_BY_REF, [memberId, ref]), tx.sql(TELL, [memberId])])
  return ended.length > 0
}

/** Ends all sessions of a member, but for the one named. */
export async function endSessionsOf(tx: GroupTx, memberId: string, exceptSid = ''): Promise<void> {
  await Promise.all([tx.sql(END_ALL, [memberId, exceptSid]), tx.sql(TELL, [memberId])])
}

/** The member's live sessions, latest use first. */
export function sessionsOf(tx: GroupTx, memberId: string): Promise<{ sid: string; sess: SessionFacts }[]> {
  return tx.sql(LIST, [memberId, tx.now])
}
