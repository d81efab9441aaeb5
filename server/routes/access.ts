import type { Access } from '#shared/contracts/endpoint.ts'
import { ROLES_THAT_RENEW } from '#shared/contracts/roles.ts'
import type { Caller } from '../caller.ts'
import { AppError } from '../errors.ts'

/** Throws unless the caller may use an endpoint. Group and roles come from the session, never from the request. */
export function checkAccess(access: Access, caller: Caller | undefined): void {
  if (access.scope === 'public') return
  if (!caller)
    throw new AppError('sign-in-needed', 'Your session has ended or never began. Nothing was changed.')
  if (access.roles.some((role) => caller.roles.includes(role))) return
  const needsPassword = access.roles.some(
    (role) => ROLES_THAT_RENEW.includes(role) && caller.heldRoles.includes(role),
  )
  if (needsPassword) throw new AppError('password-needed', 'More than an hour has passed since you gave it.')
  throw new AppError('not-allowed', `This is for: ${access.roles.join(', ')}.`)
}
