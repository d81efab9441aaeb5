import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { CREW } from './roles.ts'
import { answeredAt, verdict } from './words.ts'

/** Stations that are available, by verdict. */
export const verdictTally = z.object({
  proven: z.int(),
  'proven-with-limits': z.int(),
  'not-proven': z.int(),
  'not-fit': z.int(),
})

export const forecastChange = z.object({
  kitId: z.string(),
  designation: z.string(),
  before: verdict,
  after: verdict,
  cause: z.string(),
})

/** The coming year if nobody does anything: what becomes of the stations, and how much work falls due when. */
export const readForecast = defineEndpoint({
  name: 'read-forecast',
  method: 'get',
  path: '/api/v1/forecast',
  summary:
    'How many stations can go on each day of the coming year, why it changes, and what falls due each week',
  access: { scope: 'group', roles: CREW },
  response: z.object({
    from: answeredAt,
    to: answeredAt,
    start: verdictTally,
    /** Oldest first; no two at one instant. */
    steps: z.array(z.object({ at: answeredAt, tally: verdictTally, changes: z.array(forecastChange) })),
    /** Checks of kits and spares whose day has passed already. */
    overdue: z.int(),
    weeks: z.array(z.object({ monday: z.string(), checks: z.int(), vital: z.int(), minutes: z.int() })),
  }),
})
