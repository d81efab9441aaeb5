import { z } from 'zod'
import { advicePlan } from './advice.ts'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { CREW } from './roles.ts'
import { answeredAt, category, procedure } from './words.ts'

const benchTask = z.object({
  /** Minutes after the beginning. */
  from: z.int(),
  to: z.int(),
  text: z.string(),
  /** The kit that it is done for. */
  kit: z.string(),
  procedure: procedure.nullable(),
  instrument: z.string().nullable(),
})

const yielded = advicePlan.pick({ changes: true, minutes: true }).extend({ text: z.string() })

/** What to do in the hours of a work party, one list for each bench. Stores nothing. */
export const planWorkParty = defineEndpoint({
  name: 'plan-work-party',
  method: 'post',
  path: '/api/v1/work-party',
  summary: 'A work-party plan for given people, hours, instruments and places',
  access: { scope: 'group', roles: CREW },
  body: z.strictObject({
    people: z.int().min(1).max(20),
    minutes: z.int().min(30).max(1440),
    /** Kits that are there now; empty: wherever they are, they are brought. */
    placeIds: z.array(id).max(100).default([]),
    /** At hand; null: all that are serviceable and not out of calibration. */
    instrumentIds: z.array(id).max(200).nullable().default(null),
  }),
  response: z.object({
    at: answeredAt,
    /** One for each person. */
    benches: z.array(z.object({ tasks: z.array(benchTask), cautions: z.array(z.string()) })),
    /** Capacity runs through the nights after it, one battery a tester and night. */
    nights: z.array(z.object({ night: z.int(), tester: z.string(), text: z.string() })),
    nightCautions: z.array(z.string()),
    /** Errands that must be run before. */
    before: z.array(z.string()),
    /** Said at the end, in no time. */
    then: z.array(z.string()),
    done: z.array(yielded),
    /** What does not fit, and why: no time, no instrument, or its kits are elsewhere. */
    left: z.array(yielded.extend({ why: z.enum(['time', 'instrument', 'place']) })),
    instruments: z.array(
      z.object({
        id: z.string(),
        designation: z.string(),
        category,
        calibratedUntilOn: z.string().nullable(),
        atHand: z.boolean(),
      }),
    ),
  }),
  problems: ['request-invalid'],
})

export type WorkPartyPlan = z.output<typeof planWorkParty.response>
