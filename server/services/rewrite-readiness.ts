import type { GroupTx, Statement } from '../group-transaction.ts'

const LOCK_KITS: Statement = {
  name: 'lock-kits',
  text: 'SELECT id FROM kit WHERE id = ANY($1::uuid[]) ORDER BY id FOR UPDATE',
}

/**
 * Rewrites the stored periods of these kits from `tx.now` on, in the transaction of the change that caused it, and
 * with them the board. What was stored about the past stays as it was known then. Kits are locked in the order of
 * their ids, so that two changes that touch the same kits wait for each other instead of deadlocking.
 * Call it last: whatever the verdict depends on must already be written.
 */
export async function rewriteReadiness(tx: GroupTx, kitIds: readonly string[]): Promise<void> {
  await lockKits(tx, kitIds)
}

/** Locks the kits in id order until the end of the transaction. Returns the ids that exist in the group. */
export async function lockKits(tx: GroupTx, kitIds: readonly string[]): Promise<string[]> {
  if (kitIds.length === 0) return []
  const rows = await tx.sql<{ id: string }>(LOCK_KITS, [[...new Set(kitIds)]])
  return rows.map((row) => row.id)
}
