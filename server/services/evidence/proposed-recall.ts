import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

interface RecallRow {
  [column: string]: unknown
  batch_id: string
  batch_name: string
  band: Band | null
  siblings: number
}

/** Siblings that nobody has asked to test since, and whose own newest heat test on that band is older. */
const PROPOSED: Statement = {
  name: 'proposed-recall',
  text: `SELECT b.id AS batch_id, b.name AS batch_name, t.inputs ->> 'band' AS band, count(s.id)::int AS siblings
    FROM test t JOIN item i ON i.id = t.item_id JOIN batch b ON b.id = i.batch_id
    JOIN item s ON s.batch_id = b.id AND s.id <> i.id AND s.retired_at IS NULL
    WHERE t.id = $1 AND t.procedure = 'heat-test' AND t.finding = 'fail'
      AND NOT EXISTS (SELECT FROM test c WHERE c.supersedes_id = t.id)
      AND NOT EXISTS (SELECT FROM raised_check r WHERE r.item_id = s.id AND r.procedure = 'heat-test'
        AND r.cause = 'recall' AND r.raised_at >= t.performed_at)
      AND NOT EXISTS (SELECT FROM test own WHERE own.item_id = s.id AND own.procedure = 'heat-test'
        AND own.inputs ->> 'band' = t.inputs ->> 'band' AND own.performed_at > t.performed_at)
    GROUP BY b.id, b.name, t.inputs ->> 'band'`,
}

/** A failed heat test of one unit of a batch says something about the others: what a recall would ask for. */
export async function proposedRecall(tx: GroupTx, testId: string): Promise<StoredTest['proposedRecall']> {
  const [row] = await tx.sql<RecallRow>(PROPOSED, [testId])
  if (!row) return null
  return { batchId: row.batch_id, batchName: row.batch_name, band: row.band, siblings: row.siblings }
}
