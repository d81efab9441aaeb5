import type { z } from 'zod'
import type { listPlaces as listContract, placeBody, placeRecord } from '#shared/contracts/places.ts'
import type { QueryOf } from '#shared/contracts/endpoint.ts'
import type { AppContext } from '../../context.ts'
import { Place } from '../../entities/Place.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { listPage, type ListSource } from './list-page.ts'
import { refuseInUse } from './references.ts'
import type { By, Thing } from './thing.ts'
import { numeric, number, RECORD_COLUMNS, recordFieldsOf, type RecordColumns } from './values.ts'

type Body = z.output<typeof placeBody>
type Answer = z.input<typeof placeRecord>

const KITS = `(SELECT count(*)::int FROM kit k
    WHERE k.group_id = t.group_id AND k.place_id = t.id AND k.retired_at IS NULL)`
const ITEMS = `(SELECT count(*)::int FROM item i
    WHERE i.group_id = t.group_id AND i.place_id = t.id AND i.retired_at IS NULL)`
const COLUMNS = `t.id, t.name, t.kind, t.min_c, t.max_c, t.access, t.key_holders, ${RECORD_COLUMNS},
  ${KITS} AS kits, ${ITEMS} AS items`

interface PlaceRow extends RecordColumns {
  id: string
  name: string
  kind: string
  min_c: string | null
  max_c: string | null
  access: string
  key_holders: string
  kits: number
  items: number
}

const LIST: ListSource = {
  columns: COLUMNS,
  from: 'place t',
  search: ['t.name', 't.kind', 't.access', 't.key_holders'],
  sorts: { name: 'lower(t.name)', kind: 'lower(t.kind)', kits: KITS, items: ITEMS },
}

const READ: Statement = {
  name: 'read-place',
  text: `SELECT ${COLUMNS} FROM place t WHERE t.group_id = $1 AND t.id = $2`,
}

function placeOf(row: PlaceRow): Answer {
  return {
    id: row.id,
    name: row.name,
    kind: row.kind,
    minC: number(row.min_c),
    maxC: number(row.max_c),
    access: row.access,
    keyHolders: row.key_holders,
    kits: row.kits,
    items: row.items,
    ...recordFieldsOf(row),
  }
}

export const place: Thing<Place, Body, Answer> = {
  entity: Place,
  subject: 'place',
  word: 'place',
  nameOf: (row) => row.name,
  columns: ({ minC, maxC, ...rest }) => ({ ...rest, minC: numeric(minC, 1), maxC: numeric(maxC, 1) }),
  read: async (tx, id) => {
    const [row] = await tx.sql<PlaceRow>(READ, [tx.groupId, id])
    return row && placeOf(row)
  },
  // The board names it.
  dependingKits: async (tx, row) =>
    (await tx.sql<{ id: string }>(KITS_OF_PLACE, [tx.groupId, row.id])).map(({ id }) => id),
  retire: async (tx, row) => {
    refuseInUse(row.name, await usesOf(tx, row.id), 'Move them elsewhere first.')
    return {}
  },
}

const KITS_OF_PLACE: Statement = {
  name: 'kits-of-place',
  text: `SELECT id FROM kit WHERE group_id = $1 AND retired_at IS NULL AND $2 IN (place_id, home_place_id) ORDER BY id`,
}

const USES: Statement = {
  name: 'uses-of-place',
  text: `SELECT
    (SELECT count(*)::int FROM kit WHERE group_id = $1 AND retired_at IS NULL AND $2 IN (place_id, home_place_id)) AS kit,
    (SELECT count(*)::int FROM item WHERE group_id = $1 AND retired_at IS NULL AND place_id = $2) AS item,
    (SELECT count(*)::int FROM consumable WHERE group_id = $1 AND retired_at IS NULL AND place_id = $2) AS consumable`,
}

async function usesOf(tx: GroupTx, id: string): Promise<Record<string, number>> {
  const [row] = await tx.sql<Record<string, number>>(USES, [tx.groupId, id])
  return row ?? {}
}

export function listPlaces(ctx: AppContext, by: By, query: QueryOf<typeof listContract>) {
  return inGroup(ctx, by, async (tx) => {
    const { rows, total } = await listPage<PlaceRow>(tx, LIST, { query, conditions: [] })
    return { rows: rows.map(placeOf), total }
  })
}
