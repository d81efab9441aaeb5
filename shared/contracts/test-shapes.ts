import { z } from 'zod'
import { BAND_REGIONS } from '#shared/engine/band-edges.ts'
import { testAttachment } from './attachments.ts'
import { itemNamed, named } from './readiness-shapes.ts'
import { recallProposal } from './recall-shapes.ts'
import { answeredAt, band, category, findingWord, procedure, verdict } from './words.ts'

/** How a stored test looks in answers. */

/** What was tested: an item, or a whole kit (then without a category). */
export const testSubject = z.object({
  type: z.enum(['item', 'kit']),
  id: z.string(),
  designation: z.string(),
  category: category.nullable(),
})

export const testFinding = z.object({
  band: band.nullable(),
  finding: findingWord,
  /** `efficiency`, `peakC`, `swr`, `lossDb`, `watts`, `capacityFraction`, `present`, `serviceable`... */
  measure: z.string(),
  value: z.number().nullable(),
  /** Expanded uncertainty (k = 2) in the unit of `value`; null where the accuracy is not known. */
  uncertainty: z.number().nullable(),
  /** Heat test: the power applied, W. */
  powerW: z.number().nullable(),
  positionId: z.string().nullable(),
  /** The limit in words: "85 °C at 50 W for 10 min". */
  limit: z.string(),
  /** The finding without its subject: "reached 85 °C after 8.2 min". */
  text: z.string(),
})

/** What a test did to a kit. `before` is null when the kit had no verdict yet. */
export const testEffect = z.object({
  kitId: z.string(),
  designation: z.string(),
  before: verdict.nullable(),
  after: verdict,
  /** Whole sentences; the first says whether the verdict changed. */
  sentences: z.array(z.string()),
})

export const testSummary = z.object({
  id: z.string(),
  procedure,
  subject: testSubject,
  performedAt: answeredAt,
  /** The local day in the group's zone. */
  performedOn: z.string(),
  recordedAt: answeredAt,
  method: z.string(),
  instrument: itemNamed.nullable(),
  operatorName: z.string(),
  finding: findingWord,
  findings: z.array(testFinding),
  /** The test that corrected this one, if any: then this one counts no more. */
  supersededById: z.string().nullable(),
})

/** The rule that a test was judged by; null in a test without a rule, which is then recorded but asks for nothing. */
export const judgedBy = z.object({
  policyId: z.string(),
  policyNumber: z.int(),
  policyName: z.string(),
  /** Whose band edges counted. */
  bandRegion: z.enum(BAND_REGIONS),
  rule: z
    .object({
      id: z.string(),
      limits: z.record(z.string(), z.unknown()),
      intervalMonths: z.int().nullable(),
      vital: z.boolean(),
      reason: z.string(),
      source: z.string(),
    })
    .nullable(),
})

export const storedTest = testSummary.omit({ operatorName: true }).extend({
  instrumentNote: z.string(),
  operator: named,
  recordedBy: named,
  /** What a device said whose clock was ahead; the test counts from its receipt. Null: the claim was taken. */
  claimedAt: answeredAt.nullable(),
  /** It was ahead by more than five minutes: somebody should look at that device. */
  claimedAhead: z.boolean(),
  /** As sent, by procedure. */
  inputs: z.record(z.string(), z.unknown()),
  /** As calculated, by procedure; `warnings` among them. */
  results: z.record(z.string(), z.unknown()),
  judgedBy,
  engineVersion: z.string(),
  notes: z.string(),
  supersedes: z.object({ testId: z.string(), reason: z.string() }).nullable(),
  supersededBy: z.object({ testId: z.string(), reason: z.string() }).nullable(),
  /** Files that the test is read from, then those beside it. */
  attachments: z.array(testAttachment),
  effects: z.array(testEffect),
  /** What this test says about the siblings of the unit, where nothing asks for their test yet. */
  proposedRecalls: z.array(recallProposal),
})

export type StoredTest = z.output<typeof storedTest>
export type TestSummary = z.output<typeof testSummary>
export type TestEffect = z.output<typeof testEffect>
