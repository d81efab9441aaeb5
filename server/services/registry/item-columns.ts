import type { z } from 'zod'
import type { itemRow } from '#shared/contracts/items.ts'
import type { Accountability, Category, Condition } from '#shared/engine/vocabulary.ts'
import { designatedOf, namedOf, RECORD_COLUMNS, recordFieldsOf, type RecordColumns } from './values.ts'

export const ITEM_COLUMNS = `t.id, t.tag, t.designation, t.category, t.maker, t.model, t.serial, t.accountability,
  t.condition, t.condition_reason, t.acquired_on::text, t.kit_id, k.designation AS kit_designation,
  t.position_id, q.name AS position_name, t.place_id, p.name AS place_name, t.owner_id, m.name AS owner_name,
  t.batch_id, b.name AS batch_name, s.id AS build_sheet_id, s.name AS build_sheet_name, ${RECORD_COLUMNS}`

/** An item's build sheet is its own or its batch's. */
export const ITEM_TABLES = `item t LEFT JOIN kit k ON k.id = t.kit_id LEFT JOIN position q ON q.id = t.position_id
  LEFT JOIN place p ON p.id = t.place_id LEFT JOIN member m ON m.id = t.owner_id
  LEFT JOIN batch b ON b.id = t.batch_id
  LEFT JOIN build_sheet s ON s.id = coalesce(t.build_sheet_id, b.build_sheet_id)`

export interface ItemColumns extends RecordColumns {
  id: string
  tag: string
  designation: string
  category: Category
  maker: string
  model: string
  serial: string | null
  accountability: Accountability
  condition: Condition
  condition_reason: string
  acquired_on: string | null
  kit_id: string | null
  kit_designation: string | null
  position_id: string | null
  position_name: string | null
  place_id: string | null
  place_name: string | null
  owner_id: string | null
  owner_name: string | null
  batch_id: string | null
  batch_name: string | null
  build_sheet_id: string | null
  build_sheet_name: string | null
}

export function itemRowOf(row: ItemColumns): z.input<typeof itemRow> {
  return {
    id: row.id,
    tag: row.tag,
    designation: row.designation,
    category: row.category,
    maker: row.maker,
    model: row.model,
    serial: row.serial,
    accountability: row.accountability,
    condition: row.condition,
    conditionReason: row.condition_reason,
    kit: designatedOf(row.kit_id, row.kit_designation),
    position: namedOf(row.position_id, row.position_name),
    place: namedOf(row.place_id, row.place_name),
    owner: namedOf(row.owner_id, row.owner_name),
    batch: namedOf(row.batch_id, row.batch_name),
    buildSheet: namedOf(row.build_sheet_id, row.build_sheet_name),
    acquiredOn: row.acquired_on,
    ...recordFieldsOf(row),
  }
}
