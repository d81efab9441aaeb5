import { v7 as uuidv7 } from 'uuid'
import type { Band } from '#shared/engine/vocabulary.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { insertRaisedCheck } from './raise-check.ts'
import { readRaisedChecks, type RaisedCheckAnswer } from './raised-check-rows.ts'
import { readItemSubject } from './test-subject.ts'

export interface Recall {
  readonly batchId: string
  /** Null: the whole unit. */
  readonly band: Band | null
  readonly reason: string
  /** Last day for the tests. */
  readonly dueOn: string
}

const BATCH: Statement = { name: 'recalled-batch', text: 'SELECT id FROM batch WHERE id = $1' }

/**
 * Units that work, were not asked already, and are not known to fail on that band themselves: a failure stands until a
 * later test at the same power or more passes; one that passes at less power only says what is left.
 */
const UNITS: Statement = {
  name: 'units-to-recall',
  text: `WITH heat AS (
      SELECT t.item_id, t.performed_at, t.finding, t.inputs ->> 'band' AS band, (t.inputs ->> 'powerW')::numeric AS watts
      FROM item i JOIN test t ON t.item_id = i.id AND t.procedure = 'heat-test'
      WHERE i.batch_id = $1 AND ($2::text IS NULL OR t.inputs ->> 'band' = $2)
        AND NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id))
    SELECT i.id FROM item i
    WHERE i.batch_id = $1 AND i.retired_at IS NULL AND i.condition <> 'unserviceable'
      AND NOT EXISTS (SELECT FROM raised_check r WHERE r.item_id = i.id AND r.procedure = 'heat-test'
        AND r.cause = 'recall' AND r.band IS NOT DISTINCT FROM $2 AND r.withdrawn_at IS NULL
        AND NOT EXISTS (SELECT FROM heat a WHERE a.item_id = i.id AND a.performed_at > r.raised_at))
      AND NOT EXISTS (SELECT FROM heat f WHERE f.item_id = i.id AND f.finding = 'fail'
        AND NOT EXISTS (SELECT FROM heat p WHERE p.item_id = i.id AND p.finding <> 'fail' AND p.band = f.band
          AND p.performed_at > f.performed_at AND p.watts >= f.watts))
    ORDER BY i.designation, i.id`,
}

/**
 * Recalls a batch: every unit in use gets a heat test to do, and what was found of it before on that band is in doubt
 * until then. Calling it twice raises nothing twice.
 */
export async function raiseRecall(
  tx: GroupTx,
  { batchId, band, reason, dueOn }: Recall,
): Promise<RaisedCheckAnswer[]> {
  const [batch] = await tx.sql(BATCH, [batchId])
  if (!batch) throw notFound('batch')
  const units = await tx.sql<{ id: string }>(UNITS, [batchId, band])
  const raised: { id: string; kitId: string | null }[] = []
  for (const unit of units) {
    const id = uuidv7()
    const subject = await readItemSubject(tx, unit.id)
    const check = { procedure: 'heat-test', cause: 'recall', doubtsEarlier: true, reason, dueOn } as const
    await insertRaisedCheck(tx, { id, subject, ...check, ...(band !== null && { band }) })
    raised.push({ id, kitId: subject.kitId })
  }
  await rewriteReadiness(
    tx,
    raised.flatMap(({ kitId }) => kitId ?? []),
  )
  return readRaisedChecks(
    tx,
    raised.map(({ id }) => id),
  )
}
