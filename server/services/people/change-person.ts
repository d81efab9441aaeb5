import type { z } from 'zod'
import type { updatePerson } from '#shared/contracts/people.ts'
import type { Role } from '#shared/contracts/roles.ts'
import type { AppContext } from '../../context.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { endLinksOf } from '../one-time-links.ts'
import { endSessionsOf } from '../sessions.ts'
import { hasOtherAdministrator, refuseLastAdministrator } from './administrators.ts'
import { mailPasswordLink } from './mail-password-link.ts'
import { lockPerson, readPerson, type PersonRecord, type PersonRow } from './person-record.ts'
import { writePerson } from './write-person.ts'

interface At {
  readonly memberId: string
  readonly version: number
}

type PersonBody = z.output<typeof updatePerson.body>

/**
 * Changes a member's record. Another e-mail address ends their sessions and the links mailed to the old one; who has not
 * chosen a password yet is invited at the new one.
 */
export async function changePerson(
  tx: GroupTx,
  ctx: AppContext,
  { body, ...at }: At & { body: PersonBody },
): Promise<PersonRecord> {
  const row = await lockPerson(tx, at)
  requireAddress(row, body)
  const summary = `changed ${row.name}:`
  const changed = await writePerson(tx, { row, columns: body, action: 'member-changed', summary })
  if (changed && body.email !== row.email) await moveSignIn(tx, ctx, row)
  return readPerson(tx, at.memberId)
}

/** Without an address a member could never sign in again, and no link could be mailed. */
function requireAddress(row: PersonRow, body: PersonBody): void {
  if (body.email === null && row.has_password)
    throw invalidField('#/email', 'This member signs in: an address is needed. Remove the member instead.')
}

async function moveSignIn(tx: GroupTx, ctx: AppContext, row: PersonRow): Promise<void> {
  await endSessionsOf(tx, row.id)
  await endLinksOf(tx, row.id)
  if (!row.has_password) await mailPasswordLink(tx, ctx, { memberId: row.id, purpose: 'invitation' })
}

/** Sets a member's roles. @throws AppError `state-conflict` when nobody could administer the group any more. */
export async function changeRolesOf(
  tx: GroupTx,
  { roles, ...at }: At & { roles: readonly Role[] },
): Promise<PersonRecord> {
  const others = await hasOtherAdministrator(tx, at.memberId)
  const row = await lockPerson(tx, at)
  const losesRights = row.roles.includes('administrator') && !roles.includes('administrator')
  if (losesRights && !others) refuseLastAdministrator(row.name)
  const summary = `made ${row.name} ${roles.join(', ')}`
  await writePerson(tx, { row, columns: { roles: [...roles] }, action: 'roles-changed', summary })
  return readPerson(tx, at.memberId)
}

/** Removes a member: sessions and links end at once, the records they made stay under their name. */
export async function removePersonFor(
  tx: GroupTx,
  { reason, ...at }: At & { reason: string },
): Promise<PersonRecord> {
  const others = await hasOtherAdministrator(tx, at.memberId)
  const row = await lockPerson(tx, at)
  if (row.roles.includes('administrator') && !others) refuseLastAdministrator(row.name)
  const summary = `removed ${row.name}: ${reason}`.replace(/:$/, '')
  await writePerson(tx, { row, columns: { removedAt: tx.now }, action: 'member-removed', summary })
  await endSessionsOf(tx, row.id)
  await endLinksOf(tx, row.id)
  return readPerson(tx, at.memberId)
}
