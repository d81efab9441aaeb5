import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, instant, line, newId } from './fields.ts'
import { LEADS } from './roles.ts'
import { answeredAt, verdict } from './words.ts'

/** A person may lower a verdict with a reason, or accept a named risk until a day. Nobody can raise a verdict. */

const lowerable = verdict.exclude(['proven'])

export const verdictDecision = z.object({
  id: z.string(),
  kitId: z.string(),
  kind: z.enum(['lowered', 'risk-accepted']),
  toVerdict: verdict.nullable(),
  reason: z.string(),
  fromAt: answeredAt,
  untilAt: answeredAt.nullable(),
  decidedBy: z.string(),
  withdrawnAt: answeredAt.nullable(),
})

export const decideVerdict = defineEndpoint({
  name: 'decide-verdict',
  method: 'put',
  path: '/api/v1/kits/:kitId/decisions/:decisionId',
  summary: 'Lower a verdict with a reason, or accept a risk with an end',
  access: { scope: 'group', roles: LEADS },
  params: z.strictObject({ kitId: id, decisionId: newId }),
  body: z.discriminatedUnion('kind', [
    z.strictObject({
      kind: z.literal('lowered'),
      toVerdict: lowerable,
      reason: line(300, 1),
      untilAt: instant.optional(),
    }),
    z.strictObject({ kind: z.literal('risk-accepted'), reason: line(300, 1), untilAt: instant }),
  ]),
  response: verdictDecision,
  problems: ['id-taken', 'request-invalid'],
})

export const withdrawDecision = defineEndpoint({
  name: 'withdraw-decision',
  method: 'post',
  path: '/api/v1/kits/:kitId/decisions/:decisionId/withdraw',
  summary: 'Take back a lowered verdict or an accepted risk',
  access: { scope: 'group', roles: LEADS },
  params: z.strictObject({ kitId: id, decisionId: id }),
  body: z.strictObject({ reason: line(300, 1) }),
  response: verdictDecision,
})
