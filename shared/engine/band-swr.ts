/** The SWR of one band out of a sweep. Source: calculation sheet, section 7. */
import { failure, type Outcome } from './outcome.ts'
import { checkSweep, firstAtOrAbove, swrAt, type SwrSample } from './swr-sweep.ts'

export interface BandSwr {
  /** Full only when the sweep spans the band. */
  readonly coverage: 'full' | 'partial' | 'none'
  /** Samples of the sweep inside the band, edges included. */
  readonly samples: number
  /** Over those samples and the band edges the sweep reaches (interpolated); null under two samples. */
  readonly figures: {
    readonly lowestSwr: number
    readonly lowestAtHz: number
    readonly worstSwr: number
    readonly worstAtHz: number
  } | null
}

/** Two dips in one band: the lower one is described. Errors of `checkSweep`; `E_RANGE` for edges reversed. */
export function bandSwr(
  samples: readonly SwrSample[],
  edges: { readonly lowHz: number; readonly highHz: number },
): Outcome<BandSwr> {
  const bad = checkSweep(samples)
  if (bad) return bad
  if (!(edges.lowHz > 0 && edges.highHz > edges.lowHz && edges.highHz < Infinity))
    return failure('E_RANGE', 'The upper band edge must lie above the lower one.', { field: 'edges' })
  const inside = samplesWithin(samples, edges)
  const coverage = coverageOf(samples, edges)
  if (inside.length < 2) return { coverage, samples: inside.length, figures: null }
  const points = [...edgePoints(samples, edges), ...inside]
  const lowest = points.reduce((best, point) => (point.swr < best.swr ? point : best))
  const worst = points.reduce((most, point) => (point.swr > most.swr ? point : most))
  const figures = {
    lowestSwr: lowest.swr,
    lowestAtHz: lowest.frequencyHz,
    worstSwr: worst.swr,
    worstAtHz: worst.frequencyHz,
  }
  return { coverage, samples: inside.length, figures }
}

/** The part of a sweep inside band edges, edges included. The sweep must be in order. */
export function samplesWithin<T extends { readonly frequencyHz: number }>(
  samples: readonly T[],
  edges: { readonly lowHz: number; readonly highHz: number },
): readonly T[] {
  const from = firstAtOrAbove(samples, edges.lowHz)
  let to = firstAtOrAbove(samples, edges.highHz)
  if (samples[to]?.frequencyHz === edges.highHz) to += 1
  return samples.slice(from, to)
}

type Edges = { readonly lowHz: number; readonly highHz: number }

function coverageOf(samples: readonly SwrSample[], { lowHz, highHz }: Edges): BandSwr['coverage'] {
  const first = samples[0]?.frequencyHz ?? 0
  const last = samples.at(-1)?.frequencyHz ?? 0
  if (first <= lowHz && last >= highHz) return 'full'
  return last < lowHz || first > highHz ? 'none' : 'partial'
}

/** The band edges that the sweep reaches, with interpolated SWR. */
function edgePoints(samples: readonly SwrSample[], { lowHz, highHz }: Edges): SwrSample[] {
  const first = samples[0]?.frequencyHz ?? 0
  const last = samples.at(-1)?.frequencyHz ?? 0
  return [lowHz, highHz]
    .filter((frequencyHz) => frequencyHz >= first && frequencyHz <= last)
    .map((frequencyHz) => ({ frequencyHz, swr: swrAt(samples, frequencyHz) }))
}
