import type { RecordTestBody } from '#shared/contracts/record-test.ts'
import { dayText } from '#shared/engine/readiness/sentences.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import type { TestToInsert } from './insert-test.ts'

/**
 * What some tests change on the things themselves, in the same transaction: an inspection decides whether an item is
 * serviceable, a count which items are missing and which seal is on the lid. A test that is older than another of its
 * kind changes nothing any more.
 */
export async function applyConsequences(
  tx: GroupTx,
  { id, body, performedAt, performedOn }: TestToInsert,
): Promise<void> {
  if (!hasConsequences(body)) return
  const subjectId = 'kitId' in body ? body.kitId : body.itemId
  const [newer] = await tx.sql(NEWER, [subjectId, body.procedure, performedAt, id])
  if (newer) return
  if (body.procedure === 'inspection') await applyInspection(tx, body)
  else await applyCount(tx, body, performedOn)
}

export function hasConsequences(body: RecordTestBody): body is Inspection | Count {
  return body.procedure === 'inspection' || body.procedure === 'count'
}

const NEWER: Statement = {
  name: 'newer-test',
  text: `SELECT 1 FROM test t
    WHERE (t.item_id = $1 OR t.kit_id = $1) AND t.procedure = $2 AND t.performed_at > $3 AND t.id <> $4
      AND NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id)
    LIMIT 1`,
}

const SET_CONDITION: Statement = {
  name: 'set-condition',
  text: `UPDATE item SET condition = $2, condition_reason = $3, version = version + 1
    WHERE id = ANY($1::uuid[]) AND condition <> 'away' AND (condition, condition_reason) <> ($2, $3)`,
}

type Inspection = Extract<RecordTestBody, { procedure: 'inspection' }>

async function applyInspection(tx: GroupTx, { itemId, inputs }: Inspection): Promise<void> {
  const [condition, reason] = inputs.serviceable ? ['serviceable', ''] : ['unserviceable', inputs.found]
  await tx.sql(SET_CONDITION, [[itemId], condition, reason])
}

type Count = Extract<RecordTestBody, { procedure: 'count' }>

const SEAL: Statement = {
  name: 'seal-kit',
  text: 'UPDATE kit SET seal_number = $2, seal_matches = true, version = version + 1 WHERE id = $1',
}
const MISSING_ITEMS: Statement = {
  name: 'missing-items',
  text: `SELECT id, position_id FROM item WHERE kit_id = $1 AND condition = 'missing' AND retired_at IS NULL`,
}

async function applyCount(tx: GroupTx, { kitId, inputs }: Count, performedOn: string): Promise<void> {
  const missing = inputs.positions.flatMap(({ missingItemIds }) => missingItemIds)
  const complete = new Set(
    inputs.positions.filter((line) => line.missingItemIds.length === 0).map((line) => line.positionId),
  )
  const before = await tx.sql<{ id: string; position_id: string }>(MISSING_ITEMS, [kitId])
  const seen = before.filter((item) => complete.has(item.position_id) && !missing.includes(item.id))
  await Promise.all([
    tx.sql(SEAL, [kitId, inputs.sealApplied]),
    tx.sql(SET_CONDITION, [
      await inKit(tx, kitId, missing),
      'missing',
      `not seen at the count of ${dayText(performedOn)}`,
    ]),
    tx.sql(SET_CONDITION, [seen.map((item) => item.id), 'serviceable', '']),
  ])
}

const IN_KIT: Statement = {
  name: 'counted-items-in-kit',
  text: 'SELECT id FROM item WHERE id = ANY($1::uuid[]) AND kit_id = $2',
}

/** A phone may name an item that has been moved meanwhile: its new place decides, not this count. */
async function inKit(tx: GroupTx, kitId: string, itemIds: readonly string[]): Promise<string[]> {
  const rows = await tx.sql<{ id: string }>(IN_KIT, [itemIds, kitId])
  return rows.map((row) => row.id)
}
