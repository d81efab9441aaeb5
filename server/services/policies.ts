import { startOfDayUtc } from '#shared/engine/local-day.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { groupBy } from '#shared/engine/group-by.ts'
import type { Policy, PolicySettings, Rule } from '#shared/engine/readiness/types.ts'
import type { GroupTx, Statement } from '../group-transaction.ts'

/** A version of the policy with what people call it by. */
export interface PolicyVersion extends Policy {
  readonly number: number
  readonly createdAt: Date
}

interface PolicyRow {
  id: string
  number: number
  name: string
  effective_on: string
  settings: PolicySettings
  created_at: Date
}

interface RuleRow {
  id: string
  policy_id: string
  category: Rule['category']
  procedure: Rule['procedure']
  interval_months: number | null
  warning_days: number
  vital: boolean
  applies: Rule['applies']
  limits: Rule['limits']
}

const NEWEST: Statement = {
  name: 'newest-policy',
  text: 'SELECT id, created_at FROM policy WHERE group_id = $1 ORDER BY number DESC LIMIT 1',
}
const POLICIES: Statement = {
  name: 'policies',
  text: `SELECT id, number, name, effective_on::text, settings, created_at FROM policy
    WHERE group_id = $1 ORDER BY number`,
}
const RULES: Statement = {
  name: 'rules',
  text: `SELECT id, policy_id, category, procedure, interval_months, warning_days, vital, applies, limits FROM rule
    WHERE group_id = $1 ORDER BY id`,
}

/**
 * Versions are never changed, so what was read stays true until there is a newer one. Kept by group; a version made
 * in the transaction at hand is not kept, because that transaction may still fail.
 */
const kept = new Map<string, { newestId: string; zone: string; versions: readonly PolicyVersion[] }>()
const KEPT_GROUPS = 200

/** All versions of the group's policy, oldest first; empty for a group without one. */
export async function policiesOf(tx: GroupTx): Promise<readonly PolicyVersion[]> {
  const [[newest], zone] = await Promise.all([
    tx.sql<{ id: string; created_at: Date }>(NEWEST, [tx.groupId]),
    tx.zone(),
  ])
  if (!newest) return []
  const known = kept.get(tx.groupId)
  if (known?.newestId === newest.id && known.zone === zone) return known.versions
  const versions = await readPolicies(tx, zone)
  if (newest.created_at < tx.now) keep(tx.groupId, { newestId: newest.id, zone, versions })
  return versions
}

function keep(
  groupId: string,
  entry: { newestId: string; zone: string; versions: readonly PolicyVersion[] },
) {
  const [oldest] = kept.keys()
  if (kept.size >= KEPT_GROUPS && oldest !== undefined) kept.delete(oldest)
  kept.set(groupId, entry)
}

async function readPolicies(tx: GroupTx, zone: string): Promise<PolicyVersion[]> {
  const [policies, rules] = await Promise.all([
    tx.sql<PolicyRow & Record<string, unknown>>(POLICIES, [tx.groupId]),
    tx.sql<RuleRow & Record<string, unknown>>(RULES, [tx.groupId]),
  ])
  const byPolicy = groupBy(rules, (rule) => rule.policy_id)
  return policies.map((row) => ({
    id: row.id,
    number: row.number,
    name: row.name,
    createdAt: row.created_at,
    effectiveFrom: localMidnight(row.effective_on, zone),
    settings: row.settings,
    rules: (byPolicy.get(row.id) ?? []).map(ruleOf),
  }))
}

function ruleOf(row: RuleRow): Rule {
  return {
    id: row.id,
    category: row.category,
    procedure: row.procedure,
    intervalMonths: row.interval_months,
    warningDays: row.warning_days,
    vital: row.vital,
    applies: row.applies,
    limits: row.limits,
  }
}

function localMidnight(day: string, zone: string): number {
  const at = startOfDayUtc(day, zone)
  if (isFailure(at)) throw new Error(at.message)
  return at
}
