import { Group } from '../entities/Group.ts'
import type { GroupTx } from '../group-transaction.ts'
import { record } from './audit.ts'

export type NewGroup = Pick<Group, 'name' | 'shortName' | 'timeZone' | 'returnAddress' | 'demo'>

/** Founds the group of this transaction; its first members and its policy come next. */
export async function foundGroup(tx: GroupTx, group: NewGroup): Promise<void> {
  await tx.manager.insert(Group, { ...group, id: tx.groupId, createdAt: tx.now })
  await record(tx, {
    action: 'group-founded',
    subjectType: 'group',
    subjectId: tx.groupId,
    summary: `founded ${group.name}`,
    after: group,
  })
}
