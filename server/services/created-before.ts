import type { GroupTx, Statement } from '../group-transaction.ts'
import { sameContent } from './registry/changes.ts'
import { idTaken } from './registry/duplicates.ts'

const CREATION: Statement = {
  name: 'created-before',
  text: `SELECT after FROM audit_event WHERE group_id = $1 AND subject_id = $2 AND action = $3 ORDER BY id LIMIT 1`,
}

/**
 * Whether the same request under an id made by the client was carried out before: then its answer is given again. Other
 * content under that id is `id-taken`. Lock the id first.
 */
export async function createdBefore(
  tx: GroupTx,
  { id, action, body }: { id: string; action: string; body: unknown },
): Promise<boolean> {
  const [first] = await tx.sql<{ after: unknown }>(CREATION, [tx.groupId, id, action])
  if (!first) return false
  if (!sameContent(first.after, body)) throw idTaken()
  return true
}
