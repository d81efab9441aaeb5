import { checkPositive } from './check-range.ts'
import { checkRelative } from './meter-accuracy.ts'
import { checkNumber, failure, type Failure, type Outcome, type Warning } from './outcome.ts'

/** Net power in, power out into 50 ohm, and how well the meters know them. */
export interface PowerReadings {
  /** W, above 0 and up to 1e6. */
  readonly inW: number
  readonly outW: number
  /** Relative standard uncertainty of each reading, 0..0.5. */
  readonly inRelative: number
  readonly outRelative: number
  /** Correlation of the two: 0 for two meters, up to 1 for one meter moved from place to place. */
  readonly correlation: number
}

export interface PowerLoss {
  /** dB, 0 or more. */
  readonly lossDb: number
  /** Above 0, up to 1. */
  readonly efficiency: number
  /** Standard uncertainties; state them as `2 u`. */
  readonly uLossDb: number
  readonly uEfficiency: number
  /** False when the loss is below three times its uncertainty: too small for these meters. */
  readonly isResolved: boolean
  readonly warnings: readonly Warning[]
}

const DB_PER_NEPER = 10 / Math.LN10
const MAX_W = 1e6

/**
 * Loss of one transformer from two like ones joined at their high-impedance sides, by two wattmeter readings:
 * `L = 10 log(P1/P2)/2`, `eta = sqrt(P2/P1)`. `E_RANGE` for readings of 0 or less, uncertainties outside
 * 0..0.5 or a correlation outside 0..1; `E_GAIN` when more comes out than goes in by more than 2 u.
 * `W_BELOW_RESOLUTION` when the loss is below 3 u. Two unequal devices give only their mean.
 * Source: JCGM 100:2008 (GUM), 5.1 and 5.2 (from memory, verify); halving: common practice, no source.
 */
export function pairLossFromPowers(readings: PowerReadings): Outcome<PowerLoss> {
  return lossFromPowers(readings, 2)
}

/** The same for one device or one line between the meters, where nothing is halved. */
export function lossFromPowers(readings: PowerReadings, devices: 1 | 2 = 1): Outcome<PowerLoss> {
  const bad = checkReadings(readings)
  if (bad) return bad
  const { inW, outW } = readings
  const lossDb = (DB_PER_NEPER * Math.log(inW / outW)) / devices
  const uLossDb = (DB_PER_NEPER / devices) * relativeOfRatio(readings)
  if (-lossDb > 2 * uLossDb) {
    return failure('E_GAIN', `More power out than in: ${outW} W from ${inW} W.`, { field: 'outW' })
  }
  const efficiency = Math.min(1, (outW / inW) ** (1 / devices))
  return {
    lossDb: Math.max(0, lossDb),
    efficiency,
    uLossDb,
    uEfficiency: (efficiency / devices) * relativeOfRatio(readings),
    isResolved: lossDb >= 3 * uLossDb,
    warnings: lossDb < 3 * uLossDb ? [belowResolution(uLossDb)] : [],
  }
}

/**
 * Largest error of the pair's figure when both readings are off by the limit `a`, 0 up to 1, in opposite
 * directions: `10 log((1+a)/(1-a))/2` dB. A worst case, not a standard uncertainty.
 */
export function worstCasePairErrorDb(limit: number): Outcome<number> {
  const bad = checkNumber('limit', limit, 0, 0.999)
  return bad ?? (DB_PER_NEPER * Math.log((1 + limit) / (1 - limit))) / 2
}

/** Relative standard uncertainty of P1/P2. */
function relativeOfRatio({ inRelative, outRelative, correlation }: PowerReadings): number {
  const square = inRelative ** 2 + outRelative ** 2 - 2 * correlation * inRelative * outRelative
  return Math.sqrt(Math.max(0, square))
}

function checkReadings(readings: PowerReadings): Failure | undefined {
  return (
    checkPositive('inW', readings.inW, MAX_W) ??
    checkPositive('outW', readings.outW, MAX_W) ??
    checkRelative('inRelative', readings.inRelative) ??
    checkRelative('outRelative', readings.outRelative) ??
    checkNumber('correlation', readings.correlation, 0, 1)
  )
}

function belowResolution(uLossDb: number): Warning {
  const message = `Too good to measure with these meters: the loss is below ${(3 * uLossDb).toFixed(2)} dB.`
  return { code: 'W_BELOW_RESOLUTION', message }
}
