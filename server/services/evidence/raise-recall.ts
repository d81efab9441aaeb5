import { v7 as uuidv7 } from 'uuid'
import type { RecallProcedure } from '#shared/engine/builds/matching.ts'
import { unitsToRecall } from '#shared/engine/builds/recall-units.ts'
import { canBeTested } from '#shared/engine/procedures/subjects.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { invalidField, notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { loadBuildState } from '../builds/build-state.ts'
import type { BuiltCategory } from '../builds/sheet-rows.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { insertRaisedCheck } from './raise-check.ts'
import { readRaisedChecks, type RaisedCheckAnswer } from './raised-check-rows.ts'

export interface Recall {
  readonly batchId: string
  readonly procedure: RecallProcedure
  /** Null: the whole unit. */
  readonly band: Band | null
  readonly reason: string
  /** Last day for the tests. */
  readonly dueOn: string
}

/** Locked, so that two people who recall at once raise nothing twice. */
const BATCH: Statement = {
  name: 'recalled-batch',
  text: `SELECT s.id AS sheet_id, s.category FROM batch b JOIN build_sheet s ON s.id = b.build_sheet_id
    WHERE b.group_id = $1 AND b.id = $2 FOR UPDATE OF b`,
}

/**
 * Recalls a batch: every unit in use gets a test to do, and what was found of it before on that band is in doubt until
 * then. Calling it twice raises nothing twice.
 */
export async function raiseRecall(tx: GroupTx, recall: Recall): Promise<RaisedCheckAnswer[]> {
  const { batchId, procedure, band, reason, dueOn } = recall
  const [batch] = await tx.sql<{ sheet_id: string; category: BuiltCategory }>(BATCH, [tx.groupId, batchId])
  if (!batch) throw notFound('batch')
  requireSubject(procedure, batch.category)
  const { moment, units } = await loadBuildState(tx, [batch.sheet_id])
  const own = units.filter((unit) => unit.batch?.id === batchId)
  const recalled = unitsToRecall(moment, own, { procedure, band })
  const ids = new Set(recalled.map(({ id }) => id))
  const raised: string[] = []
  for (const unit of own.filter(({ id }) => ids.has(id))) {
    const id = uuidv7()
    const subject = {
      type: 'item',
      id: unit.id,
      designation: unit.designation,
      kitId: unit.kit?.id ?? null,
    } as const
    const check = { procedure, cause: 'recall', doubtsEarlier: true, reason, dueOn } as const
    await insertRaisedCheck(tx, { id, subject, ...check, ...(band !== null && { band }) })
    raised.push(id)
  }
  await rewriteReadiness(
    tx,
    own.filter(({ id }) => ids.has(id)).flatMap(({ kit }) => kit?.id ?? []),
  )
  return readRaisedChecks(tx, raised)
}

function requireSubject(procedure: RecallProcedure, category: BuiltCategory): void {
  if (canBeTested(category, procedure)) return
  throw invalidField(
    '#/procedure',
    `That test is not made of ${category === 'antenna' ? 'an antenna' : 'a transformer'}.`,
  )
}
