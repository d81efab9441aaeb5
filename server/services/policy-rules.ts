import type { NewRule } from '#shared/engine/policy/default-policy.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'

const INSERT: Statement = {
  name: 'insert-rules',
  text: `INSERT INTO rule (id, group_id, policy_id, category, procedure, applies, interval_months, warning_days, vital,
      limits, reason, source)
    SELECT r.id, $2, $3, r.category, r.procedure, r.applies, r."intervalMonths", r."warningDays", r.vital, r.limits,
      r.reason, r.source
    FROM jsonb_to_recordset($1::jsonb) AS r (id uuid, category text, procedure text, applies jsonb,
      "intervalMonths" int, "warningDays" int, vital boolean, limits jsonb, reason text, source text)`,
}

export async function insertRules(
  tx: GroupTx,
  policyId: string,
  rules: readonly (NewRule & { id: string })[],
): Promise<void> {
  await tx.sql(INSERT, [JSON.stringify(rules), tx.groupId, policyId])
}
