import type { Actor } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { Group } from '../../entities/Group.ts'
import { Member } from '../../entities/Member.ts'
import { AppError } from '../../errors.ts'
import { inGroup, type GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { findOpenLink, useLink, type LinkPurpose, type OpenLink } from '../one-time-links.ts'
import { mailPasswordChanged } from '../people/mail-password-link.ts'
import { endSessionsOf } from '../sessions.ts'
import { storePassword } from './change-password.ts'
import { hashPassword } from './password-hash.ts'
import { requireStrongPassword } from './require-strong-password.ts'

export interface LinkFacts {
  readonly purpose: LinkPurpose
  readonly memberName: string
  readonly email: string
  readonly groupName: string
}

const SUMMARIES: Record<LinkPurpose, string> = {
  invitation: 'accepted the invitation and chose a password',
  'password-reset': 'set a new password by a mailed link; all sessions ended',
}

/** What a mailed link is for. Changes nothing, so that mail programs may look at it. */
export async function describeLink(ctx: AppContext, actor: Actor, token: string): Promise<LinkFacts> {
  const link = await findOpenLink(ctx, token)
  return inGroup(ctx, { groupId: link.groupId, actor }, async (tx) => {
    const { member, group } = await ownersOf(tx, link)
    return {
      purpose: link.purpose,
      memberName: member.name,
      email: member.email ?? '',
      groupName: group.name,
    }
  })
}

interface LinkUse {
  readonly token: string
  readonly newPassword: string
}

/**
 * Sets the password of the member to whom the link was mailed, once. All their sessions end.
 * @throws AppError `link-invalid`; `request-invalid` that names `#/newPassword`, the link staying good.
 */
export async function setPasswordByLink(ctx: AppContext, actor: Actor, use: LinkUse): Promise<void> {
  const link = await findOpenLink(ctx, use.token)
  const scope = { groupId: link.groupId, actor }
  await inGroup(ctx, scope, (tx) => requireStrongPassword(tx, link.memberId, use.newPassword))
  const hash = await hashPassword(use.newPassword)
  await inGroup(ctx, scope, async (tx) => {
    const { member } = await ownersOf(tx, link)
    await useLink(tx, link)
    await storePassword(tx, member.id, hash)
    await endSessionsOf(tx, member.id)
    if (link.purpose === 'password-reset') await mailPasswordChanged(tx, member.id)
    const own = { ...tx, actor: { ...actor, memberId: member.id, name: member.name } }
    const action = link.purpose === 'invitation' ? 'invitation-accepted' : 'password-reset'
    await record(own, {
      action,
      subjectType: 'member',
      subjectId: member.id,
      summary: SUMMARIES[link.purpose],
    })
  })
}

async function ownersOf(tx: GroupTx, link: OpenLink): Promise<{ member: Member; group: Group }> {
  const member = await tx.repository(Member).findOneBy({ id: link.memberId })
  const group = await tx.manager.findOneBy(Group, { id: tx.groupId })
  if (!member || member.removedAt || !group || group.archivedAt) {
    throw new AppError('link-invalid', 'The membership it was for has ended.')
  }
  return { member, group }
}
