import type { RecallProposal } from '#shared/contracts/recall-shapes.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { loadBuildState } from '../builds/build-state.ts'
import type { BuiltCategory } from '../builds/sheet-rows.ts'
import { proposalsOf, recordOf } from '../builds/unit-answers.ts'

/** A test that shows how well a unit of a batch matches, unless it was corrected; nothing for all other tests. */
const SHEET_OF_TEST: Statement = {
  name: 'sheet-of-tested-unit',
  text: `SELECT s.id, s.category FROM test t JOIN item i ON i.id = t.item_id JOIN batch b ON b.id = i.batch_id
    JOIN build_sheet s ON s.id = b.build_sheet_id
    WHERE t.group_id = $1 AND t.id = $2
      AND t.procedure IN ('heat-test', 'pair-loss', 'open-short-load', 'antenna-sweep')
      AND NOT EXISTS (SELECT FROM test c WHERE c.supersedes_id = t.id)`,
}

/** What a failed or departing unit says about the others of its batch: the recalls that this test speaks for. */
export async function proposedRecalls(tx: GroupTx, testId: string): Promise<RecallProposal[]> {
  const [sheet] = await tx.sql<{ id: string; category: BuiltCategory }>(SHEET_OF_TEST, [tx.groupId, testId])
  if (!sheet) return []
  const state = await loadBuildState(tx, [sheet.id])
  return proposalsOf(state, recordOf(state, sheet)).filter(({ causes }) =>
    causes.some((cause) => cause.testId === testId),
  )
}
