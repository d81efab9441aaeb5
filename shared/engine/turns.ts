import { checkPositive } from './check-range.ts'
import { checkNumber, failure, type Failure, type Outcome } from './outcome.ts'

export interface TurnsRatio {
  /** `(N2/N1)^2` */
  readonly impedanceRatio: number
  /** Secondary impedance for the primary one, ohm. */
  readonly secondaryOhm: number
}

/**
 * Impedance ratio of a transformer. Turns are whole numbers from 1 to 1000, each pass through the core being
 * one. In an auto-wound one the secondary counts all turns between the high end and ground, the primary's
 * included: 2 + 12 is 2:14, ratio 49, not 36. `E_TURNS` for anything else, `E_RANGE` unless the primary is
 * above 0 and up to 1e6 ohm. Source: textbook.
 */
export function impedanceRatio(
  primaryTurns: number,
  secondaryTurns: number,
  primaryOhm = 50,
): Outcome<TurnsRatio> {
  const bad =
    checkTurns('primaryTurns', primaryTurns) ??
    checkTurns('secondaryTurns', secondaryTurns) ??
    checkPositive('primaryOhm', primaryOhm, 1e6)
  if (bad) return bad
  const ratio = (secondaryTurns / primaryTurns) ** 2
  return { impedanceRatio: ratio, secondaryOhm: primaryOhm * ratio }
}

function checkTurns(field: string, turns: number): Failure | undefined {
  const bad = checkNumber(field, turns)
  if (bad) return bad
  if (Number.isInteger(turns) && turns > 0 && turns <= 1000) return undefined
  const message = `${field} is ${turns}: count each pass through the core as one turn, 1 to 1000.`
  return failure('E_TURNS', message, { field })
}
