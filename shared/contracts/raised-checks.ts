import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId, plainDate } from './fields.ts'
import { recallProcedure } from './recall-shapes.ts'
import { CREW, LEADS } from './roles.ts'
import { answeredAt, band, procedure } from './words.ts'

/** A check asked for by an event: a drop, a storm, a recall, an opening. */

const cause = z.enum(['drop', 'storm', 'recall', 'opening', 'rewind', 'other'])

export const raisedCheck = z.object({
  id: z.string(),
  procedure,
  itemId: z.string().nullable(),
  kitId: z.string().nullable(),
  designation: z.string(),
  band: band.nullable(),
  cause,
  reason: z.string(),
  doubtsEarlier: z.boolean(),
  raisedAt: answeredAt,
  dueOn: z.string(),
  raisedBy: z.string(),
  withdrawnAt: answeredAt.nullable(),
})

export const raiseCheck = defineEndpoint({
  name: 'raise-check',
  method: 'put',
  path: '/api/v1/raised-checks/:checkId',
  summary: 'Ask for a check because something happened',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ checkId: newId }),
  body: z
    .strictObject({
      procedure,
      itemId: id.optional(),
      kitId: id.optional(),
      band: band.optional(),
      cause,
      reason: line(300, 1),
      /** What was found before is in doubt until tested anew. */
      doubtsEarlier: z.boolean().default(false),
      dueOn: plainDate,
    })
    .refine(({ itemId, kitId }) => (itemId === undefined) !== (kitId === undefined), {
      message: 'Name an item or a kit, not both.',
      path: ['itemId'],
    }),
  response: raisedCheck,
  problems: ['id-taken'],
})

export const withdrawRaisedCheck = defineEndpoint({
  name: 'withdraw-raised-check',
  method: 'post',
  path: '/api/v1/raised-checks/:checkId/withdraw',
  summary: 'Take back a raised check that is not needed',
  access: { scope: 'group', roles: LEADS },
  params: z.strictObject({ checkId: id }),
  body: z.strictObject({ reason: line(300, 1) }),
  response: raisedCheck,
})

/** Every unit in use of the batch that is not known to fail on this band gets a check. */
export const raiseRecall = defineEndpoint({
  name: 'raise-recall',
  method: 'post',
  path: '/api/v1/batches/:batchId/recall',
  summary: 'Recall a batch: its units are in doubt on one band until each is tested',
  access: { scope: 'group', roles: LEADS },
  params: z.strictObject({ batchId: id }),
  body: z.strictObject({
    procedure: recallProcedure.default('heat-test'),
    band: band.nullable(),
    reason: line(300, 1),
    dueOn: plainDate,
  }),
  response: z.object({ raised: z.array(raisedCheck) }),
})
