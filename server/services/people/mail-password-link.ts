import type { AppContext } from '../../context.ts'
import { Group } from '../../entities/Group.ts'
import { Member } from '../../entities/Member.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { makeLink, type LinkPurpose } from '../one-time-links.ts'
import { queueMail } from '../queue-mail.ts'
import { invitationMail, passwordChangedMail, passwordResetMail } from './mail-texts.ts'

const MAILS = { invitation: invitationMail, 'password-reset': passwordResetMail } as const

const SUMMARIES: Record<LinkPurpose, (name: string) => string> = {
  invitation: (name) => `mailed an invitation to ${name}`,
  'password-reset': (name) => `asked for a link to set a new password for ${name}`,
}

/** Makes a link for the member and mails it, where they have an address. Links mailed before stop working. */
export async function mailPasswordLink(
  tx: GroupTx,
  ctx: AppContext,
  { memberId, purpose }: { memberId: string; purpose: LinkPurpose },
): Promise<void> {
  const member = await tx.repository(Member).findOneBy({ id: memberId })
  if (!member?.email || member.removedAt) return
  const group = await tx.manager.findOneByOrFail(Group, { id: tx.groupId })
  const link = await makeLink(tx, ctx, { memberId, purpose })
  const mail = MAILS[purpose]({ memberName: member.name, groupName: group.name, link })
  await queueMail(tx, { memberId, recipient: member.email, ...mail })
  await record(tx, {
    action: `${purpose}-mailed`,
    subjectType: 'member',
    subjectId: memberId,
    summary: SUMMARIES[purpose](member.name),
  })
}

/** Tells the member that their password was changed, in case it was not they. */
export async function mailPasswordChanged(tx: GroupTx, memberId: string): Promise<void> {
  const member = await tx.repository(Member).findOneBy({ id: memberId })
  if (!member?.email) return
  const group = await tx.manager.findOneByOrFail(Group, { id: tx.groupId })
  const mail = passwordChangedMail({ memberName: member.name, groupName: group.name })
  await queueMail(tx, { memberId, recipient: member.email, ...mail })
}
