/**
 * How an antenna has changed since its baseline. A different feedline length turns the phase of gamma but
 * hardly its size; a lossier line lowers SWR, so "better" on every band is suspicious.
 * Source: calculation sheet, section 7.
 */
import { bandSwr, samplesWithin, type BandSwr } from './band-swr.ts'
import { checkPositive } from './check-range.ts'
import { failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'
import {
  resample,
  sizeOfGamma,
  swrOfSweep,
  type ReflectionPoint,
  type ReflectionSweep,
} from './reflection-sweep.ts'
import { sweepMinimum, type SwrSample } from './swr-sweep.ts'

export interface DriftBand {
  readonly lowHz: number
  readonly highHz: number
}

/** New minus baseline. Null where an SWR is infinite. */
export interface BandDrift<B extends DriftBand> {
  readonly band: B
  readonly before: BandSwr
  readonly now: BandSwr
  readonly lowestShiftHz: number
  readonly worstSwrChange: number | null
  readonly largestSwrChange: number | null
  readonly rmsMagnitudeChange: number
}

export interface SweepDrift<B extends DriftBand> {
  /** Of the minimum of the whole common range. */
  readonly lowestShiftHz: number
  readonly lowestSwrChange: number | null
  /** Bands with two samples or more in the common range, in the order given. */
  readonly bands: readonly BandDrift<B>[]
  /** `W_LINE_LOSS` (our choice): the worst SWR of every band fell, that of the top band most. */
  readonly warnings: readonly Warning[]
}

/**
 * The new sweep is put on the baseline's frequencies first. `E_GRID` when they do not overlap by two
 * points, `E_REFERENCE` for different reference resistances (renormalise first), `E_ACTIVE`, `E_TOO_FEW`.
 */
export function sweepDrift<B extends DriftBand>(
  baseline: ReflectionSweep,
  next: ReflectionSweep,
  bands: readonly B[],
): Outcome<SweepDrift<B>> {
  const bad = checkPair(baseline, next)
  if (bad) return bad
  const gridHz = baseline.points.map((point) => point.frequencyHz)
  const now = resample(next.points, gridHz)
  if (now.length < 2)
    return failure('E_GRID', 'The two sweeps do not cover the same frequencies.', { field: 'points' })
  const common = { lowHz: now[0]?.frequencyHz ?? 0, highHz: now.at(-1)?.frequencyHz ?? 0 }
  const pair = sweepPair(samplesWithin(baseline.points, common), now)
  if (isFailure(pair)) return pair
  const lowest = lowestChange(pair)
  const drifts = bands.map((band) => bandDrift(pair, band)).filter((drift) => drift !== null)
  return { ...lowest, bands: drifts, warnings: lineLossWarnings(drifts) }
}

/** The same frequencies twice, as reflections and as SWR. */
interface SweepPair {
  readonly before: readonly ReflectionPoint[]
  readonly now: readonly ReflectionPoint[]
  readonly beforeSwr: readonly SwrSample[]
  readonly nowSwr: readonly SwrSample[]
}

function checkPair(baseline: ReflectionSweep, next: ReflectionSweep): Failure | undefined {
  for (const sweep of [baseline, next]) {
    const badReference = checkPositive('referenceOhm', sweep?.referenceOhm, 1e6)
    if (badReference) return badReference
    const samples = swrOfSweep(sweep)
    if (isFailure(samples)) return samples
  }
  if (baseline.referenceOhm === next.referenceOhm) return undefined
  const message = `The sweeps refer to ${baseline.referenceOhm} and ${next.referenceOhm} ohm: renormalise first.`
  return failure('E_REFERENCE', message, { field: 'referenceOhm' })
}

function sweepPair(before: readonly ReflectionPoint[], now: readonly ReflectionPoint[]): Outcome<SweepPair> {
  const beforeSwr = swrOfSweep({ referenceOhm: 50, points: before })
  const nowSwr = swrOfSweep({ referenceOhm: 50, points: now })
  if (isFailure(beforeSwr)) return beforeSwr
  if (isFailure(nowSwr)) return nowSwr
  return { before, now, beforeSwr, nowSwr }
}

function lowestChange({ beforeSwr, nowSwr }: SweepPair): {
  lowestShiftHz: number
  lowestSwrChange: number | null
} {
  const [before, now] = [sweepMinimum(beforeSwr), sweepMinimum(nowSwr)]
  if (isFailure(before) || isFailure(now)) return { lowestShiftHz: 0, lowestSwrChange: null }
  return { lowestShiftHz: now.frequencyHz - before.frequencyHz, lowestSwrChange: change(before.swr, now.swr) }
}

function bandDrift<B extends DriftBand>(pair: SweepPair, band: B): BandDrift<B> | null {
  const before = bandSwr(pair.beforeSwr, band)
  const now = bandSwr(pair.nowSwr, band)
  if (isFailure(before) || isFailure(now) || !before.figures || !now.figures) return null
  const [was, is] = [samplesWithin(pair.beforeSwr, band), samplesWithin(pair.nowSwr, band)]
  const changes = is.map((sample, i) => Math.abs(change(was[i]?.swr ?? 1, sample.swr) ?? Infinity))
  const largest = changes.reduce((most, value) => Math.max(most, value), 0)
  const sizes = samplesWithin(pair.before, band).map(sizeOfGamma)
  const squares = samplesWithin(pair.now, band).map((point, i) => (sizeOfGamma(point) - (sizes[i] ?? 0)) ** 2)
  return {
    band,
    before,
    now,
    lowestShiftHz: now.figures.lowestAtHz - before.figures.lowestAtHz,
    worstSwrChange: change(before.figures.worstSwr, now.figures.worstSwr),
    largestSwrChange: Number.isFinite(largest) ? largest : null,
    rmsMagnitudeChange: Math.sqrt(squares.reduce((sum, value) => sum + value, 0) / squares.length),
  }
}

function change(before: number, now: number): number | null {
  return Number.isFinite(before) && Number.isFinite(now) ? now - before : null
}

/** From two bands on: with one there is no top band to have fallen most. */
export function lineLossWarnings(
  drifts: readonly Pick<BandDrift<DriftBand>, 'band' | 'worstSwrChange'>[],
): Warning[] {
  const rising = drifts.toSorted((a, b) => a.band.lowHz - b.band.lowHz)
  const changes = rising.map((drift) => drift.worstSwrChange ?? 0)
  const top = changes.at(-1) ?? 0
  const suspicious = changes.length >= 2 && changes.every((value) => value < 0 && value >= top)
  const message = 'SWR is better on every band, most on the highest: a wet or lossy feedline does that.'
  return suspicious ? [{ code: 'W_LINE_LOSS', message }] : []
}
