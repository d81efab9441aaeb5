import { Group } from '../entities/Group.ts'
import type { GroupTx } from '../group-transaction.ts'
import { record } from './audit.ts'

export type NewGroup = Pick<Group, 'name' | 'shortName' | 'timeZone' | 'returnAddress' | 'demo'>

/**
 * Founds the group of this transaction. It is founded closed, like an archived one: nobody signs in and no job runs for
 * it until `openGroup`, so that nobody meets a group that is only half there.
 */
export async function foundGroup(tx: GroupTx, group: NewGroup): Promise<void> {
  await tx.manager.insert(Group, { ...group, id: tx.groupId, createdAt: tx.now, archivedAt: tx.now })
  await recordOf(tx, { action: 'group-founded', summary: `founded ${group.name}`, after: group })
}

export async function openGroup(tx: GroupTx): Promise<void> {
  await tx.manager.update(Group, { id: tx.groupId }, { archivedAt: null })
  await recordOf(tx, { action: 'group-opened', summary: 'opened the group' })
}

function recordOf(tx: GroupTx, entry: { action: string; summary: string; after?: object }): Promise<void> {
  return record(tx, { subjectType: 'group', subjectId: tx.groupId, ...entry })
}
