import { z } from 'zod'
import { boardCount } from './board.ts'
import { defineEndpoint } from './endpoint.ts'
import { id, instant, line, newId } from './fields.ts'
import { reason } from './readiness-shapes.ts'
import { CREW, LEADS } from './roles.ts'
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
  z.strictObject({
    kind: z.literal('skip'),
    kitId: id,
    subjectId: id,
    procedure,
    band: band.nullable(),
    /** Null: nothing is stored, and the verdict falls when the test is due. */
    accept: z.strictObject({ reason: line(150, 1), untilAt: instant }).nullable(),
  }),
])

const steps = z.array(whatIfStep).min(1).max(120)

const standing = z.object({
  verdict,
  availability,
  /** When the verdict changes if nobody does anything else; null: never. */
  holdsUntil: answeredAt.nullable(),
  /** What it becomes then. */
  then: verdict.nullable(),
  reasons: z.array(reason),
})

const toldStep = z.object({
  text: z.string(),
  /** Why it cannot be done here and now; null where it can. */
  waits: z.string().nullable(),
})

/** What these steps would make of the kits that they touch, and of the board's sentence. Stores nothing. */
export const askWhatIf = defineEndpoint({
  name: 'ask-what-if',
  method: 'post',
  path: '/api/v1/what-if',
  summary: 'What would be so if these things were done now',
  access: { scope: 'group', roles: CREW },
  body: z.strictObject({ steps }),
  response: z.object({
    at: answeredAt,
    steps: z.array(toldStep),
    /** Before, once what can be done here is done, and once all of it is. */
    kits: z.array(
      z.object({
        kitId: z.string(),
        designation: z.string(),
        before: standing,
        atOnce: standing,
        after: standing,
      }),
    ),
    /** As the board counts them. */
    before: z.array(boardCount),
    atOnce: z.array(boardCount),
    after: z.array(boardCount),
    /** What the answer rests on, as a digest: doing it is refused when something of it changed meanwhile. */
    basis: z.string(),
  }),
  problems: ['request-invalid'],
})

/** One that was done: what it did, and what it left as a note. */
export const whatIfDone = z.object({
  id: z.string(),
  reason: z.string(),
  doneAt: answeredAt,
  doneBy: z.string(),
  done: z.array(z.string()),
  notes: z.array(z.object({ text: z.string(), waits: z.string() })),
  kits: z.array(z.object({ kitId: z.string(), designation: z.string(), before: verdict, after: verdict })),
})

export const doWhatIf = defineEndpoint({
  name: 'do-what-if',
  method: 'put',
  path: '/api/v1/what-ifs/:whatIfId',
  summary: 'Do at once what can be done of a what-if, all of it or nothing; the rest is kept as notes',
  access: { scope: 'group', roles: LEADS },
  params: z.strictObject({ whatIfId: newId }),
  body: z.strictObject({
    steps,
    reason: line(300, 1),
    /** Where things are put that are taken out of a kit; null: where their kit is. */
    placeId: id.nullable().default(null),
    /** Of the answer that was looked at; null: do it on whatever is so now. */
    basis: line(100).nullable().default(null),
  }),
  response: whatIfDone,
  problems: ['request-invalid', 'not-found', 'id-taken', 'state-conflict'],
})

export const listWhatIfs = defineEndpoint({
  name: 'list-what-ifs',
  method: 'get',
  path: '/api/v1/what-ifs',
  summary: 'What-ifs that were done, latest first, with what they left to do',
  access: { scope: 'group', roles: CREW },
  response: z.object({ rows: z.array(whatIfDone) }),
})

export type WhatIfStepBody = z.output<typeof whatIfStep>
export type WhatIfAnswer = z.output<typeof askWhatIf.response>
export type WhatIfDone = z.output<typeof whatIfDone>
