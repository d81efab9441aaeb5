import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, page, pageQuery } from './fields.ts'
import { CREW } from './roles.ts'
import { band, category, listOf, procedure } from './words.ts'

export const dueCheck = z.object({
  subject: z.object({
    type: z.enum(['item', 'kit']),
    id: z.string(),
    designation: z.string(),
    /** Null for a kit. */
    category: category.nullable(),
  }),
  procedure,
  band: band.nullable(),
  vital: z.boolean(),
  state: z.enum(['due-soon', 'overdue', 'never', 'failed', 'in-doubt']),
  /** Null: never tested, or asked for at once. */
  dueOn: z.string().nullable(),
  testedOn: z.string().nullable(),
  testId: z.string().nullable(),
  because: z.string(),
  /** Asked for by an event rather than by an interval. */
  raised: z.boolean(),
  /** The kit that the item sits in; null for spares. */
  kit: z.object({ id: z.string(), designation: z.string() }).nullable(),
  place: z.string().nullable(),
})

/** Every serviceable thing of the group, in kits and on shelves. Overdue first, then by day. */
export const listDueChecks = defineEndpoint({
  name: 'list-due-checks',
  method: 'get',
  path: '/api/v1/due-checks',
  summary: 'What is due or overdue across the group',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    state: listOf(dueCheck.shape.state).optional(),
    procedure: listOf(procedure).optional(),
    kitId: id.optional(),
    placeId: id.optional(),
  }),
  response: page(dueCheck).extend({
    /** Checks whose day has passed, over all pages and filters. */
    overdue: z.int(),
    dueSoon: z.int(),
  }),
})

export type DueCheck = z.output<typeof dueCheck>
