/**
 * Loss of a feedline against its baseline. Water and crushing raise the loss and, because the reflection comes back
 * weaker, improve the SWR at the radio's end: a better SWR than before is a warning, not good news.
 * Source: common practice, no source; the limit is the policy's.
 */
import type { Outcome } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import { COVERAGE_FACTOR, standardUncertainty, type Accuracy } from './accuracy.ts'
import { figure, findingOf, judgeAtMost, judgementOf, type Judgement } from './judgement.ts'
import {
  againstNew,
  flatteredSwr,
  type FeedlineHistory,
  type FeedlineReading,
  type LineFacts,
} from './line-history.ts'

export interface FeedlineLossInputs {
  readonly source?: 'readings' | undefined
  readonly readings: readonly FeedlineReading[]
  readonly setsBaseline: boolean
}

export interface FeedlineLossLimits {
  readonly maxRiseDb: number
}

export interface KnownLine {
  readonly limits: FeedlineLossLimits
  readonly history: FeedlineHistory
  readonly line: LineFacts
}

/** A reading with its standard uncertainty, dB; null where the instrument's accuracy is not known. */
export interface LineReading extends FeedlineReading {
  readonly uLossDb: number | null
}

export function judgeFeedlineLoss(
  { readings, setsBaseline }: FeedlineLossInputs,
  known: KnownLine & { readonly instrument: Accuracy | null },
): Outcome<Judgement> {
  const read = readings.map((reading) => ({
    ...reading,
    uLossDb: standardUncertainty(known.instrument, reading.lossDb),
  }))
  return judgeLine(read, setsBaseline, known)
}

/** The same for readings that an instrument or a file gave. */
export function judgeLine(
  readings: readonly LineReading[],
  setsBaseline: boolean,
  { limits, history, line }: KnownLine,
): Judgement {
  const baselines = setsBaseline ? {} : history.baselineDb
  const used = readings.flatMap(({ band }) => {
    const baselineDb = baselines[band]
    return baselineDb === undefined ? [] : [[band, baselineDb] as const]
  })
  const findings = readings.map((reading) => lossFinding(reading, baselines[reading.band], limits))
  const asNew = readings.flatMap((reading) => againstNew(reading, line, reading.uLossDb ?? 0) ?? [])
  const warnings = readings.flatMap((reading) => flatteredSwr(reading, history))
  const read = readings.map(({ uLossDb: _, ...reading }) => reading)
  const results = {
    readings: read,
    baselineDb: Object.fromEntries(used),
    ...(asNew.length > 0 && { againstNew: asNew.map(({ row }) => row) }),
  }
  return judgementOf(results, findings, [...warnings, ...asNew.flatMap((one) => one.warnings)])
}

function lossFinding(
  { band, lossDb, uLossDb }: LineReading,
  baselineDb: number | undefined,
  { maxRiseDb }: FeedlineLossLimits,
): TestFinding {
  const uncertainty = uLossDb === null ? null : COVERAGE_FACTOR * uLossDb
  const loss = { band, measure: 'lossDb', value: lossDb, uncertainty }
  const text = `${figure(lossDb, 2)} dB`
  if (baselineDb === undefined) {
    const limit = 'none yet: this is the baseline'
    return findingOf({ ...loss, finding: 'pass', limit, text: `${text}, the baseline for later tests` })
  }
  // Rounded to a millionth: 1.4 + 0.8 must not fail 2.2 for its binary fraction.
  const max = Number((baselineDb + maxRiseDb).toFixed(6))
  const side = lossDb < baselineDb ? 'under' : 'over'
  return findingOf({
    ...loss,
    finding: judgeAtMost(lossDb, max, uncertainty),
    limit: `${figure(max, 2)} dB: baseline ${figure(baselineDb, 2)} dB and ${figure(maxRiseDb, 2)} dB`,
    text: `${text}, ${figure(Math.abs(lossDb - baselineDb), 2)} dB ${side} its baseline`,
  })
}
