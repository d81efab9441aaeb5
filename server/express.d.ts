import type { Caller } from './caller.ts'

declare global {
  namespace Express {
    interface Request {
      requestId: string
      /** Set by the session middleware; absent when signed out. */
      caller?: Caller
    }
  }
}
