/**
 * An antenna from its one-port file: per band the worst SWR, at the working points where they are named and else over
 * the whole band, with what the analyzer's error makes of it. Source: calculation sheet, section 7.
 */
import { failure, isFailure, type Outcome, type Warning } from '../outcome.ts'
import { swrOfSweep, type ReflectionPoint, type ReflectionSweep } from '../reflection-sweep.ts'
import { renormaliseGamma } from '../renormalise.ts'
import type { SwrSample } from '../swr-sweep.ts'
import { valueAt, type TouchstoneFile } from '../touchstone/touchstone-file.ts'
import type { Band } from '../vocabulary.ts'
import { COVERAGE_FACTOR, reflectionErrorOf } from './accuracy.ts'
import { antennaBand, type AntennaBand, type WorkingPoint } from './antenna-bands.ts'
import { swrFinding, type AntennaSweepLimits } from './antenna-sweep.ts'
import type { FileKnowledge } from './file-knowledge.ts'
import { judgedBands, leftOutWarnings, megahertz } from './judged-bands.ts'
import { figure, judgementOf, type Judgement } from './judgement.ts'
import { compareSweeps, type SweepBaseline } from './sweep-baseline.ts'
import { fileOf } from './test-files.ts'

export interface AntennaFileInputs {
  readonly source: 'file'
  readonly file: string
  readonly bands: readonly Band[]
  readonly workingPoints?: readonly WorkingPoint[] | undefined
  readonly setsBaseline: boolean
}

interface Known extends FileKnowledge {
  readonly baseline: SweepBaseline | null
}

/** `TS_PORTS`, `E_ACTIVE` with the frequency, `E_TOO_FEW`, and failures of `antennaBand`. */
export function judgeAntennaByFile(
  inputs: AntennaFileInputs,
  limits: AntennaSweepLimits,
  known: Known,
): Outcome<Judgement> {
  const file = fileOf(known.files, 'file', inputs.file)
  if (isFailure(file)) return file
  const judged = judgedBands(inputs.bands, known.region)
  if (isFailure(judged)) return judged
  const now = reflectionsOf(file)
  if (isFailure(now)) return now
  const samples = samplesOf(now)
  if (isFailure(samples)) return samples
  const bands: AntennaBand[] = []
  for (const one of judged) {
    const band = antennaBand(samples, one, inputs.workingPoints ?? [])
    if (isFailure(band)) return band
    bands.push(band)
  }
  const worst = bands.map((band) => band.worst)
  const compared = compareSweeps(
    inputs.setsBaseline ? null : known.baseline,
    { before: baselineSweep(known), now },
    { bands: judged, worst },
  )
  const error = reflectionErrorOf(known.instrument)
  const results = {
    worst,
    resonances: bands.map(({ lowest }) => lowest),
    bands: bands.map(({ worst: { band }, lowest: _lowest, ...rest }) => ({ ...rest, band })),
    ...(compared && { drift: compared.drift }),
  }
  return judgementOf(
    results,
    worst.map((point) => swrFinding(point, limits, expandedSwr(point.swr, error))),
    [
      ...bands.flatMap(partialBand),
      ...leftOutWarnings('Working points', inputs.workingPoints ?? [], inputs.bands),
      ...(compared?.warnings ?? []),
    ],
  )
}

/** Reflections of a one-port file against 50 ohm. */
function reflectionsOf(file: TouchstoneFile): Outcome<ReflectionSweep> {
  if (file.ports !== 1)
    return failure('TS_PORTS', 'An antenna is swept with a one-port file (.s1p).', { field: 'file' })
  const points: ReflectionPoint[] = []
  for (const [at, frequencyHz] of file.frequencyHz.entries()) {
    const gamma = renormaliseGamma(valueAt(file.s11, at), file.referenceOhm[0] ?? 50, 50)
    if (isFailure(gamma)) return atFrequency(gamma, frequencyHz)
    points.push({ frequencyHz, gamma })
  }
  return { referenceOhm: 50, points }
}

function samplesOf(sweep: ReflectionSweep): Outcome<SwrSample[]> {
  const samples = swrOfSweep(sweep)
  if (!isFailure(samples)) return samples
  return atFrequency(samples, sweep.points[(samples.line ?? 0) - 1]?.frequencyHz)
}

function atFrequency(
  { code, message }: { readonly code: string; readonly message: string },
  hz: number | undefined,
): Outcome<never> {
  const where = hz === undefined ? '' : `At ${figure(megahertz(hz), 4)} MHz: `
  return failure(code, `${where}${message}`, { field: 'file' })
}

/** `|Gamma| = (s-1)/(s+1)`, so that an error d of it is an error `d (s+1)^2 / 2` of the SWR. */
function expandedSwr(swr: number | null, error: number): number | null {
  return swr === null ? null : (COVERAGE_FACTOR * error * (swr + 1) ** 2) / 2
}

function partialBand({ coverage, worst: { band } }: AntennaBand): Warning[] {
  if (coverage === 'full') return []
  return [{ code: 'W_PARTIAL_BAND', message: `${band}: the sweep covers a part of the band only.` }]
}

function baselineSweep({ baseline, files }: Known): ReflectionSweep | null {
  const file = baseline?.file ? files[baseline.file] : undefined
  const sweep = file ? reflectionsOf(file) : null
  return sweep === null || isFailure(sweep) ? null : sweep
}
