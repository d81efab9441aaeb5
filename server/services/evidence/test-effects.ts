import { effectSentences } from '#shared/engine/readiness/effect-sentences.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import type { KitChange } from '../rewrite-readiness.ts'

const INSERT: Statement = {
  name: 'insert-test-effects',
  text: `INSERT INTO test_effect (test_id, group_id, kit_id, verdict_before, verdict_after, sentences)
    SELECT $2, $3, e.kit, e.before, e.after, e.sentences
    FROM jsonb_to_recordset($1::jsonb) AS e (kit uuid, before text, after text, sentences jsonb)`,
}

/** Keeps what a test did to each kit, so that a resend gets the same answer. */
export async function insertEffects(
  tx: GroupTx,
  testId: string,
  changes: readonly KitChange[],
): Promise<void> {
  if (changes.length === 0) return
  const effects = changes.map(({ kitId, designation, before, after }) => ({
    kit: kitId,
    before: before?.verdict ?? null,
    after: after.verdict,
    sentences: effectSentences(designation, before, after),
  }))
  await tx.sql(INSERT, [JSON.stringify(effects), testId, tx.groupId])
}
