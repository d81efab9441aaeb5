import connectPgSimple from 'connect-pg-simple'
import type { Request } from 'express'
import session, { type SessionData } from 'express-session'
import type { Pool } from 'pg'
import type { Role } from '#shared/contracts/roles.ts'
import type { AppContext } from '../context.ts'
import type { Statement } from '../group-transaction.ts'
import { poolOf } from '../pool.ts'
import type { SessionFacts } from '../services/session-limits.ts'

/** The member behind a session, as they stand at this request. */
export interface SessionMember {
  readonly memberId: string
  readonly groupId: string
  readonly name: string
  readonly roles: readonly Role[]
  readonly facts: SessionFacts
}

interface FoundRow {
  sess: SessionFacts
  member_id: string
  group_id: string
  name: string
  roles: Role[]
}

const FIND: Statement = { name: 'find-session', text: 'SELECT * FROM find_session($1, $2)' }

/** A frozen database must not hold a request for longer (promise P29: an answer within 3 s). */
const LONGEST_LOOK_UP_MS = 2500

type Callback = (error: unknown, session?: SessionData | null) => void

/**
 * Reads sessions through one named look-up that also answers who the member is now, so that a change of roles holds
 * with the next request at no extra round trip. Writing is done by `services/sessions.ts`, inside the transaction of
 * its cause; nothing is written at the end of a request.
 */
export class SessionStore extends connectPgSimple(session) {
  readonly #ctx: AppContext
  readonly #members = new WeakMap<SessionData, SessionMember>()

  constructor(ctx: AppContext) {
    const query = async (text: string, values: unknown[]) => poolOf(ctx.db).query(text, values)
    super({ pool: { query } as unknown as Pool, disableTouch: true, pruneSessionInterval: false })
    this.#ctx = ctx
  }

  override get(sid: string, done: Callback): void {
    this.#find(sid).then(
      (found) => done(null, found),
      (error: unknown) => done(error),
    )
  }

  override createSession(req: Request, data: SessionData) {
    const member = this.#members.get(data)
    if (member) req.sessionMember = member
    return super.createSession(req, data)
  }

  async #find(sid: string): Promise<SessionData | null> {
    const values = [sid, this.#ctx.clock.now()]
    const query = { ...FIND, values, query_timeout: LONGEST_LOOK_UP_MS }
    const { rows } = await poolOf(this.#ctx.db).query<FoundRow>(query)
    const row = rows[0]
    if (!row) return null
    const data: SessionData = { cookie: new session.Cookie() }
    this.#members.set(data, {
      memberId: row.member_id,
      groupId: row.group_id,
      name: row.name,
      roles: row.roles,
      facts: row.sess,
    })
    return data
  }
}
