import type { Role } from '#shared/contracts/roles.ts'
import { isAllowed } from '@/navigation.ts'
import { useSessionStore } from '@/stores/session.ts'

/** What the member may do: `may(KEEPERS)` is true where one of the roles is held. The service decides in the end. */
export function useHeldRoles() {
  const session = useSessionStore()
  return { may: (roles: readonly Role[]) => isAllowed(roles, session.member?.heldRoles ?? []) }
}
