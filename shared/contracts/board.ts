import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, instant, line } from './fields.ts'
import { ANY_MEMBER } from './roles.ts'
import { answeredAt, availability, computedFor, listOf, verdict } from './words.ts'

/** A stretch of the horizon bar: `verdict` holds until `until`, when `cause` changes it. The last has neither. */
export const horizonStep = z.object({
  until: answeredAt.nullable(),
  verdict,
  cause: z.string(),
})

export const boardRow = z.object({
  kitId: z.string(),
  designation: z.string(),
  kindCode: z.string(),
  kindName: z.string(),
  /** Counted as a station: the sentence of the board is about stations. */
  station: z.boolean(),
  verdict,
  availability,
  availabilityReason: z.string(),
  expectedReturnOn: z.string().nullable(),
  /** The reason that weighs most, empty when there is none. */
  reasonTop: z.string(),
  reasonCount: z.int(),
  /** When the verdict changes if nobody does anything; null: never. For a past `asOf`: when it did change. */
  holdsUntil: answeredAt.nullable(),
  homePlace: z.string().nullable(),
  place: z.string().nullable(),
  /** Band by band, packed: read it with `unpackBands` of `shared/engine/readiness/band-codes.ts`. */
  bandCodes: z.string(),
  /** Radio output on the promised bands that stand, W. */
  watts: z.number().nullable(),
  hours: z.number().nullable(),
  horizon: z.array(horizonStep),
})

export const boardCount = z.object({
  station: z.boolean(),
  availability,
  verdict,
  n: z.int(),
})

export const boardAnswer = z.object({
  rows: z.array(boardRow),
  /** Rows that match the filters, over all pages. */
  total: z.int(),
  /** Give it as `after` for the next page; null on the last one. */
  next: z.string().nullable(),
  /** Of the whole group, whatever is filtered. */
  counts: z.array(boardCount),
  /** Which stations can go, in a sentence: its weighty part, then the rest. */
  sentence: z.object({ lead: z.string(), rest: z.string() }),
  revision: z.int(),
  asOf: answeredAt,
  computedFor,
  /** The oldest vital evidence under the verdicts of deployable kits. */
  oldestVital: z.object({ kitId: z.string(), designation: z.string(), on: z.string() }).nullable(),
  /** The next change of a verdict in the group if nobody does anything. */
  nextChange: z
    .object({
      kitId: z.string(),
      designation: z.string(),
      at: answeredAt,
      verdict,
      cause: z.string(),
    })
    .nullable(),
})

/** Worst kits last, as the board sorts them; filters narrow `rows` and `total` only. */
export const readBoard = defineEndpoint({
  name: 'read-board',
  method: 'get',
  path: '/api/v1/board',
  summary: 'Which kits can go: now, as known at a past instant, or at a coming one',
  access: { scope: 'group', roles: ANY_MEMBER },
  query: z.strictObject({
    asOf: instant.optional(),
    verdict: listOf(verdict).optional(),
    availability: listOf(availability).optional(),
    /** Ids of kit kinds. */
    kind: listOf(id).optional(),
    /** Ids of places where kits are now. */
    place: listOf(id).optional(),
    station: z.stringbool().optional(),
    search: line(80).default(''),
    after: z.string().max(120).optional(),
    size: z.coerce.number().int().min(1).max(200).default(50),
  }),
  response: boardAnswer,
})

export type BoardRow = z.output<typeof boardRow>
export type BoardCount = z.output<typeof boardCount>
export type BoardAnswer = z.output<typeof boardAnswer>
export type HorizonStep = z.output<typeof horizonStep>
