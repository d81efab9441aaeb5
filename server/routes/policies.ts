import {
  createPolicy as createContract,
  listPolicies as listContract,
  readCurrentPolicy as readCurrentContract,
  readPolicy as readContract,
} from '#shared/contracts/policy.ts'
import { previewPolicy as previewContract } from '#shared/contracts/policy-preview.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { createPolicy } from '../services/policy/create-policy.ts'
import { previewPolicy } from '../services/policy/preview-policy.ts'
import { listPolicies, readCurrentPolicy, readPolicy } from '../services/policy/read-policies.ts'
import type { EndpointRouter } from './endpoint.ts'

export function policyRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listContract, ({ query, by }) => inGroup(ctx, by, (tx) => listPolicies(tx, query)))
  endpoints.add(readCurrentContract, ({ by }) => inGroup(ctx, by, readCurrentPolicy))
  endpoints.add(readContract, ({ params, by }) => inGroup(ctx, by, (tx) => readPolicy(tx, params.policyId)))
  endpoints.add(previewContract, ({ body, by }) => inGroup(ctx, by, (tx) => previewPolicy(tx, body)))
  endpoints.add(createContract, ({ params, body, by }) =>
    inGroup(ctx, by, (tx) => createPolicy(tx, { policyId: params.policyId, body })),
  )
}
