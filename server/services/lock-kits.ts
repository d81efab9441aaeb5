import type { GroupTx, Statement } from '../group-transaction.ts'

// NO KEY: as strong between two writers as a plain FOR UPDATE, but rows that refer to the kit can still be added.
const LOCK_KITS: Statement = {
  name: 'lock-kits',
  text: 'SELECT id FROM kit WHERE id = ANY($1::uuid[]) ORDER BY id FOR NO KEY UPDATE',
}

/**
 * Locks the kits in id order until the end of the transaction, so that two changes that touch the same kits wait for
 * each other instead of in a circle. Returns the ids that exist in the group.
 */
export async function lockKits(tx: GroupTx, kitIds: readonly string[]): Promise<string[]> {
  if (kitIds.length === 0) return []
  const rows = await tx.sql<{ id: string }>(LOCK_KITS, [[...new Set(kitIds)]])
  return rows.map((row) => row.id)
}
