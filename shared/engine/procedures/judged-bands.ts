/** Bands that are judged from a sweep: their edges, their worst points, and what was said about their points. */
import { BAND_TABLE, bandEdges, type BandRegion } from '../band-edges.ts'
import type { FrequencyBand } from '../efficiency-by-band.ts'
import { failure, isFailure, type Outcome, type Warning } from '../outcome.ts'
import type { SweepPoint } from '../sweep-point.ts'
import { BANDS, type Band } from '../vocabulary.ts'

export interface JudgedBand extends FrequencyBand {
  readonly name: Band
}

/** Where nothing else is known: our choice, the widest of the regions. */
export const DEFAULT_REGION: BandRegion = 'itu-2'

/** In wavelength order. `E_BAND` for a band that the region does not have. */
export function judgedBands(bands: readonly Band[], region: BandRegion): Outcome<JudgedBand[]> {
  const judged: JudgedBand[] = []
  for (const name of BANDS.filter((band) => bands.includes(band))) {
    const edges = bandEdges(BAND_TABLE, region, name)
    if (!edges)
      return failure('E_BAND', `${name} is not allocated where this group transmits.`, { field: 'bands' })
    judged.push({ name, lowHz: edges.lowHz, highHz: edges.highHz })
  }
  return judged
}

/** A failure that is about one band. */
export function inBand(
  { code, message }: { readonly code: string; readonly message: string },
  band: Band,
): Outcome<never> {
  return failure(code, `${band}: ${message}`, { field: 'bands' })
}

/** The usable result at a frequency that came out of the same points. */
export function resultAt<T>(points: readonly SweepPoint<T>[], frequencyHz: number): T | undefined {
  const result = points.find((point) => point.frequencyHz === frequencyHz)?.result
  return result === undefined || isFailure(result) ? undefined : result
}

/** Each kind of warning once a band, with the number of points that it is about. */
export function bandWarnings(
  points: readonly SweepPoint<{ readonly warnings: readonly Warning[] }>[],
  { name, lowHz, highHz }: JudgedBand,
): Warning[] {
  const counted = new Map<string, { message: string; count: number }>()
  for (const { frequencyHz, result } of points) {
    if (frequencyHz < lowHz || frequencyHz > highHz) continue
    for (const { code, message } of warningsOf(result)) {
      const known = counted.get(code)
      if (known) known.count += 1
      else counted.set(code, { message, count: 1 })
    }
  }
  return [...counted].map(([code, { message, count }]) => ({
    code,
    message: `${name}: ${message}${count > 1 ? ` (${count} points)` : ''}`,
  }))
}

function warningsOf(result: Outcome<{ readonly warnings: readonly Warning[] }>): readonly Warning[] {
  if (!isFailure(result)) return result.warnings
  return [{ code: 'W_POINTS_REFUSED', message: `left out: ${result.message}` }]
}

/** What was entered for bands that are not judged: said, so that nobody takes it for looked at. */
export function leftOutWarnings(
  what: string,
  entered: readonly { readonly band: Band }[],
  judged: readonly Band[],
): Warning[] {
  const left = BANDS.filter((band) => !judged.includes(band) && entered.some((one) => one.band === band))
  if (left.length === 0) return []
  const message = `${what} on ${left.join(', ')}: left out, because that is no band to be judged. Choose it as well.`
  return [{ code: 'W_LEFT_OUT', message }]
}

export const megahertz = (hz: number) => hz / 1e6
