/**
 * A sweep against the antenna's baseline. A lossier line lowers the SWR, so that "better on every band" is a warning
 * and not good news. Source: calculation sheet, section 7.
 */
import { BAND_TABLE, bandEdges } from '../band-edges.ts'
import { isFailure, type Warning } from '../outcome.ts'
import type { PlainDate } from '../plain-date.ts'
import type { ReflectionSweep } from '../reflection-sweep.ts'
import { lineLossWarnings, sweepDrift, type DriftBand } from '../sweep-drift.ts'
import type { Band } from '../vocabulary.ts'
import { DEFAULT_REGION, type JudgedBand } from './judged-bands.ts'

export interface WorstSwr {
  readonly band: Band
  readonly frequencyMHz: number
  /** Null: a total reflection. */
  readonly swr: number | null
}

/** The sweep that this antenna is compared with. */
export interface SweepBaseline {
  readonly testId: string
  readonly performedOn: PlainDate
  /** The attachment that it was read from; null when it was entered by hand. */
  readonly file: string | null
  readonly worst: readonly WorstSwr[]
}

/** What changed, new minus baseline; shifts of the minimum only where both are files. */
export interface SweepChange {
  readonly baselineTestId: string
  readonly baselineOn: PlainDate
  readonly bands: readonly {
    readonly band: Band
    readonly worstSwrChange: number | null
    readonly lowestShiftHz: number | null
    readonly largestSwrChange: number | null
    readonly rmsMagnitudeChange: number | null
  }[]
}

export interface Compared {
  readonly drift: SweepChange
  readonly warnings: readonly Warning[]
}

/** Null when there is no baseline, or nothing in common with it. */
export function compareWorst(baseline: SweepBaseline | null, worst: readonly WorstSwr[]): Compared | null {
  if (!baseline) return null
  const bands = worst.flatMap(({ band, swr }) => {
    const before = baseline.worst.find((one) => one.band === band)
    return before ? [{ ...NOTHING_ELSE, band, worstSwrChange: change(before.swr, swr) }] : []
  })
  if (bands.length === 0) return null
  const warnings = lineLossWarnings(bands.map((row) => ({ ...row, band: edgesOf(row.band) })))
  return { drift: { ...named(baseline), bands }, warnings }
}

/** Two files: every sample counts. Falls back on the worst points where the sweeps do not overlap. */
export function compareSweeps(
  baseline: SweepBaseline | null,
  sweeps: { readonly before: ReflectionSweep | null; readonly now: ReflectionSweep },
  judged: { readonly bands: readonly JudgedBand[]; readonly worst: readonly WorstSwr[] },
): Compared | null {
  if (!baseline || !sweeps.before) return compareWorst(baseline, judged.worst)
  const drift = sweepDrift(sweeps.before, sweeps.now, judged.bands)
  if (isFailure(drift) || drift.bands.length === 0) return compareWorst(baseline, judged.worst)
  const bands = drift.bands.map(({ band, before: _before, now: _now, ...rest }) => ({
    band: band.name,
    ...rest,
  }))
  return { drift: { ...named(baseline), bands }, warnings: drift.warnings }
}

const NOTHING_ELSE = { lowestShiftHz: null, largestSwrChange: null, rmsMagnitudeChange: null } as const

const named = ({ testId, performedOn }: SweepBaseline) => ({
  baselineTestId: testId,
  baselineOn: performedOn,
})

function change(before: number | null, now: number | null): number | null {
  return before === null || now === null ? null : now - before
}

/** Only the order of bands matters here, which is the same in every region. */
function edgesOf(band: Band): DriftBand {
  return bandEdges(BAND_TABLE, DEFAULT_REGION, band) ?? { lowHz: 0, highHz: 0 }
}
