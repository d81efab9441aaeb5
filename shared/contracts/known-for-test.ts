import { z } from 'zod'
import { BAND_REGIONS } from '#shared/engine/band-edges.ts'
import type { Accuracy } from '#shared/engine/procedures/accuracy.ts'
import type { KnownForTest } from '#shared/engine/procedures/performance.ts'
import { CHEMISTRIES, type Band } from '#shared/engine/vocabulary.ts'
import { band, category } from './words.ts'

/** What the engine knows for a test besides its inputs, as a form gets it and as it is kept with the test. */

const byBand = z.partialRecord(band, z.number())

export const accuracyShape = z.object({
  accuracyPercentOfReading: z.number().optional(),
  accuracyPercentOfFullScale: z.number().optional(),
  accuracyAbsolute: z.number().optional(),
  fullScale: z.number().optional(),
  resolution: z.number().optional(),
  reflectionError: z.number().optional(),
})

const feedlineReading = z.object({
  band,
  frequencyMHz: z.number().optional(),
  lossDb: z.number(),
  swrAtRadio: z.number().optional(),
})

export const knownShape = z.object({
  battery: z.object({ ratedAh: z.number().optional(), chemistry: z.enum(CHEMISTRIES).optional() }),
  feedline: z.object({
    baselineDb: byBand,
    baselineSwr: byBand.optional(),
    last: z.array(feedlineReading),
  }),
  line: z.object({ cable: z.string().optional(), lengthM: z.number().optional() }),
  transformer: z.object({
    turnsPrimary: z.number().optional(),
    turnsSecondary: z.number().optional(),
    coreMassG: z.number().optional(),
    ratedWatts: z.number().optional(),
    /** By the efficiency test in force. */
    efficiency: z.partialRecord(band, z.object({ efficiency: z.number(), testId: z.string() })).optional(),
  }),
  sweep: z.object({
    baseline: z
      .object({
        testId: z.string(),
        performedOn: z.string(),
        /** The attachment to download for the comparison; null: it was entered by hand. */
        file: z.string().nullable(),
        worst: z.array(z.object({ band, frequencyMHz: z.number(), swr: z.number().nullable() })),
      })
      .nullable(),
  }),
  references: z.array(
    z.object({
      id: z.string(),
      designation: z.string(),
      for: category.nullable(),
      reads: z.string(),
      agreed: z.number(),
      tolerance: z.number(),
      unit: z.string(),
    }),
  ),
  region: z.enum(BAND_REGIONS),
})

type Known = z.output<typeof knownShape>

interface Ruled {
  readonly limits: Readonly<Record<string, unknown>>
}

interface Form {
  readonly known: Known
  readonly judgedBy: { readonly rule: Ruled | null }
  readonly bandRules: Readonly<Partial<Record<Band, Ruled>>>
  readonly instruments: readonly { readonly id: string; readonly accuracy: Accuracy }[]
}

/**
 * What a form must hand to `judgePerformance` so that a preview is what the server will say. `band`: of a heat test,
 * which is about one.
 */
export function knownFromForm(
  { known, judgedBy, bandRules, instruments }: Form,
  instrumentId: string | null,
  band: Band | null = null,
): KnownForTest {
  return {
    ...known,
    rule: (band && bandRules[band]) ?? judgedBy.rule ?? undefined,
    instrument: instruments.find(({ id }) => id === instrumentId)?.accuracy ?? null,
    plan: { positions: [], sealNumber: null },
  }
}
