import type { Band, Category, Procedure } from '../vocabulary.ts'

/**
 * What a build is compared by. All of them are the better the lower: loss of power, rise of the hottest surface per watt
 * sent in, SWR at the worst working point.
 */
export const BUILD_MEASURES = ['lossDb', 'kPerW', 'swr'] as const

export type BuildMeasure = (typeof BUILD_MEASURES)[number]

/** What a recall of a batch can ask for; a loss measured in the other way answers for the pair's. */
export const RECALL_PROCEDURES = [
  'heat-test',
  'pair-loss',
  'antenna-sweep',
] as const satisfies readonly Procedure[]

export type RecallProcedure = (typeof RECALL_PROCEDURES)[number]

/** The tests that show how well a unit matches, by what it is. */
const MATCHING: Readonly<Partial<Record<Category, readonly RecallProcedure[]>>> = {
  transformer: ['heat-test', 'pair-loss'],
  antenna: ['antenna-sweep'],
}

export function matchingProcedures(category: Category): readonly RecallProcedure[] {
  return MATCHING[category] ?? []
}

/** The test that shows a measure, as a recall asks for it. */
export const PROCEDURE_OF_MEASURE = {
  lossDb: 'pair-loss',
  kPerW: 'heat-test',
  swr: 'antenna-sweep',
} as const satisfies Record<BuildMeasure, RecallProcedure>

/**
 * The smallest spread that the usual instruments tell from none, in the measure's unit: a percent of the power, a
 * kelvin at 50 W, a tenth of SWR. Our choice.
 */
export const RESOLUTIONS: Readonly<Record<BuildMeasure, number>> = { lossDb: 0.05, kPerW: 0.02, swr: 0.1 }

/** One figure of one unit on one band. */
export interface Measured {
  readonly unitId: string
  readonly designation: string
  readonly band: Band
  readonly measure: BuildMeasure
  readonly value: number
  readonly testId: string
}
