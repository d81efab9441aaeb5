import { magnitude, type Complex } from './complex.ts'
import type { EfficiencyFigures } from './efficiency-by-band.ts'
import { checkNumber, failure, isFailure, type Outcome, type Warning } from './outcome.ts'
import { pairLossSweep } from './pair-loss.ts'
import { checkReadingError, DEFAULT_READING_ERROR } from './reading-error.ts'
import { reflectionFromGamma } from './reflection.ts'
import { renormaliseGamma } from './renormalise.ts'
import type { SweepPoint } from './sweep-point.ts'
import { valueAt, type OnePortFile, type TouchstoneFile } from './touchstone/touchstone-file.ts'

/** Measured matched loss of a line at one frequency. `efficiency` is the share of the power that arrives. */
export interface MeasuredLine extends EfficiencyFigures {
  readonly warnings: readonly Warning[]
}

const DB_PER_NEPER = 10 / Math.LN10
const LINE_OHM = 50
/** 60 dB of return loss at an open or shorted end: 30 dB of line, or no open end at all. */
const NO_RETURN = 1e-3

/**
 * Loss of a line from the reflection at its near end with the far end open or shorted: half the return loss,
 * dB. `readingError` (0..0.5) is the error of each part. `E_ACTIVE` above 1.05, `W_CLAMPED` between 1 and
 * that, `E_NO_SIGNAL` when nothing returns. Source: inspection practice for feedlines; common practice, no
 * source.
 */
export function lineLossFromReflection(
  gamma: Complex,
  readingError = DEFAULT_READING_ERROR,
): Outcome<MeasuredLine> {
  const bad = checkReadingError(readingError)
  if (bad) return bad
  const reflection = reflectionFromGamma(gamma)
  if (isFailure(reflection)) return reflection
  if (reflection.magnitude < NO_RETURN) {
    return failure('E_NO_SIGNAL', 'Nothing returns: the far end must be open or shorted.')
  }
  const lossDb = reflection.returnLossDb / 2
  const uLossDb = (DB_PER_NEPER * readingError) / magnitude(gamma)
  return measured(lossDb, uLossDb, reflection.warnings)
}

/**
 * Matched loss of a 50 ohm line at every point of a file: half the return loss of a one-port file with the
 * far end open or shorted, or the heat between the ends of a two-port file. Codes of
 * `lineLossFromReflection` and `pairLoss`.
 */
export function lineLossSweep(
  file: TouchstoneFile,
  readingError = DEFAULT_READING_ERROR,
): Outcome<SweepPoint<MeasuredLine>[]> {
  const bad = checkReadingError(readingError)
  if (bad) return bad
  if (file.ports === 1) return onePortSweep(file, readingError)
  const pair = pairLossSweep(file, readingError)
  if (isFailure(pair)) return pair
  return pair.map(({ frequencyHz, result }) => ({
    frequencyHz,
    // One line, not two devices: what a pair halves is whole here.
    result: isFailure(result) ? result : measured(2 * result.lossDb, 2 * result.uLossDb, result.warnings),
  }))
}

function onePortSweep(file: OnePortFile, readingError: number): SweepPoint<MeasuredLine>[] {
  const from = file.referenceOhm[0] ?? LINE_OHM
  return Array.from(file.frequencyHz, (frequencyHz, point) => {
    const gamma = renormaliseGamma(valueAt(file.s11, point), from, LINE_OHM)
    return { frequencyHz, result: isFailure(gamma) ? gamma : lineLossFromReflection(gamma, readingError) }
  })
}

function measured(lossDb: number, uLossDb: number, warnings: readonly Warning[]): MeasuredLine {
  const efficiency = 10 ** (-lossDb / 10)
  return { lossDb, uLossDb, efficiency, uEfficiency: (efficiency * uLossDb) / DB_PER_NEPER, warnings }
}

/**
 * Loss of a line from the smallest impedance at its near end, at a frequency where it dips, far end open or
 * shorted: `8.69 Zmin/Z0` dB. Good up to 0.3 Z0 (2.6 dB), where it reads 3 % low; `E_RANGE` beyond.
 * Common practice, no source.
 */
export function lineLossFromNullDb(minimumOhm: number, z0Ohm = LINE_OHM): Outcome<number> {
  const bad = checkNumber('z0Ohm', z0Ohm, 1, 1000)
  return bad ?? checkNumber('minimumOhm', minimumOhm, 0, 0.3 * z0Ohm) ?? (8.69 * minimumOhm) / z0Ohm
}
