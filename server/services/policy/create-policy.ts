import type { CreatePolicyBody, PolicyAnswer } from '#shared/contracts/policy.ts'
import { dayText } from '#shared/engine/readiness/sentences.ts'
import { AppError, invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { createdBefore } from '../created-before.ts'
import { kitsInUse } from '../kits-in-use.ts'
import { insertRules } from '../policy-rules.ts'
import { namingDuplicates } from '../registry/duplicates.ts'
import { lockNewId } from '../registry/locks.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { readPolicy } from './read-policies.ts'

// Versions follow one another: two made at once wait here and the second takes the next number.
const LAST: Statement = {
  name: 'last-policy',
  text: `SELECT number, effective_on::text FROM policy WHERE group_id = $1 ORDER BY number DESC LIMIT 1`,
}
const INSERT: Statement = {
  name: 'insert-policy',
  text: `INSERT INTO policy (id, group_id, number, name, effective_on, reason, settings, created_by, created_at)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9)`,
}
/**
 * Puts a new version into force from its day on and rewrites every kit's periods. A version is never edited, and none
 * may take effect before today or before the one that it follows: what was judged stays judged.
 */
export async function createPolicy(
  tx: GroupTx,
  { policyId, body }: { policyId: string; body: CreatePolicyBody },
): Promise<PolicyAnswer> {
  await lockNewId(tx, policyId)
  if (await createdBefore(tx, { id: policyId, action: 'policy-created', body }))
    return readPolicy(tx, policyId)
  await lockNewId(tx, tx.groupId)
  const last = await checkDay(tx, body)
  checkRuleIds(body)
  const number = (last?.number ?? 0) + 1
  const { name, effectiveOn, reason, settings } = body
  const columns = [name, effectiveOn, reason, JSON.stringify(settings), tx.actor.memberId, tx.now]
  await namingDuplicates(async () => {
    await tx.sql(INSERT, [policyId, tx.groupId, number, ...columns])
    await insertRules(tx, policyId, body.rules)
  })
  await record(tx, {
    action: 'policy-created',
    subjectType: 'policy',
    subjectId: policyId,
    summary: `put policy ${number}, ${name}, into force from ${dayText(effectiveOn)}: ${reason}`,
    after: body,
  })
  await rewriteReadiness(tx, await kitsInUse(tx))
  return readPolicy(tx, policyId)
}

interface LastVersion {
  [column: string]: unknown
  number: number
  effective_on: string
}

/** Refuses a day that has passed or lies before the last version's; the answer is that version, if there is one. */
export async function checkDay(
  tx: GroupTx,
  { effectiveOn }: Pick<CreatePolicyBody, 'effectiveOn'>,
): Promise<LastVersion | undefined> {
  const [last] = await tx.sql<LastVersion>(LAST, [tx.groupId])
  // The first version of a group may reach back: nothing was judged by another.
  if (!last) return last
  if (effectiveOn < (await tx.today())) throw invalidField('#/effectiveOn', 'Choose today or a later day.')
  if (effectiveOn >= last.effective_on) return last
  const detail = `The last version takes effect on ${dayText(last.effective_on)}: choose that day or a later one.`
  throw new AppError('state-conflict', detail, { errors: [{ pointer: '#/effectiveOn', detail }] })
}

function checkRuleIds({ rules }: CreatePolicyBody): void {
  const ids = rules.map((rule) => rule.id)
  const repeated = ids.findIndex((id, at) => ids.indexOf(id) !== at)
  if (repeated !== -1) throw invalidField(`#/rules/${repeated}/id`, 'Two rules have the same id.')
}
