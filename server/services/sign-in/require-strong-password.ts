import { Group } from '../../entities/Group.ts'
import { Member } from '../../entities/Member.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { weaknessOf } from './password-strength.ts'

const TEXTS = {
  common: 'This is put together from passwords that many people use. Choose a few unrelated words.',
  'known-name': 'This is put together from names that anybody could know here. Choose a few unrelated words.',
} as const

/**
 * Refuses a new password that would be guessed early (promise P17). Its length is the contract's matter.
 * @throws AppError `request-invalid` that names `#/newPassword`.
 */
export async function requireStrongPassword(tx: GroupTx, memberId: string, password: string): Promise<void> {
  const [member, group] = await Promise.all([
    tx.repository(Member).findOneBy({ id: memberId }),
    tx.manager.findOneBy(Group, { id: tx.groupId }),
  ])
  const names = [
    'Halyard',
    group?.name,
    group?.shortName,
    member?.name,
    member?.callSign,
    member?.email?.split('@')[0],
    member?.email?.split('@')[1]?.split('.')[0],
  ]
  const weakness = weaknessOf(
    password,
    names.filter((name) => name != null),
  )
  if (weakness) throw invalidField('#/newPassword', TEXTS[weakness])
}
