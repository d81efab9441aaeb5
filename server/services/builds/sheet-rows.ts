import type { BUILT_CATEGORIES } from '#shared/contracts/item-details.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

export type BuiltCategory = (typeof BUILT_CATEGORIES)[number]

export interface SheetRow {
  [column: string]: unknown
  id: string
  name: string
  category: BuiltCategory
  bands: Band[] | null
  materials_cost: number | null
  currency: string | null
}

const SHEETS: Statement = {
  name: 'build-sheets-by-id',
  text: `SELECT id, name, category, details -> 'bands' AS bands, (winding ->> 'materialsCost')::float8 AS materials_cost,
      winding ->> 'currency' AS currency
    FROM build_sheet WHERE group_id = $1 AND id = ANY($2::uuid[]) ORDER BY lower(name), id`,
}

/** These build sheets of the group, retired ones too; 404 when one is not there. */
export async function readSheets(tx: GroupTx, ids: readonly string[]): Promise<SheetRow[]> {
  const rows = await tx.sql<SheetRow>(SHEETS, [tx.groupId, [...ids]])
  if (rows.length < ids.length) throw notFound('build sheet')
  return rows
}
