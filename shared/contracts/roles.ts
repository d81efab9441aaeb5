/** The roles a member can hold; several at once, and their rights add up. */
export const ROLES = ['administrator', 'net-coordinator', 'quartermaster', 'volunteer', 'observer'] as const

export type Role = (typeof ROLES)[number]

/** Everyone who belongs to the group. */
export const ANY_MEMBER: readonly Role[] = ROLES

/** Everyone who works with the equipment; observers read boards and statements only. */
export const CREW: readonly Role[] = ['administrator', 'net-coordinator', 'quartermaster', 'volunteer']

/** Who keeps the registry: what exists, where it lives, what it is called. */
export const KEEPERS: readonly Role[] = ['administrator', 'quartermaster']

/** Who answers for readiness: availability, policy, lowered verdicts. */
export const LEADS: readonly Role[] = ['administrator', 'net-coordinator', 'quartermaster']

export const ADMINISTRATORS: readonly Role[] = ['administrator']

/** Rights that need the password again an hour after it was given. */
export const ROLES_THAT_RENEW: readonly Role[] = ['administrator', 'quartermaster']

/** Who may change what counts as proof. */
export const POLICY_MAKERS: readonly Role[] = ['administrator', 'net-coordinator']
