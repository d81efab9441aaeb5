import type { Caller } from '../../caller.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { endLinksOf } from '../one-time-links.ts'
import { mailPasswordChanged } from '../people/mail-password-link.ts'
import { endSessionsOf, stepUpSession } from '../sessions.ts'
import { recordPasswordEvent, requireOwnPassword } from './own-password.ts'
import { hashPassword } from './password-hash.ts'
import { requireStrongPassword } from './require-strong-password.ts'
import type { SignInDesk } from './sign-in.ts'

const STORE: Statement = {
  name: 'store-password',
  text: `INSERT INTO credential (member_id, group_id, password_hash, changed_at) VALUES ($2, $1, $3, $4)
    ON CONFLICT (member_id) DO UPDATE SET password_hash = $3, changed_at = $4`,
}

export interface PasswordChange {
  readonly password: string
  readonly newPassword: string
}

/** Changes the caller's own password. All other sessions and open links end; this session goes on under the id returned. */
export async function changeOwnPassword(
  desk: SignInDesk,
  by: Caller,
  change: PasswordChange,
): Promise<string> {
  await requireOwnPassword(desk, by, change.password)
  await inGroup(desk.ctx, by, (tx) => requireStrongPassword(tx, by.memberId, change.newPassword))
  const hash = await hashPassword(change.newPassword)
  return inGroup(desk.ctx, by, async (tx) => {
    await storePassword(tx, by.memberId, hash)
    await endSessionsOf(tx, by.memberId, by.sessionId)
    await mailPasswordChanged(tx, by.memberId)
    await recordPasswordEvent(tx, by, 'password-changed', 'changed the password; other sessions ended')
    return stepUpSession(tx, by.sessionId)
  })
}

/** Sets a member's password. Links that were mailed to set one stop working. */
export async function storePassword(tx: GroupTx, memberId: string, hash: string): Promise<void> {
  await tx.sql(STORE, [tx.groupId, memberId, hash, tx.now])
  await endLinksOf(tx, memberId)
}
