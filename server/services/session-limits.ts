import { ROLES_THAT_RENEW, type Role } from '#shared/contracts/roles.ts'

/** What a session's row holds. Instants are ISO 8601 in UTC. */
export interface SessionFacts {
  /** Names the session to its member; the session's id itself is a secret. */
  readonly ref: string
  readonly memberId: string
  /** The member called this device their own at sign-in. */
  readonly ownDevice: boolean
  readonly signedInAt: string
  /** When the password was last given in this session. */
  readonly passwordAt: string
  /** Last use, to within `RENEW_AFTER_MS`. */
  readonly seenAt: string
  /** The browser's own description of itself, cut. */
  readonly device: string
  readonly address: string
}

const MINUTE_MS = 60_000
const HOUR_MS = 60 * MINUTE_MS
const DAY_MS = 24 * HOUR_MS

/** A call-out must not begin with a password: a member's own device stays signed in for long (promise P20). */
const OWN_DEVICE = { idleMs: 30 * DAY_MS, longestMs: 90 * DAY_MS }
const OTHER_DEVICE = { idleMs: 8 * HOUR_MS, longestMs: 24 * HOUR_MS }

/** A use is written down only when the last one is older than this, so that reading writes next to nothing. */
export const RENEW_AFTER_MS = 10 * MINUTE_MS

/** Rights over members and registry rest on a password given at most this long ago (promise P20). */
const STRONG_RIGHTS_MS = HOUR_MS

/** Longest life of a session's cookie, seconds; absent where the browser is to forget it when it closes. */
export function cookieAgeMs(ownDevice: boolean): number | undefined {
  return ownDevice ? OWN_DEVICE.longestMs : undefined
}

/** When a session last used at `seenAt` ends if it is not used again. */
export function sessionEndsAt(facts: Pick<SessionFacts, 'ownDevice' | 'signedInAt' | 'seenAt'>): Date {
  const { idleMs, longestMs } = facts.ownDevice ? OWN_DEVICE : OTHER_DEVICE
  return new Date(Math.min(Date.parse(facts.seenAt) + idleMs, Date.parse(facts.signedInAt) + longestMs))
}

export function needsRenewal(facts: SessionFacts, now: Date): boolean {
  return now.getTime() - Date.parse(facts.seenAt) > RENEW_AFTER_MS
}

/**
 * The roles in force. An hour after the password was given, those that need a fresh one count as `volunteer`: what every
 * member of the crew may do goes on without a question.
 */
export function rolesInForce(held: readonly Role[], facts: SessionFacts, now: Date): readonly Role[] {
  if (now.getTime() - Date.parse(facts.passwordAt) <= STRONG_RIGHTS_MS) return held
  const inForce = held.map((role) => (ROLES_THAT_RENEW.includes(role) ? 'volunteer' : role))
  return [...new Set(inForce)]
}
