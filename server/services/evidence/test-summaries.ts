import type { TestSummary } from '#shared/contracts/test-shapes.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { summaryOf, SUMMARY_COLUMNS, SUMMARY_JOINS, type SummaryRow } from './test-rows.ts'

const SUMMARIES: Statement = {
  name: 'test-summaries',
  text: `SELECT ${SUMMARY_COLUMNS} FROM test t ${SUMMARY_JOINS} WHERE t.id = ANY($1::uuid[])
    ORDER BY t.performed_at DESC, t.id DESC`,
}

/** Newest first; ids that are not in the group are left out. */
export async function summariesOf(tx: GroupTx, ids: readonly string[]): Promise<TestSummary[]> {
  if (ids.length === 0) return []
  return (await tx.sql<SummaryRow>(SUMMARIES, [[...ids]])).map(summaryOf)
}
