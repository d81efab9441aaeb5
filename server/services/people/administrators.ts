import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

/** Locked in the order of their ids, so that two removals at once wait for each other instead of both going through. */
const OTHERS: Statement = {
  name: 'lock-other-administrators',
  text: `SELECT m.id, EXISTS (SELECT FROM credential c WHERE c.member_id = m.id) AS can_sign_in
    FROM member m WHERE m.group_id = $1 AND m.removed_at IS NULL AND 'administrator' = ANY (m.roles)
    ORDER BY m.id FOR UPDATE OF m`,
}

/**
 * Locks the group's administrators. Call it before the member itself is locked.
 * @returns whether anybody but the member could go on administering: another administrator who can sign in.
 */
export async function hasOtherAdministrator(tx: GroupTx, memberId: string): Promise<boolean> {
  const rows = await tx.sql<{ id: string; can_sign_in: boolean }>(OTHERS, [tx.groupId])
  return rows.some((row) => row.id !== memberId && row.can_sign_in)
}

/** @throws AppError `state-conflict`. */
export function refuseLastAdministrator(name: string): never {
  throw new AppError(
    'state-conflict',
    `${name} is the last administrator who can sign in. Make somebody else administrator first.`,
  )
}
