import { groupBy } from '../group-by.ts'
import { median } from '../median.ts'
import type { Band } from '../vocabulary.ts'
import { BUILD_MEASURES, type BuildMeasure, type Measured } from './matching.ts'
import { byBandOrder } from './unit-figures.ts'

/** All units of a build on one band, by one measure. */
export interface BandSpread {
  readonly band: Band
  readonly measure: BuildMeasure
  readonly units: number
  readonly median: number
  readonly lowest: number
  readonly highest: number
}

/** Median and spread by measure and band, in the order of the bands. */
export function spreads(measured: readonly Measured[]): BandSpread[] {
  return eachBand(measured).map(({ band, measure, rows }) => {
    const values = rows.map(({ value }) => value)
    return {
      band,
      measure,
      units: rows.length,
      median: median(values),
      lowest: Math.min(...values),
      highest: Math.max(...values),
    }
  })
}

export interface RowsOfBand {
  readonly band: Band
  readonly measure: BuildMeasure
  readonly rows: readonly Measured[]
}

export function eachBand(measured: readonly Measured[]): RowsOfBand[] {
  return BUILD_MEASURES.flatMap((measure) => {
    const own = measured.filter((one) => one.measure === measure)
    return [...groupBy(own, ({ band }) => band)]
      .map(([band, rows]) => ({ band, measure, rows }))
      .toSorted(byBandOrder)
  })
}
