/** Antenna SWR at the working points of each band; the worst point of a band decides. Source: the policy's limit. */
import type { Outcome } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { Band } from '../vocabulary.ts'
import { byBand } from './by-band.ts'
import { expandedUncertainty, type Accuracy } from './accuracy.ts'
import { figure, findingOf, judgeAtMost, judgementOf, type Judgement } from './judgement.ts'
import { compareWorst, type SweepBaseline, type WorstSwr } from './sweep-baseline.ts'

export interface AntennaSweepInputs {
  readonly source?: 'readings' | undefined
  readonly points: readonly { readonly band: Band; readonly frequencyMHz: number; readonly swr: number }[]
  readonly resonances?: readonly {
    readonly band: Band
    readonly frequencyMHz: number
    readonly swr?: number | undefined
  }[]
  readonly setsBaseline?: boolean | undefined
}

export interface AntennaSweepLimits {
  readonly maxSwr: number
}

interface Known {
  readonly analyzer: Accuracy | null
  readonly baseline: SweepBaseline | null
}

export function judgeAntennaSweep(
  { points, resonances = [], setsBaseline = false }: AntennaSweepInputs,
  limits: AntennaSweepLimits,
  { analyzer, baseline }: Known,
): Outcome<Judgement> {
  const worst = byBand(points).map(([, list]) => list.reduce((a, b) => (b.swr > a.swr ? b : a)))
  const findings = worst.map((point) => swrFinding(point, limits, expandedUncertainty(analyzer, point.swr)))
  const compared = compareWorst(setsBaseline ? null : baseline, worst)
  const results = { worst, resonances, ...(compared && { drift: compared.drift }) }
  return judgementOf(results, findings, compared?.warnings)
}

/** A total reflection is beyond every limit, whatever the uncertainty. */
export function swrFinding(
  { band, frequencyMHz, swr }: WorstSwr,
  { maxSwr }: AntennaSweepLimits,
  uncertainty: number | null,
): TestFinding {
  return findingOf({
    band,
    measure: 'swr',
    value: swr,
    uncertainty,
    finding: swr === null ? 'fail' : judgeAtMost(swr, maxSwr, uncertainty),
    limit: `SWR ${figure(maxSwr, 2)} at most`,
    text: `SWR ${swr === null ? 'beyond all measure' : figure(swr, 2)} at ${figure(frequencyMHz, 3)} MHz`,
  })
}
