import type { Caller } from '../../caller.ts'
import { AppError, invalidField } from '../../errors.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { verifyPassword } from './password-hash.ts'
import type { SignInDesk } from './sign-in.ts'

const OWN_HASH: Statement = {
  name: 'own-password-hash',
  text: `SELECT m.email, c.password_hash FROM member m JOIN credential c ON c.member_id = m.id
    WHERE m.group_id = $1 AND m.id = $2`,
}

interface OwnRow {
  email: string | null
  password_hash: string
}

/**
 * Checks that it is the member who asks: wrong tries count like those at sign-in.
 * @throws AppError `request-invalid` that names `#/password`; `too-many-tries`; `unavailable`.
 */
export async function requireOwnPassword(
  { ctx, throttle }: SignInDesk,
  by: Caller,
  password: string,
): Promise<void> {
  const row = await inGroup(
    ctx,
    by,
    async (tx) => (await tx.sql<OwnRow>(OWN_HASH, [tx.groupId, by.memberId]))[0],
  )
  if (!row) throw new AppError('state-conflict', 'You have no password yet: ask for a link to set one.')
  const attempt = await throttle.admit(row.email ?? by.memberId, by.actor.address)
  let isRight: boolean
  try {
    isRight = await verifyPassword(row.password_hash, password)
  } catch (error) {
    await attempt.takeBack()
    throw error
  }
  if (isRight) return attempt.succeed()
  await inGroup(ctx, by, (tx) => recordPasswordEvent(tx, by, 'password-refused', 'gave a wrong password'))
  throw invalidField('#/password', 'This is not your password.')
}

/** An entry about the member's own password; never the password. */
export function recordPasswordEvent(tx: GroupTx, by: Caller, action: string, summary: string): Promise<void> {
  return record(tx, { action, subjectType: 'member', subjectId: by.memberId, summary })
}
