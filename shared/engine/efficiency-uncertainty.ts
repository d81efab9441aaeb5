import { isFailure, type Outcome } from './outcome.ts'
import type { ReciprocalTwoPort, TerminationReadings } from './terminations.ts'
import { rawEfficiencyIntoReference } from './two-port-power.ts'

/** Real and imaginary parts of open, short and load, in this order. */
type Parts = [number, number, number, number, number, number]
type Solver = (readings: TerminationReadings) => Outcome<ReciprocalTwoPort>

/**
 * Standard uncertainty of the efficiency, 0..1: each of the six real and imaginary parts is moved by
 * `readingError` either way, half the change of the efficiency is taken, and the six are added as squares.
 * 1 stands for "nothing is known". `solve` is the solver the efficiency came from; without one, the
 * terminations are ideal. Source: JCGM 100:2008 (GUM), 5.1 (from memory, verify).
 */
export function efficiencyUncertainty(
  { open, short, load }: TerminationReadings,
  readingError: number,
  solve?: Solver,
): number {
  const parts: Parts = [open.re, open.im, short.re, short.im, load.re, load.im]
  let squares = 0
  for (let at = 0; at < parts.length; at++) {
    const kept = parts[at] as number
    parts[at] = kept + readingError
    const above = efficiencyOf(parts, solve)
    parts[at] = kept - readingError
    const below = efficiencyOf(parts, solve)
    parts[at] = kept
    squares += ((above - below) / 2) ** 2
  }
  return squares <= 1 ? Math.sqrt(squares) : 1
}

function efficiencyOf(parts: Parts, solve: Solver | undefined): number {
  return solve ? solvedEfficiency(parts, solve) : idealEfficiency(parts)
}

/**
 * `|P| / (1 - |S11|^2)` with `|P| = 2 |a| |b| / |a - b|`: with ideal terminations only magnitudes are needed.
 * In plain numbers, because a long sweep comes here twelve times a point.
 */
function idealEfficiency([openRe, openIm, shortRe, shortIm, loadRe, loadIm]: Parts): number {
  const a = (openRe - loadRe) ** 2 + (openIm - loadIm) ** 2
  const b = (shortRe - loadRe) ** 2 + (shortIm - loadIm) ** 2
  const difference = (openRe - shortRe) ** 2 + (openIm - shortIm) ** 2
  return (2 * Math.sqrt((a * b) / difference)) / (1 - loadRe * loadRe - loadIm * loadIm)
}

function solvedEfficiency([openRe, openIm, shortRe, shortIm, loadRe, loadIm]: Parts, solve: Solver): number {
  const twoPort = solve({
    open: { re: openRe, im: openIm },
    short: { re: shortRe, im: shortIm },
    load: { re: loadRe, im: loadIm },
  })
  return isFailure(twoPort) ? NaN : rawEfficiencyIntoReference(twoPort)
}
