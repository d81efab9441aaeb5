import { createPolicy as contract } from '#shared/contracts/policy.ts'
import { inGroup } from '#server/group-transaction.ts'
import { createPolicy } from '#server/services/policy/create-policy.ts'
import { DEMO_POLICY } from '../policy.ts'
import { RECORD_BEGINS_ON } from '../dates.ts'
import type { Stage } from './stage.ts'

export async function putPolicyInForce({ ctx, by, ids, now, calendar }: Stage): Promise<void> {
  const rules = DEMO_POLICY.rules.map((rule, index) => ({ ...rule, id: ids.make(`rule ${index + 1}`, now) }))
  const effectiveOn = calendar.day(RECORD_BEGINS_ON)
  const body = contract.body.parse({ ...DEMO_POLICY, effectiveOn, rules })
  await inGroup(ctx, by, (tx) => createPolicy(tx, { policyId: ids.make('policy DEMO-1', now), body }))
}
