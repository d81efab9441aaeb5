import type { z } from 'zod'
import type { readBatchRecalls as contract } from '#shared/contracts/build-figures.ts'
import type { BatchRecall } from '#shared/contracts/recall-shapes.ts'
import { RECALL_PROCEDURES } from '#shared/engine/builds/matching.ts'
import { batchRecalls } from '#shared/engine/builds/recalls.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { loadBuildState, type BuildState } from './build-state.ts'
import type { BuiltCategory } from './sheet-rows.ts'
import { batchUnitsOf, proposalsOf, recordOf } from './unit-answers.ts'

type Answer = z.output<typeof contract.response>

const SHEET_OF_BATCH: Statement = {
  name: 'sheet-of-batch',
  text: `SELECT s.id, s.category FROM batch b JOIN build_sheet s ON s.id = b.build_sheet_id
    WHERE b.group_id = $1 AND b.id = $2`,
}

/** A batch's recalls and proposals. Its units are held against all units of their build sheet. */
export async function readBatchRecalls(tx: GroupTx, batchId: string): Promise<Answer> {
  const [sheet] = await tx.sql<{ id: string; category: BuiltCategory }>(SHEET_OF_BATCH, [tx.groupId, batchId])
  if (!sheet) throw notFound('batch')
  const state = await loadBuildState(tx, [sheet.id])
  const proposals = proposalsOf(state, recordOf(state, sheet))
  return {
    recalls: recallsOf(state, batchId),
    proposals: proposals.filter(({ batch }) => batch.id === batchId),
  }
}

function recallsOf({ moment, units, recalls }: BuildState, batchId: string): BatchRecall[] {
  const own = units.filter(({ batch }) => batch?.id === batchId)
  const unitOf = new Map(own.map((unit) => [unit.id, unit]))
  const checks = recalls.filter(({ subjectId }) => unitOf.has(subjectId))
  return batchRecalls(moment, { units: own, checks }).flatMap((recall) => {
    // A check that somebody raised by hand for another procedure names itself a recall, but is of one unit only.
    const procedure = RECALL_PROCEDURES.find((one) => one === recall.procedure)
    if (!procedure) return []
    const raised = checks.find(
      ({ raisedAt, reason }) => raisedAt === recall.raisedAt && reason === recall.reason,
    )
    return [
      {
        ...recall,
        procedure,
        raisedAt: new Date(recall.raisedAt).toISOString(),
        raisedBy: raised?.raisedBy ?? '',
        units: recall.units.flatMap(({ unitId, state, testId, finding }) =>
          batchUnitsOf(unitOf, unitId).map((unit) => ({ ...unit, state, testId, finding })),
        ),
      },
    ]
  })
}
