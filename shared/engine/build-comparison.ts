import { checkHeatRun, compareHeat, type HeatAgreement, type HeatRun } from './build-heat.ts'
import { summariseBuild, type BuildFigures } from './build-figures.ts'
import { checkNumber, failure, type Failure, type Outcome, type Warning } from './outcome.ts'

/** Loss of one unit per device, dB, by the name of the band. */
export interface BuildUnit {
  readonly label: string
  readonly lossDb: Readonly<Record<string, number>>
}

/** All units made to one build sheet. */
export interface Build {
  readonly name: string
  readonly units: readonly BuildUnit[]
  readonly heat?: HeatRun
}

export interface RankedBuild extends BuildFigures {
  /** 1 is the best; equal builds share a place. */
  readonly rank: number
}

export interface BuildComparison {
  readonly bands: readonly string[]
  /** Best first. */
  readonly builds: readonly RankedBuild[]
  /** Lowest median loss of each band; several names for a tie. */
  readonly bestPerBand: readonly {
    readonly band: string
    readonly builds: readonly string[]
    readonly lossDb: number
  }[]
  /**
   * Whether less loss went with less heat. Two readings of a rise tell no end temperature, so there is none.
   */
  readonly heat: HeatAgreement
  readonly warnings: readonly Warning[]
}

/**
 * Compares builds band by band and over all. A band whose median loss is above `unusableAboveDb` (0..100) is
 * unusable. Ranked by the count of unusable bands, then by the mean loss over the bands that every build was
 * measured on. Losses 0..100 dB. `E_TOO_FEW` without two builds with units, `E_NO_COMMON_BAND` when there is
 * nothing to compare, `E_DUPLICATE` for a name that comes twice. `W_BANDS_DIFFER` when some bands were left
 * out of the ranking. Ranking rule: our choice.
 */
export function compareBuilds(builds: readonly Build[], unusableAboveDb: number): Outcome<BuildComparison> {
  const bad = checkBuilds(builds, unusableAboveDb)
  if (bad) return bad
  const bands = [
    ...new Set(builds.flatMap((build) => build.units.flatMap((unit) => Object.keys(unit.lossDb)))),
  ]
  const common = bands.filter((band) =>
    builds.every((build) => build.units.some((unit) => Object.hasOwn(unit.lossDb, band))),
  )
  if (common.length === 0) return failure('E_NO_COMMON_BAND', 'No band was measured on every build.')
  const figures = builds.map((build) => summariseBuild(build, { bands, common, unusableAboveDb }))
  return {
    bands,
    builds: rank(figures, common),
    bestPerBand: bands.map((band) => bestOn(band, figures)),
    heat: compareHeat(
      builds.map(({ name, heat }, at) => ({ name, heat, lossDb: figures[at]?.meanLossDb ?? 0 })),
    ),
    warnings:
      common.length === bands.length ? [] : [bandsDiffer(bands.filter((band) => !common.includes(band)))],
  }
}

function rank(figures: readonly BuildFigures[], common: readonly string[]): RankedBuild[] {
  const unusable = (build: BuildFigures): number =>
    build.unusableBands.filter((band) => common.includes(band)).length
  const order = (a: BuildFigures, b: BuildFigures): number =>
    unusable(a) - unusable(b) || a.meanLossDb - b.meanLossDb
  return figures.toSorted(order).map((build, _, sorted) => ({
    ...build,
    rank: 1 + sorted.findIndex((other) => order(other, build) === 0),
  }))
}

function bestOn(band: string, figures: readonly BuildFigures[]): BuildComparison['bestPerBand'][number] {
  const measured = figures.flatMap(({ name, perBand }) => {
    const found = perBand.find((each) => each.band === band)
    return found ? [{ name, lossDb: found.medianLossDb }] : []
  })
  const lossDb = Math.min(...measured.map((each) => each.lossDb))
  return { band, lossDb, builds: measured.filter((each) => each.lossDb === lossDb).map((each) => each.name) }
}

function checkBuilds(builds: readonly Build[], unusableAboveDb: number): Failure | undefined {
  if (builds.length < 2) return failure('E_TOO_FEW', 'A comparison takes two builds or more.')
  if (new Set(builds.map((build) => build.name)).size < builds.length) {
    return failure('E_DUPLICATE', 'Two builds have the same name.')
  }
  for (const { name, units, heat } of builds) {
    const badHeat = heat && checkHeatRun(heat)
    if (badHeat) return badHeat
    if (units.length === 0) return failure('E_TOO_FEW', `${name} has no measured unit.`)
    for (const unit of units) {
      for (const [band, lossDb] of Object.entries(unit.lossDb)) {
        const bad = checkNumber(`${name}, ${unit.label}, ${band}`, lossDb, 0, 100)
        if (bad) return bad
      }
    }
  }
  return checkNumber('unusableAboveDb', unusableAboveDb, 0, 100)
}

function bandsDiffer(left: readonly string[]): Warning {
  const message = `Not every build was measured on ${left.join(', ')}: the ranking leaves that out.`
  return { code: 'W_BANDS_DIFFER', message }
}
