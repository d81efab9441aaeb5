import type { z } from 'zod'
import type { raisedCheck } from '#shared/contracts/raised-checks.ts'
import type { Band, Procedure } from '#shared/engine/vocabulary.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

export type RaisedCheckAnswer = z.output<typeof raisedCheck>

export interface RaisedCheckRow {
  [column: string]: unknown
  id: string
  procedure: Procedure
  item_id: string | null
  kit_id: string | null
  designation: string
  band: Band | null
  cause: RaisedCheckAnswer['cause']
  reason: string
  doubts_earlier: boolean
  raised_at: Date
  due_on: string
  raised_by: string | null
  withdrawn_at: Date | null
}

export const RAISED_CHECK_SELECT = `SELECT r.id, r.procedure, r.item_id, r.kit_id,
    coalesce(i.designation, k.designation) AS designation, r.band, r.cause, r.reason, r.doubts_earlier, r.raised_at,
    r.due_on::text, m.name AS raised_by, r.withdrawn_at
  FROM raised_check r LEFT JOIN item i ON i.id = r.item_id LEFT JOIN kit k ON k.id = r.kit_id
  LEFT JOIN member m ON m.id = r.raised_by`

const READ: Statement = {
  name: 'read-raised-checks',
  text: `${RAISED_CHECK_SELECT} WHERE r.group_id = $1 AND r.id = ANY($2::uuid[])
    ORDER BY designation, r.id`,
}
const OPEN: Statement = {
  name: 'raised-checks-of-kit',
  text: `${RAISED_CHECK_SELECT} WHERE (r.kit_id = $1 OR i.kit_id = $1) AND r.withdrawn_at IS NULL
    ORDER BY r.due_on, designation, r.id`,
}

export async function readRaisedChecks(tx: GroupTx, ids: readonly string[]): Promise<RaisedCheckAnswer[]> {
  return (await tx.sql<RaisedCheckRow>(READ, [tx.groupId, [...ids]])).map(raisedCheckOf)
}

export async function readRaisedCheck(tx: GroupTx, id: string): Promise<RaisedCheckAnswer> {
  const [one] = await readRaisedChecks(tx, [id])
  if (!one) throw notFound('raised check')
  return one
}

/** Of a kit and of the items in it, answered ones too; withdrawn ones not. */
export async function raisedChecksOfKit(tx: GroupTx, kitId: string): Promise<RaisedCheckAnswer[]> {
  return (await tx.sql<RaisedCheckRow>(OPEN, [kitId])).map(raisedCheckOf)
}

function raisedCheckOf(row: RaisedCheckRow): RaisedCheckAnswer {
  return {
    id: row.id,
    procedure: row.procedure,
    itemId: row.item_id,
    kitId: row.kit_id,
    designation: row.designation,
    band: row.band,
    cause: row.cause,
    reason: row.reason,
    doubtsEarlier: row.doubts_earlier,
    raisedAt: row.raised_at.toISOString(),
    dueOn: row.due_on,
    raisedBy: row.raised_by ?? '',
    withdrawnAt: row.withdrawn_at?.toISOString() ?? null,
  }
}
