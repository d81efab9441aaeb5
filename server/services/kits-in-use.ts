import type { GroupTx, Statement } from '../group-transaction.ts'

const KITS: Statement = {
  name: 'kits-in-use',
  text: 'SELECT id FROM kit WHERE group_id = $1 AND retired_at IS NULL AND ($2::uuid IS NULL OR id = $2) ORDER BY id',
}

/** The ids of the group's kits that are not retired, in order; of `only` at most, when it is named. */
export async function kitsInUse(tx: GroupTx, only: string | null = null): Promise<string[]> {
  const kits = await tx.sql<{ id: string }>(KITS, [tx.groupId, only])
  return kits.map((kit) => kit.id)
}
