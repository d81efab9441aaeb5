import { z } from 'zod'
import { BAND_REGIONS } from '#shared/engine/band-edges.ts'
import { defineEndpoint } from './endpoint.ts'
import { amount, id, line, newId, page, pageQuery, plainDate, text } from './fields.ts'
import { CREW, POLICY_MAKERS } from './roles.ts'
import { ruleBody } from './rules.ts'
import { answeredAt, procedure } from './words.ts'

export const policySettings = z.strictObject({
  /** Usable fraction of the measured capacity by chemistry. */
  usableFraction: z.record(z.string().min(1).max(40), amount(0.05, 1)).optional(),
  /** Temperature at which endurance is stated, °C. */
  enduranceC: amount(-20, 50).optional(),
  /** Peukert exponent for lead-acid; 1 is linear. */
  peukert: amount(1, 1.5).optional(),
  /** Capacity at `enduranceC` as a fraction of the tested one; absent: by chemistry. */
  temperatureFactor: amount(0.1, 1).optional(),
  /** Where the group transmits, for the edges of the bands; absent: ITU Region 2. */
  bandRegion: z.enum(BAND_REGIONS).optional(),
})

export const policySummary = z.object({
  id: z.string(),
  number: z.int(),
  name: z.string(),
  effectiveOn: z.string(),
  reason: z.string(),
  createdAt: answeredAt,
  /** Empty for the policy that a group begins with. */
  createdBy: z.string(),
  inForce: z.boolean(),
  ruleCount: z.int(),
})

const answeredRule = z.object({
  id: z.string(),
  category: z.string(),
  procedure,
  applies: z.record(z.string(), z.unknown()),
  intervalMonths: z.int().nullable(),
  warningDays: z.int(),
  vital: z.boolean(),
  limits: z.record(z.string(), z.unknown()),
  reason: z.string(),
  source: z.string(),
})

export const policyAnswer = policySummary.extend({
  settings: z.record(z.string(), z.unknown()),
  rules: z.array(answeredRule),
})

export const listPolicies = defineEndpoint({
  name: 'list-policies',
  method: 'get',
  path: '/api/v1/policies',
  summary: 'All versions of the policy, newest first',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({ page: pageQuery.page, size: pageQuery.size }),
  response: page(policySummary),
})

export const readCurrentPolicy = defineEndpoint({
  name: 'read-current-policy',
  method: 'get',
  path: '/api/v1/policy',
  summary: 'The policy in force today',
  access: { scope: 'group', roles: CREW },
  response: policyAnswer,
})

export const readPolicy = defineEndpoint({
  name: 'read-policy',
  method: 'get',
  path: '/api/v1/policies/:policyId',
  summary: 'One version of the policy with its rules',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ policyId: id }),
  response: policyAnswer,
})

/** A version is never edited; the next one takes its place from its day on. Not before today, nor before the last. */
export const createPolicy = defineEndpoint({
  name: 'create-policy',
  method: 'put',
  path: '/api/v1/policies/:policyId',
  summary: 'Put a new version of the policy into force from a day on',
  access: { scope: 'group', roles: POLICY_MAKERS },
  params: z.strictObject({ policyId: newId }),
  body: z.strictObject({
    name: line(60, 1),
    effectiveOn: plainDate,
    reason: text(1000, 1),
    settings: policySettings.default({}),
    rules: z.array(ruleBody).min(1).max(200),
  }),
  response: policyAnswer,
  problems: ['id-taken', 'state-conflict', 'request-invalid'],
})

export type CreatePolicyBody = z.output<typeof createPolicy.body>
export type PolicyAnswer = z.output<typeof policyAnswer>
