import { z } from 'zod'
import { amount, line, newId, text } from './fields.ts'
import { band, category } from './words.ts'

/** The rules of a policy: what is asked of which category, how often, and where the limits lie. */

/** Conditions on the item; all must hold. */
const applies = z
  .strictObject({
    chemistry: line(40, 1).optional(),
    minAgeYears: amount(0, 50).optional(),
    /** Asked for on these bands only. */
    bands: z.array(band).min(1).max(14).optional(),
  })
  .default({})

const common = {
  id: newId,
  category: z.union([category, z.literal('kit')]),
  applies,
  /** Null: on events only. */
  intervalMonths: z.int().min(1).max(120).nullable(),
  warningDays: z.int().min(0).max(365).default(30),
  vital: z.boolean(),
  reason: text(1000, 1),
  /** A standard or a federal text with its clause, or "common practice, no source". */
  source: text(300, 1),
}

const noLimits = z.strictObject({}).default({})
const plain = <P extends string>(procedure: P) =>
  z.strictObject({ procedure: z.literal(procedure), ...common, limits: noLimits })

export const limitsByProcedure = {
  'heat-test': z.strictObject({
    powerW: amount(1, 2000),
    minutes: amount(1, 240),
    maxC: amount(40, 250),
    maxSwrChange: amount(0, 10).optional(),
  }),
  'pair-loss': z.strictObject({ minEfficiency: amount(0.01, 1) }),
  'open-short-load': z.strictObject({ minEfficiency: amount(0.01, 1) }),
  'antenna-sweep': z.strictObject({ maxSwr: amount(1, 20) }),
  'feedline-loss': z.strictObject({ maxRiseDb: amount(0, 30) }),
  'battery-capacity': z.strictObject({ minCapacityFraction: amount(0.01, 1) }),
  'radio-check': z.strictObject({ minPowerFraction: amount(0.01, 1) }),
  'boot-and-update': z.strictObject({ voiceOnlyAfterMonths: z.int().min(1).max(120).optional() }),
} as const

export const ruleBody = z.discriminatedUnion('procedure', [
  z.strictObject({ procedure: z.literal('heat-test'), ...common, limits: limitsByProcedure['heat-test'] }),
  z.strictObject({ procedure: z.literal('pair-loss'), ...common, limits: limitsByProcedure['pair-loss'] }),
  z.strictObject({
    procedure: z.literal('open-short-load'),
    ...common,
    limits: limitsByProcedure['open-short-load'],
  }),
  z.strictObject({
    procedure: z.literal('antenna-sweep'),
    ...common,
    limits: limitsByProcedure['antenna-sweep'],
  }),
  z.strictObject({
    procedure: z.literal('feedline-loss'),
    ...common,
    limits: limitsByProcedure['feedline-loss'],
  }),
  z.strictObject({
    procedure: z.literal('battery-capacity'),
    ...common,
    limits: limitsByProcedure['battery-capacity'],
  }),
  z.strictObject({
    procedure: z.literal('radio-check'),
    ...common,
    limits: limitsByProcedure['radio-check'],
  }),
  z.strictObject({
    procedure: z.literal('boot-and-update'),
    ...common,
    limits: limitsByProcedure['boot-and-update'],
  }),
  plain('inspection'),
  plain('count'),
  plain('calibration'),
  plain('on-air-check'),
])

export type RuleBody = z.output<typeof ruleBody>
