import type { QueryOf } from '#shared/contracts/endpoint.ts'
import type { listItems as contract } from '#shared/contracts/items.ts'
import type { AppContext } from '../../context.ts'
import { inGroup } from '../../group-transaction.ts'
import { ITEM_COLUMNS, ITEM_TABLES, itemRowOf, type ItemColumns } from './item-columns.ts'
import { listPage, optional, type Condition, type ListSource } from './list-page.ts'
import type { By } from './thing.ts'

const LIST: ListSource = {
  columns: ITEM_COLUMNS,
  from: ITEM_TABLES,
  search: ['t.designation', 't.tag', 't.maker', 't.model', 't.serial'],
  tag: 't.tag',
  sorts: {
    designation: 'lower(t.designation)',
    tag: 't.tag',
    category: 't.category',
    maker: 'lower(t.maker)',
    model: 'lower(t.model)',
    serial: 'lower(t.serial)',
    kit: 'lower(k.designation)',
    place: 'lower(p.name)',
    condition: 't.condition',
    acquiredOn: 't.acquired_on',
  },
}

const HELD: Readonly<Record<'kit' | 'loose', Condition>> = {
  kit: ['t.kit_id IS NOT NULL'],
  loose: ['t.kit_id IS NULL'],
}

/** Items, a page at a time. */
export function listItems(ctx: AppContext, by: By, query: QueryOf<typeof contract>) {
  return inGroup(ctx, by, async (tx) => {
    const conditions = optional(
      ['t.category = ?', query.category],
      ['t.condition = ?', query.condition],
      ['t.kit_id = ?', query.kitId],
      ['k.kit_kind_id = ?', query.kitKindId],
      ['coalesce(t.place_id, k.place_id) = ?', query.placeId],
      ['t.batch_id = ?', query.batchId],
      ['s.id = ?', query.buildSheetId],
    )
    if (query.held) conditions.push(HELD[query.held])
    const { rows, total } = await listPage<ItemColumns>(tx, LIST, { query, conditions })
    return { rows: rows.map(itemRowOf), total }
  })
}
