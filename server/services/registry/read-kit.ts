import type { z } from 'zod'
import type { kitItem, kitRecord } from '#shared/contracts/kits.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { KIT_COLUMNS, KIT_TABLES, kitFieldsOf, type KitColumns } from './kit-columns.ts'
import { positionsOf } from './positions.ts'

const READ: Statement = {
  name: 'read-kit',
  text: `SELECT ${KIT_COLUMNS}, t.seal_number, t.seal_matches, t.notes
    FROM ${KIT_TABLES} WHERE t.group_id = $1 AND t.id = $3`,
}

const ITEMS: Statement = {
  name: 'read-kit-items',
  text: `SELECT id, tag, designation, maker, model, condition, version, position_id FROM item
    WHERE group_id = $1 AND kit_id = $2 ORDER BY lower(designation), id`,
}

interface KitRow extends KitColumns {
  seal_number: string | null
  seal_matches: boolean
  notes: string
}

type KitItem = z.input<typeof kitItem>

/** One kit with its load plan and what is in it; undefined when the group has no such kit. */
export async function readKit(tx: GroupTx, id: string): Promise<z.input<typeof kitRecord> | undefined> {
  const [rows, items] = await Promise.all([
    tx.sql<KitRow>(READ, [tx.groupId, tx.now, id]),
    tx.sql<KitItem & { position_id: string }>(ITEMS, [tx.groupId, id]),
  ])
  const row = rows[0]
  if (!row) return undefined
  const positions = await positionsOf(tx, row.kit_kind_id)
  return {
    ...kitFieldsOf(row),
    sealNumber: row.seal_number,
    sealMatches: row.seal_matches,
    notes: row.notes,
    positions: positions.map((position) => ({
      ...position,
      items: items.filter((item) => item.position_id === position.id),
    })),
  }
}
