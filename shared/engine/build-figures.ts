import type { Build } from './build-comparison.ts'
import { median } from './median.ts'

export interface BandOfBuild {
  readonly band: string
  readonly units: number
  readonly medianLossDb: number
  readonly lowestDb: number
  readonly highestDb: number
  /** Highest less lowest, 0 for one unit. */
  readonly spreadDb: number
  readonly isUnusable: boolean
}

export interface BuildFigures {
  readonly name: string
  readonly units: number
  readonly perBand: readonly BandOfBuild[]
  /** Mean of the median losses of the common bands, dB. */
  readonly meanLossDb: number
  /** The same without the worst of them; null when there is only one. */
  readonly meanWithoutWorstDb: number | null
  readonly worstBand: string
  readonly unusableBands: readonly string[]
}

export interface FigureOptions {
  readonly bands: readonly string[]
  /** Bands that count in the means. At least one, and the build was measured on each. */
  readonly common: readonly string[]
  readonly unusableAboveDb: number
}

/**
 * Median and spread per band, and the means, of the units of one build; the caller has checked the numbers.
 */
export function summariseBuild(
  build: Build,
  { bands, common, unusableAboveDb }: FigureOptions,
): BuildFigures {
  const perBand = bands.flatMap((band) => summariseBand(build, band, unusableAboveDb))
  const ranked = perBand
    .filter(({ band }) => common.includes(band))
    .toSorted((a, b) => b.medianLossDb - a.medianLossDb)
  const losses = ranked.map((band) => band.medianLossDb)
  return {
    name: build.name,
    units: build.units.length,
    perBand,
    meanLossDb: mean(losses),
    meanWithoutWorstDb: losses.length > 1 ? mean(losses.slice(1)) : null,
    worstBand: ranked[0]?.band ?? '',
    unusableBands: perBand.filter((band) => band.isUnusable).map(({ band }) => band),
  }
}

function summariseBand(build: Build, band: string, unusableAboveDb: number): BandOfBuild[] {
  const losses = build.units.flatMap((unit) =>
    Object.hasOwn(unit.lossDb, band) ? [unit.lossDb[band] ?? 0] : [],
  )
  if (losses.length === 0) return []
  const medianLossDb = median(losses)
  const lowestDb = Math.min(...losses)
  const highestDb = Math.max(...losses)
  const spreadDb = highestDb - lowestDb
  const isUnusable = medianLossDb > unusableAboveDb
  return [{ band, units: losses.length, medianLossDb, lowestDb, highestDb, spreadDb, isUnusable }]
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length
}
