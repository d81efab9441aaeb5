/** The per-band efficiency of a transformer out of a sweep, judged at the worst point of each band. */
import { efficiencyInBand, type BandEfficiency, type EfficiencyFigures } from '../efficiency-by-band.ts'
import { isFailure, type Outcome, type Warning } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { SweepPoint } from '../sweep-point.ts'
import type { Band } from '../vocabulary.ts'
import { COVERAGE_FACTOR } from './accuracy.ts'
import { bandWarnings, inBand, megahertz, resultAt, type JudgedBand } from './judged-bands.ts'
import { figure, findingOf, judgeAtLeast, percent, shareText } from './judgement.ts'
import type { PairLossLimits } from './pair-loss.ts'

type Figures = EfficiencyFigures & { readonly warnings: readonly Warning[] }

export interface BandRow<T> {
  readonly band: Band
  readonly found: BandEfficiency
  /** Everything that is known at the worst point. */
  readonly at: T
}

/** A row a band; a band without a usable point is refused with the reason of its first point. */
export function efficiencyRows<T extends Figures>(
  points: readonly SweepPoint<T>[],
  bands: readonly JudgedBand[],
): Outcome<{ rows: BandRow<T>[]; warnings: Warning[] }> {
  const rows: BandRow<T>[] = []
  for (const band of bands) {
    const found = efficiencyInBand(points, band)
    if (isFailure(found)) return inBand(found, band.name)
    const at = resultAt(points, found.worst.frequencyHz)
    if (at) rows.push({ band: band.name, found, at })
  }
  return { rows, warnings: bands.flatMap((band) => bandWarnings(points, band)) }
}

/** The figures that every efficiency by file stores. */
export function storedEfficiency<T>({ band, found }: BandRow<T>) {
  const { worst, medianEfficiency, points, refusedPoints } = found
  return { band, ...worst, medianEfficiency, points, refusedPoints }
}

export function fileEfficiencyFinding<T>(
  { band, found: { worst } }: BandRow<T>,
  { minEfficiency }: PairLossLimits,
): TestFinding {
  const { efficiency, lossDb, frequencyHz } = worst
  const uncertainty = COVERAGE_FACTOR * worst.uEfficiency
  return findingOf({
    band,
    measure: 'efficiency',
    value: efficiency,
    uncertainty,
    finding: judgeAtLeast(efficiency, minEfficiency, uncertainty),
    limit: `${percent(minEfficiency)} at least`,
    text:
      `${shareText(efficiency, minEfficiency)} efficient (± ${percent(uncertainty, 1)}) at ` +
      `${figure(megahertz(frequencyHz), 3)} MHz, ${figure(lossDb, 2)} dB lost`,
  })
}
