import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { createPolicy } from './policy.ts'
import { POLICY_MAKERS } from './roles.ts'
import { answeredAt, verdict } from './words.ts'

const standing = z.object({
  verdict,
  /** When the verdict changes if nobody does anything; null: never. */
  holdsUntil: answeredAt.nullable(),
})

/** What a new version would do to each kit from its day on, if nobody does anything until then. Stores nothing. */
export const previewPolicy = defineEndpoint({
  name: 'preview-policy',
  method: 'post',
  path: '/api/v1/policy/preview',
  summary: 'What a new version of the policy would change, before it takes effect',
  access: { scope: 'group', roles: POLICY_MAKERS },
  body: createPolicy.body.pick({ effectiveOn: true, settings: true, rules: true }),
  response: z.object({
    /** The instant that is looked at: the version's first, or now. */
    at: answeredAt,
    /** How many kits were looked at. */
    kits: z.int(),
    /** Those for which something changes, worst first. */
    changes: z.array(
      z.object({
        kitId: z.string(),
        designation: z.string(),
        before: standing,
        after: standing,
        /** The first reason that is new, or that is gone; empty where only the day changes. */
        cause: z.string(),
      }),
    ),
  }),
  problems: ['state-conflict', 'request-invalid'],
})
