import type { Role } from '#shared/contracts/roles.ts'

/** Where a change comes from, as the audit log keeps it. */
export interface Actor {
  /** Absent for the system's own work. */
  readonly memberId: string | null
  readonly name: string
  readonly address: string
  readonly requestId: string
}

/** A signed-in member as of this request: roles are read anew each time, so a change holds at once. */
export interface Caller {
  readonly memberId: string
  readonly groupId: string
  readonly name: string
  /** The roles in force now: those that need the password again count as `volunteer`. */
  readonly roles: readonly Role[]
  /** All roles the member holds. */
  readonly heldRoles: readonly Role[]
  readonly sessionId: string
  readonly actor: Actor
}

/** Who acts when no member does: jobs, migrations of stored data, the demo data. */
export function systemActor(requestId: string): Actor {
  return { memberId: null, name: 'Halyard', address: 'local', requestId }
}
