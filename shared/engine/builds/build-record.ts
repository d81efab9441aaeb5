/** Everything that the tests of all units made to one build sheet say about it. */
import type { Moment } from '../readiness/moment.ts'
import type { Band, Category } from '../vocabulary.ts'
import { alikeRuns } from './alike-runs.ts'
import { departures, type Departure } from './departures.ts'
import { limitOf } from './limits.ts'
import type { BuildMeasure, Measured } from './matching.ts'
import { spreads, type BandSpread } from './spread.ts'
import { heatFigures, newestFigures, type Rises, type UnitFigure } from './unit-figures.ts'

export interface BuiltUnit {
  readonly id: string
  readonly designation: string
}

export interface UnitRecord {
  readonly unitId: string
  /** The newest of each band and measure: what the build is judged by. */
  readonly figures: readonly UnitFigure[]
}

export interface BandRecord extends BandSpread {
  readonly limit: number | null
}

export interface BuildRecord {
  readonly units: readonly UnitRecord[]
  readonly bands: readonly BandRecord[]
  readonly departures: readonly Departure[]
}

/** `rises`: what the heat tests measured, which findings do not carry. */
export function buildRecord(
  moment: Moment,
  { units, category, rises }: { units: readonly BuiltUnit[]; category: Category; rises: Rises },
): BuildRecord {
  const runs = alikeRuns(
    units.flatMap(({ id }) => heatFigures(moment, id, rises).map((figure) => ({ unitId: id, figure }))),
  )
  const records = units.map(({ id }): UnitRecord => {
    const warmed = runs.filter(({ unitId }) => unitId === id).map(({ figure }) => figure)
    return { unitId: id, figures: [...newestFigures(moment, id), ...warmed] }
  })
  const measured = measuredOf(units, records)
  const limit = (measure: BuildMeasure, band: Band) => limitOf(moment, { category, measure, band })
  return {
    units: records,
    bands: spreads(measured).map((spread) => ({ ...spread, limit: limit(spread.measure, spread.band) })),
    departures: departures(measured),
  }
}

function measuredOf(units: readonly BuiltUnit[], records: readonly UnitRecord[]): Measured[] {
  const nameOf = new Map(units.map(({ id, designation }) => [id, designation]))
  return records.flatMap(({ unitId, figures }) =>
    figures.map(({ band, measure, value, testId }) => {
      return { unitId, designation: nameOf.get(unitId) ?? '', band, measure, value, testId }
    }),
  )
}
