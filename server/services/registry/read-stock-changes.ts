import type { z } from 'zod'
import type { stockChangeRecord } from '#shared/contracts/stock.ts'
import type { AppContext } from '../../context.ts'
import { notFound } from '../../errors.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import type { By } from './thing.ts'
import { instant, namedOf } from './values.ts'

type Answer = z.input<typeof stockChangeRecord>

const SELECT = `SELECT c.id, c.lot_id, l.name AS lot_name, trim_scale(c.difference)::text AS difference, c.reason,
    c.changed_at, c.changed_by, m.name AS member_name
  FROM stock_change c JOIN consumable_lot l ON l.id = c.lot_id LEFT JOIN member m ON m.id = c.changed_by`

const ONE: Statement = {
  name: 'read-stock-change',
  text: `${SELECT} WHERE c.group_id = $1 AND c.id = $2`,
}

const PAGE: Statement = {
  name: 'list-stock-changes',
  text: `${SELECT} WHERE c.group_id = $1 AND l.consumable_id = $2 AND ($3::uuid IS NULL OR (c.changed_at, c.id) <
      (SELECT changed_at, id FROM stock_change WHERE group_id = $1 AND id = $3))
    ORDER BY c.changed_at DESC, c.id DESC LIMIT $4`,
}

const CONSUMABLE: Statement = {
  name: 'consumable-exists',
  text: 'SELECT 1 FROM consumable WHERE group_id = $1 AND id = $2',
}

interface Row {
  id: string
  lot_id: string
  lot_name: string
  difference: string
  reason: string
  changed_at: Date
  changed_by: string | null
  member_name: string | null
}

function changeOf(row: Row): Answer {
  return {
    id: row.id,
    lotId: row.lot_id,
    lotName: row.lot_name,
    difference: row.difference,
    reason: row.reason,
    changedAt: instant(row.changed_at),
    changedBy: namedOf(row.changed_by, row.member_name),
  }
}

export async function readStockChange(tx: GroupTx, id: string): Promise<Answer | undefined> {
  const [row] = await tx.sql<Row>(ONE, [tx.groupId, id])
  return row && changeOf(row)
}

interface ChangesQuery {
  readonly consumableId: string
  readonly size: number
  /** The last id of the page before. */
  readonly before?: string
}

/** What came and went, latest first; `next` asks for the page after this one. */
export function listStockChanges(
  ctx: AppContext,
  by: By,
  { consumableId, size, before }: ChangesQuery,
): Promise<{ rows: Answer[]; next: string | null }> {
  return inGroup(ctx, by, async (tx) => {
    const [consumables, rows] = await Promise.all([
      tx.sql(CONSUMABLE, [tx.groupId, consumableId]),
      tx.sql<Row>(PAGE, [tx.groupId, consumableId, before ?? null, size + 1]),
    ])
    if (consumables.length === 0) throw notFound('consumable')
    const page = rows.slice(0, size).map(changeOf)
    return { rows: page, next: rows.length > size ? page.at(-1)!.id : null }
  })
}
