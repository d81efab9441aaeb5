import type { z } from 'zod'
import type { lotRecord } from '#shared/contracts/stock.ts'
import { Consumable } from '../../entities/Consumable.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { lockRow, refuseRetired } from './locks.ts'
import { instant } from './values.ts'

type Answer = z.input<typeof lotRecord>

const COLUMNS = `id, consumable_id, name, trim_scale(quantity)::text AS quantity, use_by_on::text, condition, created_at`

const OF_CONSUMABLE: Statement = {
  name: 'lots-of-consumable',
  text: `SELECT ${COLUMNS} FROM consumable_lot WHERE group_id = $1 AND consumable_id = $2
    ORDER BY use_by_on NULLS LAST, lower(name), id`,
}

const ONE: Statement = {
  name: 'lot-for-update',
  text: `SELECT ${COLUMNS} FROM consumable_lot WHERE group_id = $1 AND consumable_id = $2 AND id = $3 FOR UPDATE`,
}

interface Row {
  id: string
  consumable_id: string
  name: string
  quantity: string
  use_by_on: string | null
  condition: string
  created_at: Date
}

function lotOf(row: Row): Answer {
  return {
    id: row.id,
    consumableId: row.consumable_id,
    name: row.name,
    quantity: row.quantity,
    useByOn: row.use_by_on,
    condition: row.condition,
    createdAt: instant(row.created_at),
  }
}

export async function lotsOf(tx: GroupTx, consumableId: string): Promise<Answer[]> {
  const rows = await tx.sql<Row>(OF_CONSUMABLE, [tx.groupId, consumableId])
  return rows.map(lotOf)
}

/** The lot as it is in this transaction, locked. Undefined when the consumable has no such lot. */
export async function lockLot(tx: GroupTx, consumableId: string, lotId: string): Promise<Answer | undefined> {
  const [row] = await tx.sql<Row>(ONE, [tx.groupId, consumableId, lotId])
  return row && lotOf(row)
}

/** The consumable, locked; `not-found`, or `state-conflict` when it is retired. */
export async function lockConsumable(tx: GroupTx, id: string): Promise<Consumable> {
  const row = await lockRow(tx, Consumable, id)
  if (!row) throw notFound('consumable')
  refuseRetired(row, row.name)
  return row
}

/** "Fuse 10 A (lot 2023)": what a sentence calls a lot. */
export function lotWords(consumable: Consumable, lotName: string): string {
  return lotName ? `${consumable.name} (lot ${lotName})` : consumable.name
}
