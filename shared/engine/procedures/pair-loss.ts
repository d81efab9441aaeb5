/**
 * Efficiency of a transformer from two like ones back to back and two power readings a band. The figure is the mean
 * of both devices. Source: calculation sheet, sections 3 and 5.
 */
import { isFailure, type Outcome } from '../outcome.ts'
import { pairLossFromPowers, type PowerLoss } from '../pair-wattmeter.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { Band } from '../vocabulary.ts'
import { COVERAGE_FACTOR, relativeUncertainty, type Accuracy } from './accuracy.ts'
import {
  figure,
  findingOf,
  judgeAtLeast,
  judgementOf,
  percent,
  shareText,
  type Judgement,
} from './judgement.ts'

export interface PairReading {
  readonly band: Band
  /** Net forward power before and after the pair, W. */
  readonly inW: number
  readonly outW: number
}

export interface PairLossInputs {
  readonly source?: 'readings' | undefined
  readonly meters: 'one-moved' | 'two'
  readonly bands: readonly PairReading[]
}

export interface PairLossLimits {
  readonly minEfficiency: number
}

/** Two meters err each on its own; one moved meter shares its scale error, not its linearity. Our choice. */
const CORRELATION = { 'one-moved': 0.5, two: 0 } as const

/** `E_GAIN` when more comes out than went in, with the band in the message. */
export function judgePairLoss(
  { meters, bands }: PairLossInputs,
  limits: PairLossLimits,
  wattmeter: Accuracy | null,
): Outcome<Judgement> {
  const losses: (PowerLoss & { band: Band })[] = []
  for (const [index, { band, inW, outW }] of bands.entries()) {
    const loss = pairLossFromPowers({
      inW,
      outW,
      inRelative: relativeUncertainty(wattmeter, inW) ?? 0,
      outRelative: relativeUncertainty(wattmeter, outW) ?? 0,
      correlation: CORRELATION[meters],
    })
    if (isFailure(loss)) return { ...loss, message: `${band}: ${loss.message}`, line: index + 1 }
    losses.push({ band, ...loss })
  }
  const isKnown = relativeUncertainty(wattmeter, 1) !== null
  const findings = losses.map((loss) => efficiencyFinding(loss, limits, isKnown))
  // Without a known accuracy nothing can be called too small to measure.
  const warnings = isKnown ? losses.flatMap((loss) => loss.warnings) : []
  const results = losses.map(({ band, lossDb, efficiency, uLossDb, uEfficiency }) =>
    isKnown ? { band, lossDb, efficiency, uLossDb, uEfficiency } : { band, lossDb, efficiency },
  )
  return judgementOf({ bands: results }, findings, warnings)
}

function efficiencyFinding(
  { band, efficiency, lossDb, uEfficiency }: PowerLoss & { band: Band },
  { minEfficiency }: PairLossLimits,
  isKnown: boolean,
): TestFinding {
  const uncertainty = isKnown ? COVERAGE_FACTOR * uEfficiency : null
  return findingOf({
    band,
    measure: 'efficiency',
    value: efficiency,
    uncertainty,
    finding: judgeAtLeast(efficiency, minEfficiency, uncertainty),
    limit: `${percent(minEfficiency)} at least`,
    text: `${shareText(efficiency, minEfficiency)} efficient, ${figure(lossDb, 2)} dB lost`,
  })
}
