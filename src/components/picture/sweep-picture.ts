import type { ItemResult } from '#shared/contracts/item-results.ts'
import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { BAND_TABLE, bandEdges, type BandRegion } from '#shared/engine/band-edges.ts'
import { byBand } from '#shared/engine/procedures/by-band.ts'
import type { WorstSwr } from '#shared/engine/procedures/sweep-baseline.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { bandFigures, type BandFigure } from './band-picture.ts'

export interface SweepPoint {
  readonly frequencyMHz: number
  readonly swr: number
}

/** One band of an antenna sweep, with what its first sweep showed there. */
export interface SweepPanel {
  readonly band: Band
  /** Edges of the amateur band where the group transmits; null: it has no such band. */
  readonly edges: { readonly lowMHz: number; readonly highMHz: number } | null
  readonly worst: BandFigure & { readonly frequencyMHz: number | null }
  readonly points: readonly SweepPoint[]
  readonly resonanceMHz: number | null
  readonly before: { readonly points: readonly SweepPoint[]; readonly resonanceMHz: number | null }
}

export interface SweepPicture {
  readonly panels: readonly SweepPanel[]
  readonly limit: number | null
  /** The day of the sweep that is drawn behind; null: this is the first. */
  readonly baselineOn: PlainDate | null
}

/** `history`: the sweeps of this antenna, oldest first, as `read-item-results` answers them. */
export function sweepPicture(test: StoredTest, history: readonly ItemResult[]): SweepPicture {
  const { worst: judged = [], resonances = [] } = test.results as SweepResults
  const points = (test.inputs as { points?: readonly WorstSwr[] }).points ?? judged
  const baseline = baselineFor(test, history)
  const figures = bandFigures(test, 'swr')
  const panels = byBand(points.map(withoutNull)).flatMap(([band, here]) => {
    const worst = figures.find((figure) => figure.band === band)
    if (!worst) return []
    const frequencyMHz = here.find(({ swr }) => swr === worst.value)?.frequencyMHz ?? null
    const resonanceMHz = resonances.find((one) => one.band === band)?.frequencyMHz ?? null
    const before = baselineOf(baseline, band)
    return [
      {
        band,
        edges: bandEdgesMHz(band, test.judgedBy.bandRegion),
        worst: { ...worst, frequencyMHz },
        points: here,
        resonanceMHz,
        before,
      },
    ]
  })
  return {
    panels,
    limit: figures.find(({ limit }) => limit !== null)?.limit ?? null,
    baselineOn: baseline?.performedOn ?? null,
  }
}

interface SweepResults {
  readonly worst?: readonly WorstSwr[]
  readonly resonances?: readonly { readonly band: Band; readonly frequencyMHz: number }[]
}

/** A total reflection is stored without a number. */
const withoutNull = ({ band, frequencyMHz, swr }: WorstSwr) => ({ band, frequencyMHz, swr: swr ?? Infinity })

/** What the engine compares with: the newest earlier sweep that set a baseline, else the first of all. */
function baselineFor(test: StoredTest, history: readonly ItemResult[]): ItemResult | undefined {
  const earlier = history.filter(
    (one) => one.supersededBy === null && one.testId !== test.id && one.performedAt < test.performedAt,
  )
  return earlier.findLast(({ setsBaseline }) => setsBaseline) ?? earlier[0]
}

function baselineOf(baseline: ItemResult | undefined, band: Band): SweepPanel['before'] {
  const figures = (baseline?.figures ?? []).filter((one) => one.band === band)
  return {
    points: figures.flatMap(({ measure, frequencyMHz, value }) =>
      measure === 'swr' && frequencyMHz !== null ? [{ frequencyMHz, swr: value }] : [],
    ),
    resonanceMHz: figures.find(({ measure }) => measure === 'resonanceMHz')?.value ?? null,
  }
}

/** A band of the region that a test was judged for; licence classes may narrow it. */
export function bandEdgesMHz(band: Band, region: BandRegion): SweepPanel['edges'] {
  const edges = bandEdges(BAND_TABLE, region, band)
  return edges ? { lowMHz: edges.lowHz / 1e6, highMHz: edges.highHz / 1e6 } : null
}
