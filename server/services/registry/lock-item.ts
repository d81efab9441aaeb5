import { Item } from '../../entities/Item.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { lockKits } from '../lock-kits.ts'
import { lockRow } from './locks.ts'

const KIT_OF: Statement = {
  name: 'kit-of-item',
  text: 'SELECT kit_id FROM item WHERE group_id = $1 AND id = $2',
}

/**
 * An item with its kit, the kit first: whoever changes several things of a kit takes them in this order. An item that
 * moved to another kit between the two locks is taken anew, by trying the whole transaction again.
 */
export async function lockItem(tx: GroupTx, id: string): Promise<Item | null> {
  const [seen] = await tx.sql<{ kit_id: string | null }>(KIT_OF, [tx.groupId, id])
  if (!seen) return null
  if (seen.kit_id) await lockKits(tx, [seen.kit_id])
  const row = await lockRow(tx, Item, id)
  if (row && (row.kitId ?? null) !== seen.kit_id) throw new MovedMeanwhile()
  return row
}

/** Has PostgreSQL's code of a serialisation failure, so that `inGroup` tries again. */
class MovedMeanwhile extends Error {
  readonly code = '40001'

  constructor() {
    super('The item moved to another kit while it was being locked.')
  }
}
