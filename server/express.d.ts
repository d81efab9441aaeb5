import type { Caller } from './caller.ts'
import type { SessionMember } from './middleware/session-store.ts'

declare global {
  namespace Express {
    interface Request {
      requestId: string
      /** Set by the session middleware; absent when signed out. */
      caller?: Caller
      /** The row behind `caller`, as the session store found it. */
      sessionMember?: SessionMember
      /** Express signs cookies with it. */
      secret?: string
    }
  }
}
