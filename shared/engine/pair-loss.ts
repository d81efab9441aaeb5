import { isFiniteComplex, magnitude, magnitudeSquared, subtract, type Complex } from './complex.ts'
import { failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'
import { checkReadingError, DEFAULT_READING_ERROR } from './reading-error.ts'
import type { SweepPoint } from './sweep-point.ts'
import { valueAt, type TouchstoneFile } from './touchstone/touchstone-file.ts'

/** The pair seen from both ends, at 50 ohm. */
export interface PairReading {
  readonly s11: Complex
  readonly s21: Complex
  readonly s12: Complex
  readonly s22: Complex
}

/** Loss of one device, dB, in one direction through the pair. */
export interface DirectionLoss {
  /** Heat alone: `-10 log(|S21|^2 / (1 - |S11|^2)) / 2`, 0 or more. */
  readonly lossDb: number
  /** Reflection included: `-10 log(|S21|^2) / 2`. Never below the heat. */
  readonly insertionLossDb: number
  readonly uLossDb: number
}

export interface PairLoss extends DirectionLoss {
  /** From the dissipative loss, 0..1. */
  readonly efficiency: number
  readonly uEfficiency: number
  /** Forward loss less reverse loss, dB. */
  readonly differenceDb: number
  readonly forward: DirectionLoss
  readonly reverse: DirectionLoss
  readonly warnings: readonly Warning[]
}

const DB_PER_NEPER = 10 / Math.LN10
/** Limits of the sheet, our choice. */
const MAX_POWER_SUM = 1.02
const MAX_NOT_RECIPROCAL = 0.02
const MAX_NOT_ALIKE_DB = 0.3
const MAX_MATCHED = 0.5
/** 120 dB down: below any analyzer's floor. */
const NO_SIGNAL = 1e-6

/**
 * Loss of one transformer from two like ones joined at their high-impedance sides, at one frequency, as the
 * mean of both directions. Grade on the dissipative figure. The uncertainties take an error of `readingError`
 * (0..0.5) in each real and imaginary part, and take none off for the second direction, which shares the
 * calibration. `E_ACTIVE` for a reflection of 1 or more, `E_GAIN` for more power out than in, `E_NO_SIGNAL`
 * when nothing comes through. Warnings: `W_NOT_RECIPROCAL`, `W_NOT_ALIKE`, `W_MISMATCH`, `W_CLAMPED`.
 * Source: Pozar ch. 4 and 12 (from memory, verify); halving: common practice, no source.
 */
export function pairLoss(reading: PairReading, readingError = DEFAULT_READING_ERROR): Outcome<PairLoss> {
  const forward = directionLoss(reading.s21, reading.s11, readingError)
  if (isFailure(forward)) return forward
  const reverse = directionLoss(reading.s12, reading.s22, readingError)
  if (isFailure(reverse)) return reverse
  const rawLossDb = (forward.rawLossDb + reverse.rawLossDb) / 2
  const lossDb = Math.max(0, rawLossDb)
  const uLossDb = Math.max(forward.uLossDb, reverse.uLossDb)
  const efficiency = 10 ** (-lossDb / 10)
  const differenceDb = forward.rawLossDb - reverse.rawLossDb
  return {
    lossDb,
    insertionLossDb: (forward.insertionLossDb + reverse.insertionLossDb) / 2,
    uLossDb,
    efficiency,
    uEfficiency: Math.min(1, (efficiency * uLossDb) / DB_PER_NEPER),
    differenceDb,
    forward: published(forward),
    reverse: published(reverse),
    warnings: warningsFor(reading, rawLossDb, differenceDb),
  }
}

/**
 * `pairLoss` at every point of a two-port file. `TS_PORTS` unless two ports, `E_REFERENCE` unless 50 ohm,
 * `E_RANGE` for a reading error outside 0..0.5.
 */
export function pairLossSweep(
  file: TouchstoneFile,
  readingError = DEFAULT_READING_ERROR,
): Outcome<SweepPoint<PairLoss>[]> {
  if (file.ports !== 2) return failure('TS_PORTS', 'A pair is measured with a two-port file (.s2p).')
  if (file.referenceOhm.some((ohm) => ohm !== 50)) {
    return failure(
      'E_REFERENCE',
      `The file is referred to ${file.referenceOhm.join(' and ')} ohm: measure at 50 ohm.`,
    )
  }
  const bad = checkReadingError(readingError)
  if (bad) return bad
  return Array.from(file.frequencyHz, (frequencyHz, point) => ({
    frequencyHz,
    result: pairLoss(
      {
        s11: valueAt(file.s11, point),
        s21: valueAt(file.s21, point),
        s12: valueAt(file.s12, point),
        s22: valueAt(file.s22, point),
      },
      readingError,
    ),
  }))
}

interface RawDirection {
  readonly rawLossDb: number
  readonly insertionLossDb: number
  readonly uLossDb: number
}

function directionLoss(through: Complex, reflected: Complex, error: number): Outcome<RawDirection> {
  const bad = checkDirection(through, reflected)
  if (bad) return bad
  const reflectedPower = magnitudeSquared(reflected)
  const throughPower = magnitudeSquared(through)
  const accepted = 1 - reflectedPower
  const fromThrough = error / Math.sqrt(throughPower)
  const fromReflected = (Math.sqrt(reflectedPower) * error) / accepted
  return {
    rawLossDb: (-DB_PER_NEPER * Math.log(throughPower / accepted)) / 2,
    insertionLossDb: (-DB_PER_NEPER * Math.log(throughPower)) / 2,
    uLossDb: DB_PER_NEPER * Math.sqrt(fromThrough ** 2 + fromReflected ** 2),
  }
}

function checkDirection(through: Complex, reflected: Complex): Failure | undefined {
  if (!isFiniteComplex(through) || !isFiniteComplex(reflected)) {
    return failure('E_NUMBER', 'A value of the pair is not a number.')
  }
  const reflectedPower = magnitudeSquared(reflected)
  if (reflectedPower >= 1) return failure('E_ACTIVE', 'Reflection of 1 or more: check the calibration.')
  if (magnitudeSquared(through) + reflectedPower > MAX_POWER_SUM) {
    return failure('E_GAIN', 'More power out than in: check the calibration.')
  }
  if (magnitude(through) < NO_SIGNAL) return failure('E_NO_SIGNAL', 'Nothing comes through the pair.')
  return undefined
}

function published({ rawLossDb, insertionLossDb, uLossDb }: RawDirection): DirectionLoss {
  return { lossDb: Math.max(0, rawLossDb), insertionLossDb, uLossDb }
}

function warningsFor(reading: PairReading, rawLossDb: number, differenceDb: number): Warning[] {
  const warnings: Warning[] = []
  if (magnitude(subtract(reading.s21, reading.s12)) > MAX_NOT_RECIPROCAL) {
    const message = 'S21 and S12 differ by more than 0.02: check the calibration.'
    warnings.push({ code: 'W_NOT_RECIPROCAL', message })
  }
  if (Math.abs(differenceDb) > MAX_NOT_ALIKE_DB) {
    const message = 'The two directions differ by more than 0.3 dB: the devices differ, this is their mean.'
    warnings.push({ code: 'W_NOT_ALIKE', message })
  }
  if (Math.max(magnitude(reading.s11), magnitude(reading.s22)) > MAX_MATCHED) {
    const message = 'Reflection above 0.5: the pair understates the loss into the real load.'
    warnings.push({ code: 'W_MISMATCH', message })
  }
  if (rawLossDb < 0) {
    const message = 'The readings give an efficiency a little above 1: taken as 1.'
    warnings.push({ code: 'W_CLAMPED', message })
  }
  return warnings
}
