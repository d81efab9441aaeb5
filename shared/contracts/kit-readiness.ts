import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, instant } from './fields.ts'
import { exposureNote } from './kit-exposure.ts'
import {
  action,
  checkState,
  computedFor,
  itemNamed,
  named,
  period,
  promise,
  timelinePeriod,
} from './readiness-shapes.ts'
import { raisedCheck } from './raised-checks.ts'
import { CREW } from './roles.ts'
import { testSummary } from './test-shapes.ts'
import { answeredAt, availability, band, category, condition, procedure, verdict } from './words.ts'
import { verdictDecision } from './verdict-decisions.ts'

/** An item in a position, with the state of every check that the policy asks of it. */
export const positionItem = itemNamed.extend({
  tag: z.string(),
  condition,
  conditionReason: z.string(),
  checks: z.array(checkState),
})

export const kitPosition = z.object({
  id: z.string(),
  name: z.string(),
  category,
  quantity: z.int(),
  vital: z.boolean(),
  items: z.array(positionItem),
})

/** One line of the fix list: what to do, and the reasons that it would lift. */
export const fix = z.object({
  action,
  reasons: z.array(z.string()),
  itemId: z.string().nullable(),
  positionId: z.string().nullable(),
  procedure: procedure.nullable(),
  band: band.nullable(),
})

export const kitReadiness = z.object({
  kitId: z.string(),
  designation: z.string(),
  tag: z.string(),
  kind: named.extend({ code: z.string(), station: z.boolean() }),
  promise,
  availability,
  availabilityReason: z.string(),
  expectedReturnOn: z.string().nullable(),
  homePlace: named.nullable(),
  place: named.nullable(),
  asOf: answeredAt,
  computedFor,
  /** Since when the record has said this. */
  knownSince: answeredAt,
  period,
  holdsUntil: answeredAt.nullable(),
  /** What the verdict becomes then. */
  nextVerdict: verdict.nullable(),
  positions: z.array(kitPosition),
  /** Checks of the kit itself, such as its count. */
  kitChecks: z.array(checkState),
  fixes: z.array(fix),
  /** Stored periods from `asOf` on, as far as anything is known to change. */
  timeline: z.array(timelinePeriod),
  /** The tests that the reasons and the checks point to, newest first. */
  tests: z.array(testSummary),
  raisedChecks: z.array(raisedCheck),
  decisions: z.array(verdictDecision),
  /** Of the newest exposure record; null: none, or not about now. */
  exposure: exposureNote.nullable(),
})

/** For a past `asOf` the period is the stored one; positions and checks are those of today and are left empty. */
export const readKitReadiness = defineEndpoint({
  name: 'read-kit-readiness',
  method: 'get',
  path: '/api/v1/kits/:kitId/readiness',
  summary: 'One kit: verdict, reasons, positions with their evidence, fix list and horizon',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ kitId: id }),
  query: z.strictObject({ asOf: instant.optional() }),
  response: kitReadiness,
})

export type KitReadiness = z.output<typeof kitReadiness>
