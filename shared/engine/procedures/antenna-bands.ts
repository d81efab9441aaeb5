/** What a sweep says about each band that is judged. Source: calculation sheet, section 7. */
import { bandSwr, samplesWithin, type BandSwr } from '../band-swr.ts'
import { failure, isFailure, type Outcome } from '../outcome.ts'
import { swrAt, swrBandwidth, type SwrBandwidth, type SwrSample } from '../swr-sweep.ts'
import type { Band } from '../vocabulary.ts'
import { inBand, megahertz, type JudgedBand } from './judged-bands.ts'
import { figure } from './judgement.ts'
import type { WorstSwr } from './sweep-baseline.ts'

export interface WorkingPoint {
  readonly band: Band
  readonly frequencyMHz: number
}

export interface AntennaBand {
  /** At the working points where they are named, else over the band: the one to judge. */
  readonly worst: WorstSwr
  readonly lowest: WorstSwr
  readonly coverage: BandSwr['coverage']
  readonly samples: number
  /** Over the whole band, whatever is judged. */
  readonly worstOverBand: WorstSwr
  /** Where the SWR is 2 or less around the band's minimum; null when it is nowhere. */
  readonly twoToOne: SwrBandwidth | null
}

/** `E_NO_TEST_FOR_BAND`; `E_GRID` for a working point outside the sweep. The samples must be in order. */
export function antennaBand(
  samples: readonly SwrSample[],
  band: JudgedBand,
  workingPoints: readonly WorkingPoint[],
): Outcome<AntennaBand> {
  const found = bandSwr(samples, band)
  if (isFailure(found)) return inBand(found, band.name)
  const { figures, coverage, samples: count } = found
  if (!figures) return inBand({ code: 'E_NO_TEST_FOR_BAND', message: NOT_REACHED }, band.name)
  const points = workingPoints.filter((point) => point.band === band.name)
  const worstOverBand = pointOf(band.name, figures.worstAtHz, figures.worstSwr)
  const worst = points.length > 0 ? worstOfPoints(samples, points) : worstOverBand
  if (isFailure(worst)) return worst
  const twoToOne = swrBandwidth(samplesWithin(samples, band), 2)
  return {
    worst,
    lowest: pointOf(band.name, figures.lowestAtHz, figures.lowestSwr),
    coverage,
    samples: count,
    worstOverBand,
    twoToOne: isFailure(twoToOne) ? null : twoToOne,
  }
}

const NOT_REACHED = 'fewer than two points of the sweep lie in the band: sweep it too, or leave the band out.'

function worstOfPoints(samples: readonly SwrSample[], points: readonly WorkingPoint[]): Outcome<WorstSwr> {
  const [first, last] = [samples[0]?.frequencyHz ?? 0, samples.at(-1)?.frequencyHz ?? 0]
  const outside = points.find(({ frequencyMHz }) => frequencyMHz * 1e6 < first || frequencyMHz * 1e6 > last)
  if (outside) {
    const message = `the working point ${figure(outside.frequencyMHz, 4)} MHz lies outside the sweep.`
    return failure('E_GRID', `${outside.band}: ${message}`, { field: 'workingPoints' })
  }
  const read = points.map(({ band, frequencyMHz }) => ({
    band,
    hz: frequencyMHz * 1e6,
    swr: swrAt(samples, frequencyMHz * 1e6),
  }))
  const worst = read.reduce((a, b) => (b.swr > a.swr ? b : a))
  return pointOf(worst.band, worst.hz, worst.swr)
}

function pointOf(band: Band, hz: number, swr: number): WorstSwr {
  return { band, frequencyMHz: megahertz(hz), swr: Number.isFinite(swr) ? swr : null }
}
