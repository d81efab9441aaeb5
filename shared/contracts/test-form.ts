import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { accuracyShape, knownShape } from './known-for-test.ts'
import { itemNamed } from './readiness-shapes.ts'
import { CREW } from './roles.ts'
import { judgedBy, testSummary } from './test-shapes.ts'
import { band, procedure } from './words.ts'

export const methodCard = z.object({
  name: z.string(),
  /** What to set up, in order. */
  steps: z.array(z.string()),
  /** Before work that can hurt someone. */
  cautions: z.array(z.string()),
  source: z.string(),
})

/** How a heat test is run, from its rule. */
const heatPlan = z.object({
  powerW: z.number(),
  minutes: z.number(),
  stopC: z.number(),
  maxSwrChange: z.number().nullable(),
  /** Reading times while keyed, minutes since key-down. */
  readingMinutes: z.array(z.number()),
  /** Reading times after key-up, minutes. */
  coolingMinutes: z.array(z.number()),
})

/** Everything that a phone needs to run and judge one test of one item, also without a network. */
export const testForm = z.object({
  item: itemNamed.extend({
    tag: z.string(),
    kit: z.object({ id: z.string(), designation: z.string() }).nullable(),
    details: z.record(z.string(), z.unknown()),
  }),
  procedure,
  judgedBy,
  /** Bands that the item covers or the rule asks for, in wavelength order. */
  bands: z.array(band),
  methods: z.array(methodCard),
  /** The method and instrument this member used last for the procedure. */
  lastMethod: z.string().nullable(),
  lastInstrument: itemNamed.nullable(),
  /** Serviceable instruments that fit the procedure. */
  instruments: z.array(
    itemNamed.extend({ calibratedUntilOn: z.string().nullable(), accuracy: accuracyShape }),
  ),
  /** For `knownFromForm`: with it the engine says on the phone what the server will say. */
  known: knownShape,
  /** Heat test only, else null. */
  heat: heatPlan.nullable(),
  /** Heat tests: the bands that the policy has a rule of their own for; the others go by `judgedBy` and `heat`. */
  bandRules: z.partialRecord(band, z.object({ limits: z.record(z.string(), z.unknown()), heat: heatPlan })),
  /** Newest tests of this item by this procedure. */
  recent: z.array(testSummary),
})

export const readTestForm = defineEndpoint({
  name: 'read-test-form',
  method: 'get',
  path: '/api/v1/items/:itemId/test-form',
  summary: 'What a phone needs to run one test of one item',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ itemId: id }),
  query: z.strictObject({
    procedure,
    /** The test that the new one corrects: it counts for nothing any more. */
    corrects: id.optional(),
  }),
  response: testForm,
})

export type TestForm = z.output<typeof testForm>
