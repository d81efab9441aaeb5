import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { itemNamed } from './readiness-shapes.ts'
import { CREW } from './roles.ts'
import { testFinding } from './test-shapes.ts'
import { answeredAt, band, findingWord, listOf, procedure } from './words.ts'

/** Newest tests of one item that are answered; what is older is counted. */
export const MOST_RESULTS = 200

/** One test of an item as a point of its history. */
export const itemResult = z.object({
  testId: z.string(),
  procedure,
  performedAt: answeredAt,
  performedOn: z.string(),
  finding: findingWord,
  findings: z.array(testFinding),
  /** Figures that were not judged: SWR at the radio, resonance, ambient... */
  figures: z.array(
    z.object({
      band: band.nullable(),
      measure: z.string(),
      value: z.number(),
      frequencyMHz: z.number().nullable(),
    }),
  ),
  /** Later tests are compared with this one. */
  setsBaseline: z.boolean(),
  instrument: itemNamed.nullable(),
  /** Limits of the rule that it was judged by; null: no rule asked for it. */
  limits: z.record(z.string(), z.unknown()).nullable(),
  /** How long it holds by that rule. */
  intervalMonths: z.int().nullable(),
  /** The test that corrected it and why: then it counts no more. */
  supersededBy: z.object({ testId: z.string(), reason: z.string() }).nullable(),
})

export const readItemResults = defineEndpoint({
  name: 'read-item-results',
  method: 'get',
  path: '/api/v1/items/:itemId/results',
  summary: 'What the tests of one item measured over the years, corrected ones among them',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ itemId: id }),
  query: z.strictObject({ procedure: listOf(procedure).optional() }),
  /** Oldest first. */
  response: z.object({ results: z.array(itemResult), older: z.int() }),
  problems: ['not-found'],
})

export type ItemResult = z.output<typeof itemResult>
