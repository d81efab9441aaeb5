import { z } from 'zod'
import { BUILD_MEASURES } from '#shared/engine/builds/matching.ts'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { BUILT_CATEGORIES } from './item-details.ts'
import { named } from './registry-fields.ts'
import { batchRecall, batchUnit, recallProposal } from './recall-shapes.ts'
import { CREW } from './roles.ts'
import { band, findingWord, procedure } from './words.ts'

/** What the tests of all units made to a build sheet say about it, and about each unit among its siblings. */

const measure = z.enum(BUILD_MEASURES)

/** Newest of a unit on a band: loss in dB, rise in K per watt over a run of `minutes`, or SWR. */
const unitFigure = z.object({
  band,
  measure,
  value: z.number(),
  /** Expanded uncertainty (k = 2) in the unit of `value`; null where the accuracy is not known. */
  uncertainty: z.number().nullable(),
  finding: findingWord,
  testId: z.string(),
  performedOn: z.string(),
  /** A lapsed calibration or an open recall speaks against it. */
  isInDoubt: z.boolean(),
  /** Of a heat test: how long the key was down and at what power. */
  run: z.object({ minutes: z.number(), powerW: z.number(), riseK: z.number() }).nullable(),
})

const bandFigures = z.object({
  band,
  measure,
  units: z.int(),
  median: z.number(),
  lowest: z.number(),
  highest: z.number(),
  /** Of the policy in force; null where no rule asks for it. */
  limit: z.number().nullable(),
})

export const departure = z.object({
  unit: z.object({ id: z.string(), designation: z.string() }),
  band,
  measure,
  value: z.number(),
  median: z.number(),
  /** Robust z-score; above 0 is worse. */
  score: z.number(),
  isWorse: z.boolean(),
  testId: z.string(),
  text: z.string(),
})

export const buildFigures = z.object({
  sheet: z.object({ id: z.string(), name: z.string(), category: z.enum(BUILT_CATEGORIES) }),
  units: z.array(
    batchUnit.extend({ batch: named.nullable(), isRetired: z.boolean(), figures: z.array(unitFigure) }),
  ),
  bands: z.array(bandFigures),
  departures: z.array(departure),
  proposals: z.array(recallProposal),
  /** What a new unit must pass, band by band, before it goes into its first kit. */
  acceptance: z.array(z.object({ band, procedure, asks: z.string() })),
})

export type BuildFiguresAnswer = z.output<typeof buildFigures>

export const readBuildFigures = defineEndpoint({
  name: 'read-build-figures',
  method: 'get',
  path: '/api/v1/build-sheets/:buildSheetId/figures',
  summary: 'All units by a build sheet with their newest figures, median and spread, and who departs',
  access: { scope: 'group', roles: CREW },
  params: z.object({ buildSheetId: id }),
  response: buildFigures,
  problems: ['not-found'],
})

/** Other sheets beside one: as many as can be read side by side. */
export const MOST_COMPARED = 5

export const compareBuildSheets = defineEndpoint({
  name: 'compare-build-sheets',
  method: 'get',
  path: '/api/v1/build-sheets/:buildSheetId/comparison',
  summary: 'A build sheet beside others by what their units lose, the best first',
  access: { scope: 'group', roles: CREW },
  params: z.object({ buildSheetId: id }),
  query: z.strictObject({
    /** Ids of the others, separated by commas. */
    with: z
      .string()
      .max(400)
      .default('')
      .transform((value) => [...new Set(value.split(',').filter((part) => part !== ''))])
      .pipe(z.array(id).max(MOST_COMPARED)),
  }),
  response: z.object({
    /** The best first. */
    builds: z.array(
      z.object({
        sheet: named,
        rank: z.int(),
        units: z.int(),
        bands: z.array(
          z.object({
            band,
            units: z.int(),
            medianLossDb: z.number(),
            lowestDb: z.number(),
            highestDb: z.number(),
            isUnusable: z.boolean(),
            isBest: z.boolean(),
          }),
        ),
        meanLossDb: z.number(),
        meanWithoutWorstDb: z.number().nullable(),
        worstBand: band,
        unusableBands: z.array(band),
        /** Of the run that is compared; null where the build has none like it. */
        kPerW: z.number().nullable(),
        materialsCost: z.number().nullable(),
        currency: z.string(),
      }),
    ),
    bands: z.array(band),
    unusableAboveDb: z.number(),
    heat: z.object({
      verdict: z.enum(['agrees', 'disagrees', 'not-compared']),
      run: z.object({ band, minutes: z.number(), powerW: z.number() }).nullable(),
    }),
    /** What the ranking leaves out. */
    notes: z.array(z.string()),
    /** Chosen, but nothing of theirs was measured, or nothing that the others have too. */
    leftOut: z.array(named),
  }),
  problems: ['request-invalid', 'not-found'],
})

export const readBatchRecalls = defineEndpoint({
  name: 'read-batch-recalls',
  method: 'get',
  path: '/api/v1/batches/:batchId/recalls',
  summary: 'The recalls of a batch, open and ended, and those that its units propose',
  access: { scope: 'group', roles: CREW },
  params: z.object({ batchId: id }),
  response: z.object({ recalls: z.array(batchRecall), proposals: z.array(recallProposal) }),
  problems: ['not-found'],
})
