import { z } from 'zod'
import { itemDetailsRecord } from '#shared/contracts/item-details.ts'
import type { itemRecord } from '#shared/contracts/items.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { ITEM_COLUMNS, ITEM_TABLES, itemRowOf, type ItemColumns } from './item-columns.ts'
import { number } from './values.ts'

const READ: Statement = {
  name: 'read-item',
  text: `SELECT ${ITEM_COLUMNS}, t.details, t.weight_kg, t.notes FROM ${ITEM_TABLES}
    WHERE t.group_id = $1 AND t.id = $2`,
}

interface ItemRow extends ItemColumns {
  details: object
  weight_kg: string | null
  notes: string
}

/** One item with all its fields; undefined when the group has no such item. */
export async function readItem(tx: GroupTx, id: string): Promise<z.input<typeof itemRecord> | undefined> {
  const [row] = await tx.sql<ItemRow>(READ, [tx.groupId, id])
  return (
    row && {
      ...itemRowOf(row),
      details: itemDetailsRecord.parse({ ...row.details, category: row.category }),
      weightKg: number(row.weight_kg),
      notes: row.notes,
    }
  )
}
