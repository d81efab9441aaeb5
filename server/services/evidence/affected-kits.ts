import type { Procedure } from '#shared/engine/vocabulary.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import type { TestSubject } from './test-subject.ts'

const MEASURED_WITH: Statement = {
  name: 'kits-measured-with',
  text: `SELECT DISTINCT coalesce(i.kit_id, t.kit_id) AS kit_id
    FROM test t LEFT JOIN item i ON i.id = t.item_id
    WHERE t.instrument_id = $1 AND coalesce(i.kit_id, t.kit_id) IS NOT NULL`,
}

/** Kits whose verdict a test can change: its own, and for a calibration or a session check all with results by that instrument. */
export async function affectedKits(
  tx: GroupTx,
  subject: Pick<TestSubject, 'id' | 'kitId'>,
  procedure: Procedure,
): Promise<string[]> {
  const own = subject.kitId === null ? [] : [subject.kitId]
  if (procedure !== 'calibration' && procedure !== 'session-check') return own
  const rows = await tx.sql<{ kit_id: string }>(MEASURED_WITH, [subject.id])
  return [...new Set([...own, ...rows.map((row) => row.kit_id)])]
}
