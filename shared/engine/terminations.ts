import { add, divide, magnitude, multiply, scale, subtract, type Complex } from './complex.ts'
import { failure, type Outcome } from './outcome.ts'

/**
 * What three terminations tell about a reciprocal two-port, referenced to 50 ohm at port 1 and to the load
 * resistance at port 2. S12 and S21 are known only as their product.
 */
export interface ReciprocalTwoPort {
  readonly s11: Complex
  readonly s22: Complex
  /** `P = S12 * S21` */
  readonly p: Complex
}

/** Reflections at port 1 with port 2 open, shorted and loaded. */
export interface TerminationReadings {
  readonly open: Complex
  readonly short: Complex
  readonly load: Complex
}

/** One termination: its known reflection at port 2, and what port 1 then reads. */
export interface TerminationReading {
  readonly termination: Complex
  readonly measured: Complex
}

/** Two things closer than this cannot be told apart: their difference would be divided by. */
const SINGULAR = 1e-12

/**
 * From an ideal open, short and load: `a = Go - Gl`, `b = Gs - Gl`, `S11 = Gl`, `S22 = (a + b)/(a - b)`,
 * `P = -2ab/(a - b)`. `E_ILL_CONDITIONED` when open and short coincide.
 * Source: Bauer and Penfield, IEEE Trans. MTT-22(3), March 1974, 282-288, doi 10.1109/TMTT.1974.1128212
 * (citation confirmed).
 */
export function solveIdealTerminations({
  open,
  short,
  load,
}: TerminationReadings): Outcome<ReciprocalTwoPort> {
  const a = subtract(open, load)
  const b = subtract(short, load)
  const difference = subtract(a, b)
  if (magnitude(difference) < SINGULAR) return coincide()
  return {
    s11: load,
    s22: divide(add(a, b), difference),
    p: divide(scale(multiply(a, b), -2), difference),
  }
}

/**
 * The same from three known terminations that need not be ideal: three complex linear equations `Gm = e00 +
 * Gt Gm e11 + Gt d`; then `S11 = e00`, `S22 = e11`, `P = d + e00 e11`. `E_ILL_CONDITIONED` when two of them
 * coincide. Source: as for `solveIdealTerminations`.
 */
export function solveTerminations(
  readings: readonly [TerminationReading, TerminationReading, TerminationReading],
): Outcome<ReciprocalTwoPort> {
  const [first, second, third] = readings
  // Subtracting the first equation takes e00 out; Cramer's rule solves the two that remain.
  const [x1, y1, m1] = equationBetween(second, first)
  const [x2, y2, m2] = equationBetween(third, first)
  const determinant = subtract(multiply(x1, y2), multiply(x2, y1))
  if (magnitude(determinant) < SINGULAR) return coincide()
  const e11 = divide(subtract(multiply(m1, y2), multiply(m2, y1)), determinant)
  const d = divide(subtract(multiply(x1, m2), multiply(x2, m1)), determinant)
  const { termination, measured } = first
  const e00 = subtract(measured, multiply(termination, add(multiply(measured, e11), d)))
  return { s11: e00, s22: e11, p: add(d, multiply(e00, e11)) }
}

/** Factors of e11 and d, and the right-hand side, of one equation less another. */
function equationBetween(one: TerminationReading, other: TerminationReading): [Complex, Complex, Complex] {
  const product = multiply(one.termination, one.measured)
  return [
    subtract(product, multiply(other.termination, other.measured)),
    subtract(one.termination, other.termination),
    subtract(one.measured, other.measured),
  ]
}

/**
 * Reflection, against `loadOhm`, of an open that carries a stray capacitance of `strayPf`:
 * `(1 - jwCR)/(1 + jwCR)`. Source: textbook.
 */
export function reflectionOfStrayOpen(frequencyHz: number, strayPf: number, loadOhm: number): Complex {
  const wcr = 2 * Math.PI * frequencyHz * strayPf * 1e-12 * loadOhm
  return divide({ re: 1, im: -wcr }, { re: 1, im: wcr })
}

/** How the product P moves with each reading. They are complex derivatives, good for small errors. */
export interface Sensitivities {
  readonly dPdOpen: Complex
  readonly dPdShort: Complex
  readonly dPdLoad: Complex
  /** Error of S22 for a reading error of 1: about `2.4 / |Go - Gs|`. */
  readonly s22Growth: number
}

/**
 * `dP/dGo = 2 b^2/(a-b)^2`, `dP/dGs = -2 a^2/(a-b)^2`, `dP/dGl = 2 S22`; as open and short approach each
 * other S22 is noise. `E_ILL_CONDITIONED` when they coincide. Source: as for `solveIdealTerminations`.
 */
export function sensitivities({ open, short, load }: TerminationReadings): Outcome<Sensitivities> {
  const a = subtract(open, load)
  const b = subtract(short, load)
  const difference = subtract(a, b)
  if (magnitude(difference) < SINGULAR) return coincide()
  const square = multiply(difference, difference)
  return {
    dPdOpen: divide(scale(multiply(b, b), 2), square),
    dPdShort: divide(scale(multiply(a, a), -2), square),
    dPdLoad: scale(divide(add(a, b), difference), 2),
    s22Growth: 2.4 / magnitude(difference),
  }
}

function coincide(): Outcome<never> {
  const message = 'Open and short traces coincide: this device is too lossy or not connected.'
  return failure('E_ILL_CONDITIONED', message)
}
