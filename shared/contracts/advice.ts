import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { CREW } from './roles.ts'
import { whatIfStep } from './what-if.ts'
import { answeredAt, verdict } from './words.ts'

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

export type AdvicePlan = z.output<typeof advicePlan>
