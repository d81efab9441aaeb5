import { v7 as uuidv7 } from 'uuid'
import { DEFAULT_POLICY } from '#shared/engine/policy/default-policy.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'
import { policiesOf, type PolicyVersion } from './policies.ts'
import { insertRules } from './policy-rules.ts'

// In force since the group exists: tests that were made before are judged by it too.
const FIRST: Statement = {
  name: 'insert-first-policy',
  text: `INSERT INTO policy (id, group_id, number, name, effective_on, reason, settings, created_at)
    SELECT $1, id, 1, $2, (created_at AT TIME ZONE time_zone)::date, $3, $4, $5 FROM groups WHERE id = $6
    ON CONFLICT (group_id, number) DO NOTHING RETURNING id`,
}

/** All versions, oldest first; a group without a policy gets the one that every group begins with. */
export async function policiesOrFirst(tx: GroupTx): Promise<readonly PolicyVersion[]> {
  const versions = await policiesOf(tx)
  if (versions.length > 0) return versions
  await createFirstPolicy(tx)
  return policiesOf(tx)
}

/** Two at once do no harm: the second finds the number taken. */
async function createFirstPolicy(tx: GroupTx): Promise<void> {
  const { name, reason, settings, rules } = DEFAULT_POLICY
  const values = [uuidv7(), name, reason, JSON.stringify(settings), tx.now, tx.groupId]
  const [created] = await tx.sql<{ id: string }>(FIRST, values)
  if (!created) return
  await insertRules(
    tx,
    created.id,
    rules.map((rule) => ({ id: uuidv7(), ...rule })),
  )
}
