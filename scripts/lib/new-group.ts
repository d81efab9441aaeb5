import { v7 as uuidv7 } from 'uuid'
import { z } from 'zod'
import { line } from '#shared/contracts/fields.ts'
import { emailAddress } from '#shared/contracts/people-fields.ts'
import { checkZone } from '#shared/engine/local-day.ts'
import { systemActor } from '#server/caller.ts'
import type { AppContext } from '#server/context.ts'
import { inGroup } from '#server/group-transaction.ts'
import { foundGroup, openGroup } from '#server/services/found-group.ts'
import { addPerson } from '#server/services/people/invite-person.ts'

const newGroup = z.object({
  name: line(120, 1),
  zone: z
    .string()
    .refine((zone) => checkZone(zone) === undefined, 'Not a time zone: America/Denver, for example.'),
  admin: line(120, 1),
  email: emailAddress,
})

export type NewGroupWithAdministrator = z.output<typeof newGroup>

/** The options of the command. @throws Error that names each option at fault */
export function readNewGroup(values: Record<string, unknown>): NewGroupWithAdministrator {
  const parsed = newGroup.safeParse(values)
  if (parsed.success) return parsed.data
  throw new Error(
    parsed.error.issues.map(({ path, message }) => `--${path.join('.')}: ${message}`).join('\n'),
  )
}

/** The group, its first member and their invitation in one transaction: whole or absent. */
export async function foundGroupWithAdministrator(
  ctx: AppContext,
  { name, zone, admin, email }: NewGroupWithAdministrator,
): Promise<string> {
  const groupId = uuidv7()
  await inGroup(ctx, { groupId, actor: systemActor('found-group') }, async (tx) => {
    await foundGroup(tx, {
      name,
      shortName: name.slice(0, 40),
      timeZone: zone,
      returnAddress: '',
      demo: false,
    })
    const contacts = { phone: null, callSign: null, licenceClass: null, licenceExpiresOn: null, notes: '' }
    const body = {
      name: admin,
      email,
      ...contacts,
      roles: ['administrator' as const, 'quartermaster' as const],
    }
    await addPerson(tx, ctx, { memberId: uuidv7(), body })
    await openGroup(tx)
  })
  return groupId
}
