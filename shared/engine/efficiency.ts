import { checkNumber, failure, isFailure, type Outcome } from './outcome.ts'

/** IARU Region 1 Technical Recommendation R.1: one S-unit is 6 dB (confirmed). */
export const DB_PER_S_UNIT = 6

/**
 * Loss in dB of an efficiency above 0 and up to 1: `-10 log(eta)`, 0 dB for 1. `E_RANGE` otherwise; a number
 * above 1 is taken for a percentage and the message says so. Source: textbook.
 */
export function lossDbFromEfficiency(efficiency: number): Outcome<number> {
  const bad = checkNumber('efficiency', efficiency)
  if (bad) return bad
  if (efficiency <= 0 || efficiency > 1) {
    const isPercentage = efficiency > 1 && efficiency <= 100
    const offer = isPercentage ? ` For ${efficiency} % enter ${efficiency / 100}.` : ''
    const message = `Efficiency is ${efficiency}: it must be above 0 and up to 1.${offer}`
    return failure('E_RANGE', message, { field: 'efficiency' })
  }
  // Adding 0 turns -0 into 0.
  return -10 * Math.log10(efficiency) + 0
}

/** Efficiency of a loss of 0 dB or more: `10^(-L/10)`. `E_RANGE` below 0. Source: textbook. */
export function efficiencyFromLossDb(lossDb: number): Outcome<number> {
  return checkNumber('lossDb', lossDb, 0) ?? 10 ** (-lossDb / 10)
}

/** Heat in W of `powerW`, the net power into the device, 0 or more: `P (1 - eta)`. Source: textbook. */
export function heatW(powerW: number, efficiency: number): Outcome<number> {
  const bad = checkNumber('powerW', powerW, 0)
  if (bad) return bad
  const loss = lossDbFromEfficiency(efficiency)
  return isFailure(loss) ? loss : powerW * (1 - efficiency)
}

/** A loss of 0 dB or more in S-units. Source: IARU Region 1 Technical Recommendation R.1 (confirmed). */
export function sUnitsFromLossDb(lossDb: number): Outcome<number> {
  return checkNumber('lossDb', lossDb, 0) ?? lossDb / DB_PER_S_UNIT
}
