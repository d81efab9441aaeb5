import type { z } from 'zod'
import type { movementRecord } from '#shared/contracts/movements.ts'
import type { AppContext } from '../../context.ts'
import { notFound } from '../../errors.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import type { By } from './thing.ts'
import { designatedOf, instant, namedOf } from './values.ts'

const COLUMNS = `v.id, v.item_id, v.moved_at, v.reason, v.moved_by, m.name AS mover,
  v.from_kit_id, fk.designation AS from_kit, v.from_position_id, fq.name AS from_position,
  v.from_place_id, fp.name AS from_place, v.to_kit_id, tk.designation AS to_kit,
  v.to_position_id, tq.name AS to_position, v.to_place_id, tp.name AS to_place`
const TABLES = `movement v LEFT JOIN member m ON m.id = v.moved_by
  LEFT JOIN kit fk ON fk.id = v.from_kit_id LEFT JOIN position fq ON fq.id = v.from_position_id
  LEFT JOIN place fp ON fp.id = v.from_place_id LEFT JOIN kit tk ON tk.id = v.to_kit_id
  LEFT JOIN position tq ON tq.id = v.to_position_id LEFT JOIN place tp ON tp.id = v.to_place_id`

const ONE: Statement = {
  name: 'read-movement',
  text: `SELECT ${COLUMNS} FROM ${TABLES} WHERE v.group_id = $1 AND v.id = $2`,
}

const PAGE: Statement = {
  name: 'list-item-moves',
  text: `SELECT ${COLUMNS} FROM ${TABLES}
    WHERE v.group_id = $1 AND v.item_id = $2 AND ($3::uuid IS NULL OR (v.moved_at, v.id) <
      (SELECT moved_at, id FROM movement WHERE group_id = $1 AND item_id = $2 AND id = $3))
    ORDER BY v.moved_at DESC, v.id DESC LIMIT $4`,
}

const ITEM: Statement = { name: 'item-exists', text: 'SELECT 1 FROM item WHERE group_id = $1 AND id = $2' }

interface Row {
  id: string
  item_id: string
  moved_at: Date
  reason: string
  moved_by: string | null
  mover: string | null
  from_kit_id: string | null
  from_kit: string | null
  from_position_id: string | null
  from_position: string | null
  from_place_id: string | null
  from_place: string | null
  to_kit_id: string | null
  to_kit: string | null
  to_position_id: string | null
  to_position: string | null
  to_place_id: string | null
  to_place: string | null
}

type Answer = z.input<typeof movementRecord>

function movementOf(row: Row): Answer {
  return {
    id: row.id,
    itemId: row.item_id,
    from: {
      kit: designatedOf(row.from_kit_id, row.from_kit),
      position: namedOf(row.from_position_id, row.from_position),
      place: namedOf(row.from_place_id, row.from_place),
    },
    to: {
      kit: designatedOf(row.to_kit_id, row.to_kit),
      position: namedOf(row.to_position_id, row.to_position),
      place: namedOf(row.to_place_id, row.to_place),
    },
    movedAt: instant(row.moved_at),
    reason: row.reason,
    movedBy: namedOf(row.moved_by, row.mover),
  }
}

export async function readMovement(tx: GroupTx, id: string): Promise<Answer | undefined> {
  const [row] = await tx.sql<Row>(ONE, [tx.groupId, id])
  return row && movementOf(row)
}

interface MovesQuery {
  readonly itemId: string
  readonly size: number
  /** The last id of the page before. */
  readonly before?: string
}

/** Where an item has been, latest first; `next` asks for the page after this one. */
export function listItemMoves(
  ctx: AppContext,
  by: By,
  { itemId, size, before }: MovesQuery,
): Promise<{ rows: Answer[]; next: string | null }> {
  return inGroup(ctx, by, async (tx) => {
    const [items, rows] = await Promise.all([
      tx.sql(ITEM, [tx.groupId, itemId]),
      tx.sql<Row>(PAGE, [tx.groupId, itemId, before ?? null, size + 1]),
    ])
    if (items.length === 0) throw notFound('item')
    const page = rows.slice(0, size).map(movementOf)
    return { rows: page, next: rows.length > size ? page.at(-1)!.id : null }
  })
}
