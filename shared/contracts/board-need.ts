import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, instant } from './fields.ts'
import { ANY_MEMBER } from './roles.ts'
import { answeredAt, band, computedFor, listOf, mode } from './words.ts'

/** A kit that lacks one kind of thing. */
const nearKit = z.object({
  kitId: z.string(),
  designation: z.string(),
  /** What would have to be so, and what is: follows "could if". */
  missing: z.string(),
  /** The test that shows it, where one does. */
  testId: z.string().nullable(),
})

/** Who can do what is needed, who nearly can and what is missing: now, as known at a past instant, or at a coming one. */
export const answerNeed = defineEndpoint({
  name: 'answer-need',
  method: 'get',
  path: '/api/v1/board/need',
  summary: 'Which kits can do what is needed, and what the nearest others lack',
  access: { scope: 'group', roles: ANY_MEMBER },
  query: z.strictObject({
    asOf: instant.optional(),
    /** All of them must work. */
    bands: listOf(band).optional(),
    mode: mode.optional(),
    /** At the antenna, W, on every band asked for. */
    watts: z.coerce.number().min(0.1).max(5000).optional(),
    /** On the kit's own batteries, h. */
    hours: z.coerce.number().min(0.1).max(1000).optional(),
    /** Mains or a vehicle is at hand: hours do not count. */
    mains: z.stringbool().default(false),
    /** Where the kit must be now. */
    at: id.optional(),
  }),
  response: z.object({
    /** The whole answer in words, its weighty part apart. */
    lead: z.string(),
    rest: z.string(),
    can: z.array(z.string()),
    /** Nearest first. */
    near: z.array(nearKit),
    /** Kits that can do it neither now nor nearly. */
    others: z.int(),
    revision: z.int(),
    asOf: answeredAt,
    computedFor,
  }),
})

export type NeedAnswer = z.output<typeof answerNeed.response>
