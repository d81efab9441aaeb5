/**
 * Loss of a feedline against its baseline. Water and crushing raise the loss and, because the reflection comes back
 * weaker, improve the SWR at the radio's end: a better SWR than before is a warning, not good news.
 * Source: common practice, no source; the limit is the policy's.
 */
import type { Outcome, Warning } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { Band } from '../vocabulary.ts'
import { expandedUncertainty, type Accuracy } from './accuracy.ts'
import { figure, findingOf, judgeAtMost, judgementOf, type Judgement } from './judgement.ts'

export interface FeedlineReading {
  readonly band: Band
  readonly lossDb: number
  readonly swrAtRadio?: number | undefined
}

export interface FeedlineLossInputs {
  readonly readings: readonly FeedlineReading[]
  readonly setsBaseline: boolean
}

export interface FeedlineLossLimits {
  readonly maxRiseDb: number
}

/** What the line showed before. */
export interface FeedlineHistory {
  /** dB by band: of the newest test that set one, else of the item's own page. */
  readonly baselineDb: Partial<Record<Band, number>>
  /** Readings of the newest earlier test. */
  readonly last: readonly FeedlineReading[]
}

interface Known {
  readonly limits: FeedlineLossLimits
  readonly history: FeedlineHistory
  readonly instrument: Accuracy | null
}

/** SWR is called better from this much on: below it lies in the reading. Our choice. */
const SWR_STEP = 0.05

export function judgeFeedlineLoss(inputs: FeedlineLossInputs, known: Known): Outcome<Judgement> {
  const baselines = inputs.setsBaseline ? {} : known.history.baselineDb
  const findings = inputs.readings.map((reading) => lossFinding(reading, baselines[reading.band], known))
  const warnings = inputs.readings.flatMap((reading) => betterSwr(reading, known.history.last))
  return judgementOf({ readings: inputs.readings, baselineDb: baselines }, findings, warnings)
}

function lossFinding(
  { band, lossDb }: FeedlineReading,
  baselineDb: number | undefined,
  known: Known,
): TestFinding {
  const uncertainty = expandedUncertainty(known.instrument, lossDb)
  const loss = { band, measure: 'lossDb', value: lossDb, uncertainty }
  const text = `${figure(lossDb, 2)} dB`
  if (baselineDb === undefined) {
    const limit = 'none yet: this is the baseline'
    return findingOf({ ...loss, finding: 'pass', limit, text: `${text}, the baseline for later tests` })
  }
  const { maxRiseDb } = known.limits
  // Rounded to a millionth: 1.4 + 0.8 must not fail 2.2 for its binary fraction.
  const max = Number((baselineDb + maxRiseDb).toFixed(6))
  return findingOf({
    ...loss,
    finding: judgeAtMost(lossDb, max, uncertainty),
    limit: `${figure(max, 2)} dB: baseline ${figure(baselineDb, 2)} dB and ${figure(maxRiseDb, 2)} dB`,
    text: `${text}, ${figure(lossDb - baselineDb, 2)} dB over its baseline`,
  })
}

function betterSwr(reading: FeedlineReading, last: readonly FeedlineReading[]): Warning[] {
  const before = last.find(({ band }) => band === reading.band)
  if (before?.swrAtRadio === undefined || reading.swrAtRadio === undefined) return []
  if (reading.swrAtRadio > before.swrAtRadio - SWR_STEP || reading.lossDb <= before.lossDb) return []
  const message =
    `${reading.band}: the SWR at the radio fell from ${figure(before.swrAtRadio, 2)} to ` +
    `${figure(reading.swrAtRadio, 2)} while the loss rose. Look for water in the line.`
  return [{ code: 'W_SWR_FLATTERS', message }]
}
