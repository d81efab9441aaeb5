import { lossWithSwr } from './feedline-loss.ts'
import { checkNumber, isFailure, type Outcome, type Warning } from './outcome.ts'

/** A line's loss against what it would be new and against its own baseline, all at one frequency, dB. */
export interface LineComparison {
  /** Null where there is nothing to compare with. */
  readonly aboveNewDb: number | null
  readonly aboveBaselineDb: number | null
  readonly warnings: readonly Warning[]
}

export interface LineFigures {
  readonly measuredDb: number
  /** Standard uncertainty of the measured figure. */
  readonly uMeasuredDb: number
  /** New cable of this kind and length. */
  readonly newDb?: number
  readonly baselineDb?: number
}

/**
 * Differences in dB; figures 0..1000 dB, uncertainty 0..100 dB. `W_BELOW_NEW` when the line measures better
 * than new by more than 2 u: the cable, its length or the reading is not what it is taken for.
 */
export function compareLine({
  measuredDb,
  uMeasuredDb,
  newDb,
  baselineDb,
}: LineFigures): Outcome<LineComparison> {
  const bad =
    checkNumber('measuredDb', measuredDb, 0, 1000) ??
    checkNumber('uMeasuredDb', uMeasuredDb, 0, 100) ??
    checkNumber('newDb', newDb ?? 0, 0, 1000) ??
    checkNumber('baselineDb', baselineDb ?? 0, 0, 1000)
  if (bad) return bad
  const aboveNewDb = newDb === undefined ? null : measuredDb - newDb
  const isBelowNew = aboveNewDb !== null && aboveNewDb < -2 * uMeasuredDb
  const message = 'Less loss than new cable: check the kind of cable, its length and the reading.'
  return {
    aboveNewDb,
    aboveBaselineDb: baselineDb === undefined ? null : measuredDb - baselineDb,
    warnings: isBelowNew ? [{ code: 'W_BELOW_NEW', message }] : [],
  }
}

/** One test of a line with its antenna: matched loss in dB, SWR at the transmitter. */
export interface LineState {
  readonly lossDb: number
  readonly swrAtTransmitter: number
}

export interface WetLine {
  /** Loss up while the SWR looks better. */
  readonly isSuspected: boolean
  readonly lossRiseDb: number
  /**
   * SWR the transmitter would now see if only the loss had changed; null when the baseline itself is
   * impossible.
   */
  readonly expectedSwr: number | null
  readonly warnings: readonly Warning[]
}

/** A smaller rise is within the spread of a field measurement. Our choice. */
const MIN_RISE_DB = 0.3

/**
 * A wet or damaged line hides the antenna's mismatch from the transmitter: loss up by more than `minRiseDb`
 * (0..100 dB, default 0.3) since the baseline while the SWR got better is `W_WET_LINE`. Losses 0..1000 dB,
 * SWR 1 or more. Source: section 8's formula (ARRL Antenna Book, from memory, verify); the threshold is our
 * choice.
 */
export function wetLineSigns(baseline: LineState, now: LineState, minRiseDb = MIN_RISE_DB): Outcome<WetLine> {
  const bad =
    checkNumber('minRiseDb', minRiseDb, 0, 100) ?? checkState('baseline', baseline) ?? checkState('now', now)
  if (bad) return bad
  const lossRiseDb = now.lossDb - baseline.lossDb
  const isSuspected = lossRiseDb > minRiseDb && now.swrAtTransmitter < baseline.swrAtTransmitter
  const expectedSwr = swrAfterRise(baseline, now.lossDb)
  return {
    isSuspected,
    lossRiseDb,
    expectedSwr,
    warnings: isSuspected ? [wetLine(lossRiseDb, now, expectedSwr)] : [],
  }
}

function swrAfterRise(baseline: LineState, lossDb: number): number | null {
  const before = lossWithSwr(baseline.lossDb, { swrAtTransmitter: baseline.swrAtTransmitter })
  if (isFailure(before)) return null
  const after = lossWithSwr(lossDb, { swrAtLoad: before.swrAtLoad })
  return isFailure(after) ? null : after.swrAtTransmitter
}

function checkState(name: string, state: LineState): ReturnType<typeof checkNumber> {
  return (
    checkNumber(`${name}.lossDb`, state.lossDb, 0, 1000) ??
    checkNumber(`${name}.swrAtTransmitter`, state.swrAtTransmitter, 1, 1e6)
  )
}

function wetLine(riseDb: number, { swrAtTransmitter }: LineState, expectedSwr: number | null): Warning {
  const expected = expectedSwr === null ? '' : ` The loss alone would show ${expectedSwr.toFixed(2)}.`
  const message =
    `The loss rose by ${riseDb.toFixed(1)} dB while the SWR fell to ${swrAtTransmitter.toFixed(2)}: ` +
    `the line hides the antenna and may be wet.${expected}`
  return { code: 'W_WET_LINE', message }
}
