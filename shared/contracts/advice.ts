import { z } from 'zod'
import { boardCount } from './board.ts'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { reason } from './readiness-shapes.ts'
import { CREW } from './roles.ts'
import { answeredAt, availability, band, procedure, verdict } from './words.ts'

/** An item, or a part that an earlier step bought: `bought:<kit>:<position>`. */
const BOUGHT = /^bought:[0-9a-f-]{36}:[0-9a-f-]{36}$/
const thing = z.union([id, z.string().max(100).regex(BOUGHT, 'Name an item by its id.')])

/** One thing that could be done; a later step finds what the earlier ones left. */
export const whatIfStep = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('move'), itemId: thing, kitId: id, positionId: id }),
  z.strictObject({ kind: z.literal('take-out'), itemId: thing }),
  z.strictObject({ kind: z.literal('find'), itemId: id }),
  z.strictObject({ kind: z.literal('pass'), subjectId: thing, procedure, band: band.nullable() }),
  z.strictObject({ kind: z.literal('count'), kitId: id }),
  z.strictObject({ kind: z.literal('back'), kitId: id }),
  z.strictObject({ kind: z.literal('buy'), kitId: id, positionId: id }),
])

const adviceChange = z.object({
  kitId: z.string(),
  designation: z.string(),
  before: verdict,
  after: verdict,
  /** It was on issue or out of service, and can go then. */
  returns: z.boolean(),
})

export const advicePlan = z.object({
  minutes: z.int(),
  works: z.array(z.object({ text: z.string(), minutes: z.int(), steps: z.array(whatIfStep) })),
  changes: z.array(adviceChange),
  /** Designations of kits that are opened by it and should be counted afterwards. */
  countAfter: z.array(z.string()),
  deployable: z.int(),
  proven: z.int(),
  returned: z.int(),
})

/** What to do across the stations of the group, most readiness per attended hour first. Stores nothing. */
export const readAdvice = defineEndpoint({
  name: 'read-advice',
  method: 'get',
  path: '/api/v1/advice',
  summary: 'What to do: works ranked by the kits that they bring back per attended hour',
  access: { scope: 'group', roles: CREW },
  response: z.object({
    at: answeredAt,
    plans: z.array(advicePlan),
    /** Stations that are not proven, or late. */
    wanting: z.int(),
    /** Of them, how many were not looked at because there are too many. */
    leftOut: z.int(),
  }),
})

const standing = z.object({
  verdict,
  availability,
  /** When the verdict changes if nobody does anything else; null: never. */
  holdsUntil: answeredAt.nullable(),
  reasons: z.array(reason),
})

/** What these steps would make of the kits that they touch, and of the board's sentence. Stores nothing. */
export const askWhatIf = defineEndpoint({
  name: 'ask-what-if',
  method: 'post',
  path: '/api/v1/what-if',
  summary: 'What would be so if these things were done now',
  access: { scope: 'group', roles: CREW },
  body: z.strictObject({ steps: z.array(whatIfStep).min(1).max(120) }),
  response: z.object({
    at: answeredAt,
    kits: z.array(
      z.object({ kitId: z.string(), designation: z.string(), before: standing, after: standing }),
    ),
    /** As the board counts them. */
    before: z.array(boardCount),
    after: z.array(boardCount),
  }),
  problems: ['request-invalid'],
})

export type AdvicePlan = z.output<typeof advicePlan>
export type WhatIfAnswer = z.output<typeof askWhatIf.response>
