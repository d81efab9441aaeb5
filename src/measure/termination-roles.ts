import type { Assignment, TerminationName } from '#shared/engine/recognise-terminations.ts'

/** Which file is which termination, by the id of the file. */
export type Roles = Readonly<Record<string, TerminationName>>

const NAMES = ['open', 'short', 'load'] as const

/** The roles that were recognised, for the files in the order in which they were asked about. */
export function rolesOf(assignment: Assignment, ids: readonly string[]): Roles {
  return Object.fromEntries(
    NAMES.flatMap((name) => {
      const id = ids[assignment[name]]
      return id === undefined ? [] : [[id, name] as const]
    }),
  )
}

/** Gives a file a role by hand; the file that had it gets the role that is left over. */
export function withRole(roles: Roles, id: string, role: TerminationName): Roles {
  const before = roles[id]
  const holder = Object.keys(roles).find((other) => other !== id && roles[other] === role)
  return { ...roles, ...(holder !== undefined && before !== undefined && { [holder]: before }), [id]: role }
}

/** The ids as a test names them; a role that no file has is missing. */
export function filesByRole(roles: Roles): Partial<Record<TerminationName, string>> {
  return Object.fromEntries(Object.entries(roles).map(([id, role]) => [role, id]))
}
