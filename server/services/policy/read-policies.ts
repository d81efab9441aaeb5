import type { z } from 'zod'
import type { policySummary, PolicyAnswer } from '#shared/contracts/policy.ts'
import { policyAt } from '#shared/engine/readiness/rules-in-force.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'

type Summary = z.output<typeof policySummary>

interface PolicyRow {
  [column: string]: unknown
  id: string
  number: number
  name: string
  effective_on: string
  reason: string
  settings: Record<string, unknown>
  created_at: Date
  created_by: string | null
  rule_count: number
}

const COLUMNS = `p.id, p.number, p.name, p.effective_on::text, p.reason, p.settings, p.created_at, m.name AS created_by,
  (SELECT count(*)::int FROM rule r WHERE r.policy_id = p.id) AS rule_count`
const FROM = 'FROM policy p LEFT JOIN member m ON m.id = p.created_by'

const LIST: Statement = {
  name: 'list-policies',
  text: `SELECT ${COLUMNS} ${FROM} WHERE p.group_id = $1 ORDER BY p.number DESC LIMIT $2 OFFSET $3`,
}
const READ: Statement = {
  name: 'read-policy',
  text: `SELECT ${COLUMNS} ${FROM} WHERE p.group_id = $1 AND p.id = $2`,
}
const RULES: Statement = {
  name: 'read-policy-rules',
  text: `SELECT id, category, procedure, applies, interval_months AS "intervalMonths", warning_days AS "warningDays",
      vital, limits, reason, source
    FROM rule WHERE policy_id = $1 ORDER BY category, procedure, id`,
}

export async function listPolicies(
  tx: GroupTx,
  { page, size }: { page: number; size: number },
): Promise<{ rows: Summary[]; total: number }> {
  const versions = await policiesOrFirst(tx)
  const inForce = policyAt({ policies: versions }, tx.now.getTime())
  const rows = await tx.sql<PolicyRow>(LIST, [tx.groupId, size, (page - 1) * size])
  return { rows: rows.map((row) => summaryOf(row, inForce?.id)), total: versions.length }
}

export async function readCurrentPolicy(tx: GroupTx): Promise<PolicyAnswer> {
  const inForce = policyAt({ policies: await policiesOrFirst(tx) }, tx.now.getTime())
  if (!inForce) throw notFound('policy')
  return readPolicy(tx, inForce.id)
}

export async function readPolicy(tx: GroupTx, policyId: string): Promise<PolicyAnswer> {
  const [[row], rules, versions] = await Promise.all([
    tx.sql<PolicyRow>(READ, [tx.groupId, policyId]),
    tx.sql<PolicyAnswer['rules'][number]>(RULES, [policyId]),
    policiesOrFirst(tx),
  ])
  if (!row) throw notFound('policy')
  const inForce = policyAt({ policies: versions }, tx.now.getTime())
  return { ...summaryOf(row, inForce?.id), settings: row.settings, rules }
}

function summaryOf(row: PolicyRow, inForceId: string | undefined): Summary {
  return {
    id: row.id,
    number: row.number,
    name: row.name,
    effectiveOn: row.effective_on,
    reason: row.reason,
    createdAt: row.created_at.toISOString(),
    createdBy: row.created_by ?? '',
    inForce: row.id === inForceId,
    ruleCount: row.rule_count,
  }
}
