/**
 * Student's t, two-sided 95 % (quantile 0.975), for whole degrees of freedom.
 * Computed, not interpolated between tabulated values: the table of the calculation sheet (section 6)
 * comes out to its last digit, and the rows it leaves out are exact too.
 * Source: Abramowitz and Stegun, 26.7.3 and 26.7.4 (probability), 26.7.5 (expansion for many degrees).
 */
import { checkWhole } from './check-range.ts'
import type { Outcome } from './outcome.ts'

const NORMAL_975 = 1.959963984540054
const SERIES_UP_TO = 100

const known = new Map<number, number>()

/** t for 1 to 1e9 degrees of freedom; falls to 1.95996. `E_RANGE`. */
export function tQuantile975(degrees: number): Outcome<number> {
  return checkWhole('degrees', degrees, 1, 1e9) ?? quantile(degrees)
}

/** The F quantile 0.95 (1, degrees): the square of t. `E_RANGE`. */
export function fQuantile95(degrees: number): Outcome<number> {
  return checkWhole('degrees', degrees, 1, 1e9) ?? quantile(degrees) ** 2
}

function quantile(degrees: number): number {
  const found = known.get(degrees)
  if (found !== undefined) return found
  const t = degrees > SERIES_UP_TO ? expansion(degrees) : solve(degrees)
  if (degrees <= SERIES_UP_TO) known.set(degrees, t)
  return t
}

/** Halving on the monotone probability; 12.7063 at one degree is the largest answer. */
function solve(degrees: number): number {
  let low = NORMAL_975
  let high = 12.71
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2
    if (withinProbability(middle, degrees) < 0.95) low = middle
    else high = middle
  }
  return (low + high) / 2
}

/** P(-t < T < t) as a finite sum in the angle whose tangent is t/sqrt(degrees). */
function withinProbability(t: number, degrees: number): number {
  const angle = Math.atan(t / Math.sqrt(degrees))
  const cosine2 = Math.cos(angle) ** 2
  const odd = degrees % 2 === 1
  let term = odd ? Math.cos(angle) : 1
  let sum = 0
  for (let k = odd ? 1 : 0; k <= degrees - 2; k += 2) {
    sum += term
    term *= (cosine2 * (k + 1)) / (k + 2)
  }
  return odd ? (2 / Math.PI) * (angle + Math.sin(angle) * sum) : Math.sin(angle) * sum
}

function expansion(degrees: number): number {
  const x = NORMAL_975
  const g1 = (x ** 3 + x) / 4
  const g2 = (5 * x ** 5 + 16 * x ** 3 + 3 * x) / 96
  const g3 = (3 * x ** 7 + 19 * x ** 5 + 17 * x ** 3 - 15 * x) / 384
  const g4 = (79 * x ** 9 + 776 * x ** 7 + 1482 * x ** 5 - 1920 * x ** 3 - 945 * x) / 92_160
  return x + g1 / degrees + g2 / degrees ** 2 + g3 / degrees ** 3 + g4 / degrees ** 4
}
