import type { QueryOf } from '#shared/contracts/endpoint.ts'
import type { listKits as contract } from '#shared/contracts/kits.ts'
import type { AppContext } from '../../context.ts'
import { inGroup } from '../../group-transaction.ts'
import {
  KIT_COLUMNS,
  KIT_HOLDS_UNTIL,
  KIT_TABLES,
  KIT_VERDICT,
  kitFieldsOf,
  type KitColumns,
} from './kit-columns.ts'
import { listPage, optional, type ListSource } from './list-page.ts'
import type { By } from './thing.ts'

const LIST: ListSource = {
  columns: `${KIT_COLUMNS},
    (SELECT count(*)::int FROM item i WHERE i.group_id = t.group_id AND i.kit_id = t.id) AS items,
    (SELECT coalesce(sum(q.quantity), 0)::int FROM position q
      WHERE q.group_id = t.group_id AND q.kit_kind_id = t.kit_kind_id AND q.removed_at IS NULL) AS items_planned`,
  from: KIT_TABLES,
  search: ['t.designation', 't.tag', 'kk.name', 't.seal_number'],
  tag: 't.tag',
  sorts: {
    designation: 'lower(t.designation)',
    tag: 't.tag',
    kind: 'lower(kk.code)',
    place: 'lower(p.name)',
    availability: 't.availability',
    verdict: 'b.verdict_rank',
    holdsUntil: KIT_HOLDS_UNTIL,
  },
}

interface Row extends KitColumns {
  items: number
  items_planned: number
}

/** Kits, a page at a time, with the verdict of this moment. */
export function listKits(ctx: AppContext, by: By, query: QueryOf<typeof contract>) {
  return inGroup(ctx, by, async (tx) => {
    const conditions = optional(
      ['t.kit_kind_id = ?', query.kitKindId],
      ['t.place_id = ?', query.placeId],
      ['t.availability = ?', query.availability],
      [`${KIT_VERDICT} = ?`, query.verdict],
    )
    const { rows, total } = await listPage<Row>(tx, LIST, { query, conditions })
    return {
      rows: rows.map((row) => ({ ...kitFieldsOf(row), items: row.items, itemsPlanned: row.items_planned })),
      total,
    }
  })
}
