import { isFiniteComplex, magnitude, subtract, type Complex } from './complex.ts'
import { efficiencyUncertainty } from './efficiency-uncertainty.ts'
import { failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'
import { DEFAULT_READING_ERROR } from './reading-error.ts'
import { checkPassive, swrOf } from './reflection.ts'
import {
  reflectionOfStrayOpen,
  solveIdealTerminations,
  solveTerminations,
  type ReciprocalTwoPort,
  type TerminationReadings,
} from './terminations.ts'
import { limitEfficiency, MAX_EFFICIENCY, maximumGain, rawEfficiencyIntoReference } from './two-port-power.ts'

/** Where and how the three readings were made. */
export interface TerminationSetup {
  readonly frequencyHz: number
  /** Resistance of the load at the secondary, ohm. */
  readonly loadOhm: number
  /** Standard error of each real and imaginary part, 0..0.5; default 0.01. */
  readonly readingError?: number
  /** Stray capacitance on the open alone, pF. What sits on all three does no harm. Default 0. */
  readonly openStrayPf?: number
}

/** What the three traces say at one frequency. */
export interface ThreeTermination extends ReciprocalTwoPort {
  /** Into the load, 0..1, and its loss in dB. */
  readonly efficiency: number
  readonly lossDb: number
  /** Standard uncertainties; state them as `2 u`. */
  readonly uEfficiency: number
  readonly uLossDb: number
  /** Bound with a conjugate match at both ends; null when reading errors hide it. Do not grade on it. */
  readonly gMax: number | null
  readonly intrinsicLossDb: number | null
  /** `|Go - Gs|` */
  readonly openShortDistance: number
  readonly swr: { readonly open: number; readonly short: number; readonly load: number }
  readonly warnings: readonly Warning[]
}

/** Limits of the sheet: our choice; 0.2 is twenty reading errors of 0.01. */
const MIN_DISTANCE = 0.05
const CONFIDENT_DISTANCE = 0.2
const MAX_UNCERTAINTY = 0.03
/** 60 dB of loss: the load trace lies on the open or the short one. */
const NO_TRANSFER = 1e-6
const DB_PER_NEPER = 10 / Math.LN10

/**
 * Efficiency of a transformer into its load from the reflections at its 50 ohm side with the secondary open,
 * shorted and loaded, all against 50 ohm. `E_NUMBER`, `E_ACTIVE` (a reflection above 1.05),
 * `E_ILL_CONDITIONED` (traces coincide), `E_NOT_PHYSICAL` (efficiency or |S22| above 1.02). Warnings:
 * `W_LOW_CONFIDENCE`, `W_UNCERTAIN` (u above 0.03), `W_CLAMPED`, `W_GMAX_UNRESOLVED`. It is a small-signal
 * figure: ferrite loss rises with flux and temperature.
 * Source: Bauer and Penfield, IEEE Trans. MTT-22(3), 1974, 282-288 (citation confirmed); gain formulas Pozar
 * 4th ed. sec. 12.1-12.3 (from memory, verify); the limits are our choice.
 */
export function threeTermination(
  readings: TerminationReadings,
  setup: TerminationSetup,
): Outcome<ThreeTermination> {
  const bad = checkReadings(readings)
  if (bad) return bad
  const solve = straySolver(setup)
  const twoPort = solve ? solve(readings) : solveIdealTerminations(readings)
  if (isFailure(twoPort)) return twoPort
  const limited = checkTwoPort(twoPort)
  if (isFailure(limited)) return limited
  const { efficiency } = limited
  const uEfficiency = efficiencyUncertainty(readings, setup.readingError ?? DEFAULT_READING_ERROR, solve)
  const openShortDistance = magnitude(subtract(readings.open, readings.short))
  const gain = maximumGain(twoPort)
  return {
    s11: twoPort.s11,
    s22: twoPort.s22,
    p: twoPort.p,
    efficiency,
    lossDb: -DB_PER_NEPER * Math.log(efficiency) + 0,
    uEfficiency,
    uLossDb: (DB_PER_NEPER * uEfficiency) / efficiency,
    gMax: gain.gMax,
    intrinsicLossDb: gain.intrinsicLossDb,
    openShortDistance,
    swr: {
      open: swrOf(magnitude(readings.open)),
      short: swrOf(magnitude(readings.short)),
      load: swrOf(magnitude(readings.load)),
    },
    warnings: limited.warnings.concat(warningsFor(openShortDistance, uEfficiency, gain.gMax)),
  }
}

type Solver = (readings: TerminationReadings) => Outcome<ReciprocalTwoPort>

/** The solver for an open with a stray; none when the terminations are ideal. */
function straySolver({ frequencyHz, loadOhm, openStrayPf = 0 }: TerminationSetup): Solver | undefined {
  if (openStrayPf === 0) return undefined
  const strayOpen = reflectionOfStrayOpen(frequencyHz, openStrayPf, loadOhm)
  return ({ open, short, load }) =>
    solveTerminations([
      { termination: { re: 0, im: 0 }, measured: load },
      { termination: strayOpen, measured: open },
      { termination: { re: -1, im: 0 }, measured: short },
    ])
}

function checkReadings({ open, short, load }: TerminationReadings): Failure | undefined {
  const bad = checkReading('open', open) ?? checkReading('short', short) ?? checkReading('load', load)
  if (bad) return bad
  if (magnitude(subtract(open, short)) < MIN_DISTANCE) {
    const message = 'Open and short traces coincide: this device is too lossy or not connected.'
    return failure('E_ILL_CONDITIONED', message)
  }
  return undefined
}

function checkReading(field: string, gamma: Complex): Failure | undefined {
  if (!isFiniteComplex(gamma)) return failure('E_NUMBER', `The ${field} trace is not a number.`, { field })
  return checkPassive(magnitude(gamma), field)
}

function checkTwoPort(twoPort: ReciprocalTwoPort): ReturnType<typeof limitEfficiency> {
  if (magnitude(twoPort.p) < NO_TRANSFER) {
    const message = 'The load trace lies on the open or the short one: the load is not connected.'
    return failure('E_ILL_CONDITIONED', message, { field: 'load' })
  }
  if (magnitude(twoPort.s22) > MAX_EFFICIENCY) {
    const message =
      'The reflection found at the secondary is above 1: the open or short standard is not what it should be.'
    return failure('E_NOT_PHYSICAL', message)
  }
  return limitEfficiency(rawEfficiencyIntoReference(twoPort))
}

function warningsFor(distance: number, uEfficiency: number, gMax: number | null): Warning[] {
  const warnings: Warning[] = []
  if (distance < CONFIDENT_DISTANCE) {
    const message = 'Open and short traces are close together: the figure rests on small differences.'
    warnings.push({ code: 'W_LOW_CONFIDENCE', message })
  }
  if (uEfficiency > MAX_UNCERTAINTY) {
    const message = `The efficiency is uncertain by ${(2 * uEfficiency).toFixed(3)} either way (k = 2).`
    warnings.push({ code: 'W_UNCERTAIN', message })
  }
  if (gMax === null) {
    const message = 'Reading errors hide the best possible gain; the efficiency stands.'
    warnings.push({ code: 'W_GMAX_UNRESOLVED', message })
  }
  return warnings
}
