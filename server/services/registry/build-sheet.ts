import type { z } from 'zod'
import type {
  buildSheetBody,
  buildSheetRecord,
  listBuildSheets as listContract,
} from '#shared/contracts/build-sheets.ts'
import type { QueryOf } from '#shared/contracts/endpoint.ts'
import type { AppContext } from '../../context.ts'
import { BuildSheet } from '../../entities/BuildSheet.ts'
import { invalidField } from '../../errors.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import { listPage, optional, type ListSource } from './list-page.ts'
import type { By, Thing } from './thing.ts'
import { RECORD_COLUMNS, recordFieldsOf, type RecordColumns } from './values.ts'

type Body = z.output<typeof buildSheetBody>
type Answer = z.input<typeof buildSheetRecord>

const BATCHES = `(SELECT count(*)::int FROM batch b
    WHERE b.group_id = t.group_id AND b.build_sheet_id = t.id AND b.retired_at IS NULL)`
const ITEMS = `(SELECT count(*)::int FROM item i LEFT JOIN batch b ON b.id = i.batch_id
    WHERE i.group_id = t.group_id AND coalesce(i.build_sheet_id, b.build_sheet_id) = t.id
      AND i.retired_at IS NULL)`
const COLUMNS = `t.id, t.name, t.category, t.details, t.winding, t.notes, ${RECORD_COLUMNS},
  ${BATCHES} AS batches, ${ITEMS} AS items`

interface BuildSheetRow extends RecordColumns {
  id: string
  name: string
  category: Answer['category']
  details: object
  winding: Answer['winding']
  notes: string
  batches: number
  items: number
}

const LIST: ListSource = {
  columns: COLUMNS,
  from: 'build_sheet t',
  search: ['t.name', 't.notes'],
  sorts: { name: 'lower(t.name)', category: 't.category', batches: BATCHES, items: ITEMS },
}

const READ: Statement = {
  name: 'read-build-sheet',
  text: `SELECT ${COLUMNS} FROM build_sheet t WHERE t.group_id = $1 AND t.id = $2`,
}

function buildSheetOf(row: BuildSheetRow): Answer {
  return {
    id: row.id,
    name: row.name,
    category: row.category,
    details: { ...row.details, category: row.category },
    winding: row.winding,
    notes: row.notes,
    batches: row.batches,
    items: row.items,
    ...recordFieldsOf(row),
  }
}

export const buildSheet: Thing<BuildSheet, Body, Answer> = {
  entity: BuildSheet,
  subject: 'build-sheet',
  word: 'build sheet',
  nameOf: (row) => row.name,
  columns: ({ name, notes, winding, details: { category, ...details } }) => ({
    name,
    notes,
    winding,
    category,
    details,
  }),
  read: async (tx, id) => {
    const [row] = await tx.sql<BuildSheetRow>(READ, [tx.groupId, id])
    return row && buildSheetOf(row)
  },
  check: async (_tx, body, row) => {
    if (row && row.category !== body.details.category) {
      throw invalidField('#/details/category', 'A build sheet keeps its category. Add another sheet instead.')
    }
  },
}

export function listBuildSheets(ctx: AppContext, by: By, query: QueryOf<typeof listContract>) {
  return inGroup(ctx, by, async (tx) => {
    const conditions = optional(['t.category = ?', query.category])
    const { rows, total } = await listPage<BuildSheetRow>(tx, LIST, { query, conditions })
    return { rows: rows.map(buildSheetOf), total }
  })
}
