import type { z } from 'zod'
import type { QueryOf } from '#shared/contracts/endpoint.ts'
import type {
  kitKindBody,
  kitKindRecord,
  kitKindRow,
  listKitKinds as listContract,
} from '#shared/contracts/kit-kinds.ts'
import type { KitPromise } from '#shared/engine/readiness/types.ts'
import type { AppContext } from '../../context.ts'
import { KitKind } from '../../entities/KitKind.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { lockKits } from '../lock-kits.ts'
import { listPage, type ListSource } from './list-page.ts'
import { lockRow } from './locks.ts'
import { positionsOf, writePositions } from './positions.ts'
import { refuseInUse } from './references.ts'
import type { By, Thing } from './thing.ts'
import { RECORD_COLUMNS, recordFieldsOf, type RecordColumns } from './values.ts'

type Body = z.output<typeof kitKindBody>
type Answer = z.input<typeof kitKindRecord>

const KITS = `(SELECT count(*)::int FROM kit k
    WHERE k.group_id = t.group_id AND k.kit_kind_id = t.id AND k.retired_at IS NULL)`
const POSITIONS = `(SELECT count(*)::int FROM position p WHERE p.kit_kind_id = t.id AND p.removed_at IS NULL)`
const COLUMNS = `t.id, t.code, t.name, t.station, t.promise, ${RECORD_COLUMNS}, ${KITS} AS kits,
  ${POSITIONS} AS positions,
  (SELECT coalesce(sum(p.quantity), 0)::int FROM position p
    WHERE p.kit_kind_id = t.id AND p.removed_at IS NULL) AS items`

interface KitKindRow extends RecordColumns {
  id: string
  code: string
  name: string
  station: boolean
  promise: KitPromise
  kits: number
  positions: number
  items: number
}

const LIST: ListSource = {
  columns: COLUMNS,
  from: 'kit_kind t',
  search: ['t.code', 't.name'],
  sorts: { code: 'lower(t.code)', name: 'lower(t.name)', kits: KITS, positions: POSITIONS },
}

const READ: Statement = {
  name: 'read-kit-kind',
  text: `SELECT ${COLUMNS} FROM kit_kind t WHERE t.group_id = $1 AND t.id = $2`,
}

function rowOf(row: KitKindRow): z.input<typeof kitKindRow> {
  return {
    id: row.id,
    code: row.code,
    name: row.name,
    station: row.station,
    promise: promiseOf(row.promise),
    positions: row.positions,
    items: row.items,
    kits: row.kits,
    ...recordFieldsOf(row),
  }
}

const promiseOf = (promise: KitPromise) => ({
  ...promise,
  bands: [...promise.bands],
  modes: [...promise.modes],
})

async function read(tx: GroupTx, id: string): Promise<Answer | undefined> {
  const [rows, positions] = await Promise.all([
    tx.sql<KitKindRow>(READ, [tx.groupId, id]),
    positionsOf(tx, id),
  ])
  const row = rows[0]
  return row && { ...rowOf(row), positions }
}

const KITS_OF: Statement = {
  name: 'kits-of-kind',
  text: 'SELECT id FROM kit WHERE group_id = $1 AND kit_kind_id = $2 AND retired_at IS NULL',
}

async function kitsOf(tx: GroupTx, kitKindId: string): Promise<string[]> {
  const rows = await tx.sql<{ id: string }>(KITS_OF, [tx.groupId, kitKindId])
  return rows.map((row) => row.id)
}

/** Its kits are locked with it, so that nothing moves into a position while it is being removed. */
async function lock(tx: GroupTx, id: string): Promise<KitKind | null> {
  const row = await lockRow(tx, KitKind, id)
  if (row) await lockKits(tx, await kitsOf(tx, id))
  return row
}

export const kitKind: Thing<KitKind, Body, Answer> = {
  entity: KitKind,
  subject: 'kit-kind',
  word: 'kit kind',
  nameOf: (row) => row.code,
  columns: ({ code, name, station, promise }) => ({ code, name, station, promise }),
  read,
  lock,
  writeParts: (tx, row, body) => writePositions(tx, row.id, body.positions),
  retire: async (tx, row) => {
    refuseInUse(
      row.code,
      { kit: (await kitsOf(tx, row.id)).length },
      'Give them another kind or retire them first.',
    )
    return {}
  },
  dependingKits: (tx, row) => kitsOf(tx, row.id),
}

export function listKitKinds(ctx: AppContext, by: By, query: QueryOf<typeof listContract>) {
  return inGroup(ctx, by, async (tx) => {
    const { rows, total } = await listPage<KitKindRow>(tx, LIST, { query, conditions: [] })
    return { rows: rows.map(rowOf), total }
  })
}
