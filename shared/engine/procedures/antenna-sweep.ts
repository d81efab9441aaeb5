/** Antenna SWR at the working points of each band; the worst point of a band decides. Source: the policy's limit. */
import type { Outcome } from '../outcome.ts'
import type { Band } from '../vocabulary.ts'
import { byBand } from './by-band.ts'
import { expandedUncertainty, type Accuracy } from './accuracy.ts'
import { figure, findingOf, judgeAtMost, judgementOf, type Judgement } from './judgement.ts'

export interface AntennaSweepInputs {
  readonly points: readonly { readonly band: Band; readonly frequencyMHz: number; readonly swr: number }[]
  readonly resonances?: readonly {
    readonly band: Band
    readonly frequencyMHz: number
    readonly swr?: number | undefined
  }[]
}

export interface AntennaSweepLimits {
  readonly maxSwr: number
}

export function judgeAntennaSweep(
  { points, resonances = [] }: AntennaSweepInputs,
  { maxSwr }: AntennaSweepLimits,
  analyzer: Accuracy | null,
): Outcome<Judgement> {
  const worst = byBand(points).map(([, list]) => list.reduce((a, b) => (b.swr > a.swr ? b : a)))
  const findings = worst.map(({ band, frequencyMHz, swr }) => {
    const uncertainty = expandedUncertainty(analyzer, swr)
    return findingOf({
      band,
      measure: 'swr',
      value: swr,
      uncertainty,
      finding: judgeAtMost(swr, maxSwr, uncertainty),
      limit: `SWR ${figure(maxSwr, 2)} at most`,
      text: `SWR ${figure(swr, 2)} at ${figure(frequencyMHz, 3)} MHz`,
    })
  })
  return judgementOf({ worst, resonances }, findings)
}
