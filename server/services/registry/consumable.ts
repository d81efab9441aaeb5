import type { z } from 'zod'
import type {
  consumableBody,
  consumableRecord,
  consumableRow,
  listConsumables as listContract,
} from '#shared/contracts/consumables.ts'
import type { QueryOf } from '#shared/contracts/endpoint.ts'
import type { AppContext } from '../../context.ts'
import { Consumable } from '../../entities/Consumable.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import { listPage, optional, type Condition, type ListSource } from './list-page.ts'
import { lotsOf } from './lots.ts'
import { requireReference } from './references.ts'
import type { By, Thing } from './thing.ts'
import { namedOf, RECORD_COLUMNS, recordFieldsOf, type RecordColumns } from './values.ts'

type Body = z.output<typeof consumableBody>
type Answer = z.input<typeof consumableRecord>

const COLUMNS = `t.id, t.name, t.unit, trim_scale(t.minimum)::text AS minimum, t.place_id, p.name AS place_name, t.notes,
  ${RECORD_COLUMNS}, l.lots, trim_scale(l.quantity)::text AS quantity, l.quantity < t.minimum AS below_minimum,
  l.use_by_on::text`
const FROM = `consumable t LEFT JOIN place p ON p.id = t.place_id
  CROSS JOIN LATERAL (SELECT count(*)::int AS lots, coalesce(sum(quantity), 0) AS quantity,
    min(use_by_on) FILTER (WHERE quantity > 0) AS use_by_on
    FROM consumable_lot WHERE group_id = t.group_id AND consumable_id = t.id) l`

interface ConsumableRow extends RecordColumns {
  id: string
  name: string
  unit: string
  minimum: string
  place_id: string | null
  place_name: string | null
  notes: string
  lots: number
  quantity: string
  below_minimum: boolean
  use_by_on: string | null
}

const LIST: ListSource = {
  columns: COLUMNS,
  from: FROM,
  search: ['t.name', 't.notes'],
  sorts: {
    name: 'lower(t.name)',
    quantity: 'l.quantity',
    minimum: 't.minimum',
    useByOn: 'l.use_by_on',
    place: 'lower(p.name)',
  },
}

const READ: Statement = {
  name: 'read-consumable',
  text: `SELECT ${COLUMNS} FROM ${FROM} WHERE t.group_id = $1 AND t.id = $2`,
}

function rowOf(row: ConsumableRow): z.input<typeof consumableRow> {
  return {
    id: row.id,
    name: row.name,
    unit: row.unit,
    minimum: row.minimum,
    quantity: row.quantity,
    belowMinimum: row.below_minimum,
    useByOn: row.use_by_on,
    place: namedOf(row.place_id, row.place_name),
    lots: row.lots,
    ...recordFieldsOf(row),
  }
}

export const consumable: Thing<Consumable, Body, Answer> = {
  entity: Consumable,
  subject: 'consumable',
  word: 'consumable',
  nameOf: (row) => row.name,
  columns: ({ minimum, ...rest }) => ({ ...rest, minimum: withThousandths(minimum) }),
  read: async (tx, id) => {
    const [rows, lots] = await Promise.all([tx.sql<ConsumableRow>(READ, [tx.groupId, id]), lotsOf(tx, id)])
    const row = rows[0]
    return row && { ...rowOf(row), notes: row.notes, lots }
  },
  check: (tx, { placeId }, row) =>
    requireReference(tx, { to: 'place', id: placeId, pointer: '#/placeId', before: row?.placeId }),
}

/** "12" and "0.5" as the column returns them: "12.000", "0.500". Text all the way, so nothing is rounded. */
function withThousandths(decimal: string): string {
  const [whole = '0', fraction = ''] = decimal.split('.')
  return `${whole}.${fraction.padEnd(3, '0')}`
}

const SHORT: Condition = ['l.quantity < t.minimum']
const NOT_SHORT: Condition = ['l.quantity >= t.minimum']

export function listConsumables(ctx: AppContext, by: By, query: QueryOf<typeof listContract>) {
  return inGroup(ctx, by, async (tx) => {
    const { placeId, short } = query
    const shortage = short === undefined ? [] : [short ? SHORT : NOT_SHORT]
    const conditions = [...optional(['t.place_id = ?', placeId]), ...shortage]
    const { rows, total } = await listPage<ConsumableRow>(tx, LIST, { query, conditions })
    return { rows: rows.map(rowOf), total }
  })
}
