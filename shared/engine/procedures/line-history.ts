/** What a feedline showed before and would show new, for the judgement of what it shows now. */
import { compareLine, wetLineSigns } from '../feedline-compare.ts'
import { matchedLoss } from '../feedline-loss.ts'
import { isFailure, type Warning } from '../outcome.ts'
import type { Band } from '../vocabulary.ts'
import { figure } from './judgement.ts'

export interface FeedlineReading {
  readonly band: Band
  readonly frequencyMHz?: number | undefined
  readonly lossDb: number
  readonly swrAtRadio?: number | undefined
}

/** What the line showed before. */
export interface FeedlineHistory {
  /** dB by band: of the newest test that set one, else of the item's own page. */
  readonly baselineDb: Partial<Record<Band, number>>
  /** SWR at the radio's end in that test, where it was read. */
  readonly baselineSwr?: Partial<Record<Band, number>>
  /** Readings of the newest earlier test. */
  readonly last: readonly FeedlineReading[]
}

/** What the line is: new cable of its kind and length is what it is compared with. */
export interface LineFacts {
  /** Key of `CABLES`. */
  readonly cable?: string | undefined
  readonly lengthM?: number | undefined
}

/** SWR is called better from this much on: below it lies in the reading. Our choice. */
const SWR_STEP = 0.05

/** A better SWR with more loss than last time or than the baseline, once a band. */
export function flatteredSwr(reading: FeedlineReading, history: FeedlineHistory): Warning[] {
  const sinceLast = betterThanLast(reading, history.last)
  return sinceLast.length > 0 ? sinceLast : betterThanBaseline(reading, history)
}

function betterThanLast(reading: FeedlineReading, last: readonly FeedlineReading[]): Warning[] {
  const before = last.find(({ band }) => band === reading.band)
  if (before?.swrAtRadio === undefined || reading.swrAtRadio === undefined) return []
  if (reading.swrAtRadio > before.swrAtRadio - SWR_STEP || reading.lossDb <= before.lossDb) return []
  const message =
    `${reading.band}: the SWR at the radio fell from ${figure(before.swrAtRadio, 2)} to ` +
    `${figure(reading.swrAtRadio, 2)} while the loss rose. Look for water in the line.`
  return [{ code: 'W_SWR_FLATTERS', message }]
}

function betterThanBaseline(
  { band, lossDb, swrAtRadio }: FeedlineReading,
  { baselineDb, baselineSwr = {} }: FeedlineHistory,
): Warning[] {
  const [beforeDb, beforeSwr] = [baselineDb[band], baselineSwr[band]]
  if (swrAtRadio === undefined || beforeDb === undefined || beforeSwr === undefined) return []
  const signs = wetLineSigns(
    { lossDb: beforeDb, swrAtTransmitter: beforeSwr },
    { lossDb, swrAtTransmitter: swrAtRadio },
  )
  if (isFailure(signs)) return []
  return signs.warnings.map(({ code, message }) => ({ code, message: `${band}: ${message}` }))
}

export interface AgainstNew {
  readonly band: Band
  readonly newDb: number
  readonly aboveNewDb: number
}

/** Against new cable, where its kind, its length and the frequency are known. */
export function againstNew(
  { band, frequencyMHz, lossDb }: FeedlineReading,
  { cable, lengthM }: LineFacts,
  uMeasuredDb: number,
): { readonly row: AgainstNew; readonly warnings: readonly Warning[] } | null {
  if (cable === undefined || lengthM === undefined || frequencyMHz === undefined) return null
  const asNew = matchedLoss({ cable, frequencyMhz: frequencyMHz, lengthM })
  if (isFailure(asNew)) return null
  const compared = compareLine({ measuredDb: lossDb, uMeasuredDb, newDb: asNew.matchedDb })
  if (isFailure(compared) || compared.aboveNewDb === null) return null
  const warnings = [...asNew.warnings, ...compared.warnings]
  return {
    row: { band, newDb: asNew.matchedDb, aboveNewDb: compared.aboveNewDb },
    warnings: warnings.map(({ code, message }) => ({ code, message: `${band}: ${message}` })),
  }
}
