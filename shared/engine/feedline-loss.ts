import { findCable, type Cable } from './feedline-cable.ts'
import { checkNumber, failure, isFailure, type Outcome, type Warning } from './outcome.ts'
import { magnitudeFromSwr, swrOf } from './reflection.ts'

export interface CableRun {
  /** Key of the cable: `rg-58`. */
  readonly cable: string
  /** 1..1000 MHz */
  readonly frequencyMhz: number
  /** 0..10 000 m */
  readonly lengthM: number
}

/** SWR against 50 ohm at one end of the line; give one of the two. Infinity is a total reflection. */
export interface LineSwr {
  readonly swrAtLoad?: number
  readonly swrAtTransmitter?: number
}

export interface LineLoss {
  /** Loss into a matched load, dB. */
  readonly matchedDb: number
  /** Loss with the SWR there is, dB; Infinity for a total reflection at the load. */
  readonly totalDb: number
  readonly extraDb: number
  readonly swrAtLoad: number
  readonly swrAtTransmitter: number
  readonly warnings: readonly Warning[]
}

const FEET_100_IN_METRES = 30.48
const NO_SIGNAL_DB = 30
const THIN_COAX_BELOW_MHZ = 10

/**
 * Matched loss of a new cable at 20 C in dB: `ML = (k1 sqrt(f) + k2 f) l / 30.48`, f in MHz, l in m.
 * `E_CABLE`, `E_RANGE` outside 1..1000 MHz or for a negative length. `W_THIN_COAX` for thin cable below 10
 * MHz. Copper adds 0.2 % of the loss per K. Source of the coefficients: see `CABLES`.
 */
export function matchedLoss(run: CableRun): Outcome<{ matchedDb: number; warnings: Warning[] }> {
  const cable = findCable(run.cable)
  if (isFailure(cable)) return cable
  const bad =
    checkNumber('frequencyMhz', run.frequencyMhz, 1, 1000) ?? checkNumber('lengthM', run.lengthM, 0, 10_000)
  if (bad) return bad
  const { frequencyMhz, lengthM } = run
  const per100ftDb = cable.k1 * Math.sqrt(frequencyMhz) + cable.k2 * frequencyMhz
  return { matchedDb: (per100ftDb * lengthM) / FEET_100_IN_METRES, warnings: thinCoax(cable, frequencyMhz) }
}

/** Matched and total loss of a new cable with the SWR at one of its ends; errors of both steps. */
export function feedlineLoss(run: CableRun & LineSwr): Outcome<LineLoss> {
  const matched = matchedLoss(run)
  if (isFailure(matched)) return matched
  const loss = lossWithSwr(matched.matchedDb, run)
  return isFailure(loss) ? loss : { ...loss, warnings: [...matched.warnings, ...loss.warnings] }
}

/**
 * Total loss of a line of `matchedDb` (0..100 000 dB) with an SWR: with `a = 10^(ML/10)` and `rho = |Gamma|`
 * at the load, `10 log((a^2 - rho^2)/(a (1 - rho^2)))`; at the transmitter `rho/a`. `E_MISSING` without an
 * SWR, `E_AMBIGUOUS` with both, `E_RANGE` below 1, `E_IMPOSSIBLE` when the line is too lossy for the SWR at
 * the transmitter. `W_NO_SIGNAL` above 30 dB. Holds for a real Z0 only.
 * Source: ARRL Antenna Book, transmission-line chapter (from memory, verify the page).
 */
export function lossWithSwr(matchedDb: number, swr: LineSwr): Outcome<LineLoss> {
  const bad = checkNumber('matchedDb', matchedDb, 0, 100_000)
  if (bad) return bad
  // 1/a rather than a: it underflows to 0 where a would overflow.
  const share = 10 ** (-matchedDb / 10)
  const rho = reflectionAtLoad(swr, share)
  if (isFailure(rho)) return rho
  const rhoIn = rho * share
  const extraDb = share === 1 ? 0 : 10 * Math.log10((1 - rhoIn * rhoIn) / (1 - rho * rho))
  const totalDb = matchedDb + extraDb
  return {
    matchedDb,
    totalDb,
    extraDb,
    swrAtLoad: swrOf(rho),
    swrAtTransmitter: swrOf(rhoIn),
    warnings: totalDb > NO_SIGNAL_DB ? [noSignal(totalDb)] : [],
  }
}

function reflectionAtLoad({ swrAtLoad, swrAtTransmitter }: LineSwr, share: number): Outcome<number> {
  if (swrAtLoad !== undefined && swrAtTransmitter !== undefined) {
    return failure('E_AMBIGUOUS', 'Give the SWR at one end of the line, not at both.', { field: 'swrAtLoad' })
  }
  if (swrAtTransmitter === undefined) return magnitudeFromSwr(swrAtLoad as number, 'swrAtLoad')
  const rhoIn = magnitudeFromSwr(swrAtTransmitter, 'swrAtTransmitter')
  if (isFailure(rhoIn) || rhoIn === 0) return rhoIn
  if (rhoIn < share) return rhoIn / share
  const message = 'This line is too lossy for that SWR at the transmitter: check cable, length or reading.'
  return failure('E_IMPOSSIBLE', message, { field: 'swrAtTransmitter' })
}

function thinCoax({ isThin, name }: Cable, frequencyMhz: number): Warning[] {
  if (!isThin || frequencyMhz >= THIN_COAX_BELOW_MHZ) return []
  return [{ code: 'W_THIN_COAX', message: `${name} below 10 MHz may be a quarter higher.` }]
}

function noSignal(totalDb: number): Warning {
  const size = totalDb === Infinity ? 'Everything' : `${totalDb.toFixed(0)} dB`
  return { code: 'W_NO_SIGNAL', message: `${size} is lost in the line: next to nothing arrives.` }
}
