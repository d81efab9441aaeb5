import type { z } from 'zod'
import type { batchBody, batchRecord, listBatches as listContract } from '#shared/contracts/batches.ts'
import type { QueryOf } from '#shared/contracts/endpoint.ts'
import type { AppContext } from '../../context.ts'
import { Batch } from '../../entities/Batch.ts'
import { AppError } from '../../errors.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { listPage, optional, type ListSource } from './list-page.ts'
import { requireReference } from './references.ts'
import type { By, Thing } from './thing.ts'
import { namedOf, RECORD_COLUMNS, recordFieldsOf, type RecordColumns } from './values.ts'

type Body = z.output<typeof batchBody>
type Answer = z.input<typeof batchRecord>

const ITEMS = `(SELECT count(*)::int FROM item i
    WHERE i.group_id = t.group_id AND i.batch_id = t.id AND i.retired_at IS NULL)`
const COLUMNS = `t.id, t.name, t.core_lot, t.built_on::text, t.notes, t.build_sheet_id, s.name AS build_sheet_name,
  t.builder_id, m.name AS builder_name, ${RECORD_COLUMNS}, ${ITEMS} AS items`
const FROM = 'batch t JOIN build_sheet s ON s.id = t.build_sheet_id LEFT JOIN member m ON m.id = t.builder_id'

interface BatchRow extends RecordColumns {
  id: string
  name: string
  core_lot: string
  built_on: string | null
  notes: string
  build_sheet_id: string
  build_sheet_name: string
  builder_id: string | null
  builder_name: string | null
  items: number
}

const LIST: ListSource = {
  columns: COLUMNS,
  from: FROM,
  search: ['t.name', 't.core_lot', 's.name', 't.notes'],
  sorts: {
    name: 'lower(t.name)',
    buildSheet: 'lower(s.name)',
    coreLot: 'lower(t.core_lot)',
    builtOn: 't.built_on',
    items: ITEMS,
  },
}

const READ: Statement = {
  name: 'read-batch',
  text: `SELECT ${COLUMNS} FROM ${FROM} WHERE t.group_id = $1 AND t.id = $2`,
}

function batchOf(row: BatchRow): Answer {
  return {
    id: row.id,
    name: row.name,
    buildSheet: { id: row.build_sheet_id, name: row.build_sheet_name },
    coreLot: row.core_lot,
    builtOn: row.built_on,
    builder: namedOf(row.builder_id, row.builder_name),
    notes: row.notes,
    items: row.items,
    ...recordFieldsOf(row),
  }
}

async function check(tx: GroupTx, body: Body, row: Batch | null): Promise<void> {
  const { buildSheetId, builderId } = body
  const pointer = '#/buildSheetId'
  await requireReference(tx, { to: 'build-sheet', id: buildSheetId, pointer, before: row?.buildSheetId })
  await requireReference(tx, { to: 'member', id: builderId, pointer: '#/builderId', before: row?.builderId })
  if (row && row.buildSheetId !== buildSheetId && (await tx.sql(ANY_ITEM, [tx.groupId, row.id])).length > 0) {
    throw new AppError(
      'state-conflict',
      `${row.name} has units made by the present build sheet: it keeps it.`,
    )
  }
}

const ANY_ITEM: Statement = {
  name: 'any-item-of-batch',
  text: 'SELECT 1 FROM item WHERE group_id = $1 AND batch_id = $2 LIMIT 1',
}

export const batch: Thing<Batch, Body, Answer> = {
  entity: Batch,
  subject: 'batch',
  word: 'batch',
  nameOf: (row) => row.name,
  columns: (body) => ({ ...body }),
  read: async (tx, id) => {
    const [row] = await tx.sql<BatchRow>(READ, [tx.groupId, id])
    return row && batchOf(row)
  },
  check,
}

export function listBatches(ctx: AppContext, by: By, query: QueryOf<typeof listContract>) {
  return inGroup(ctx, by, async (tx) => {
    const conditions = optional(['t.build_sheet_id = ?', query.buildSheetId])
    const { rows, total } = await listPage<BatchRow>(tx, LIST, { query, conditions })
    return { rows: rows.map(batchOf), total }
  })
}
