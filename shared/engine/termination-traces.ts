import { add, magnitude, ONE, subtract, type Complex } from './complex.ts'
import { failure, type Failure, type Outcome } from './outcome.ts'
import { valueAt, type OnePortFile, type TouchstoneFile } from './touchstone/touchstone-file.ts'

const GRID_TOLERANCE_HZ = 1
/** Below this two traces are too close to say which is which. */
const DISTINCT = 0.05

type Three<T> = readonly [T, T, T]

/**
 * Three one-port files that can be taken together: `TS_PORTS` unless one port each, `E_GRID` unless their
 * frequencies agree to 1 Hz, `E_REFERENCE` unless their reference resistance is the same.
 */
export function checkSameGrid(files: Three<TouchstoneFile>): Outcome<Three<OnePortFile>> {
  const [first, second, third] = files
  if (first.ports !== 1 || second.ports !== 1 || third.ports !== 1) {
    return failure('TS_PORTS', 'Open, short and load are one-port files (.s1p).')
  }
  return checkPairing(first, second) ?? checkPairing(first, third) ?? [first, second, third]
}

function checkPairing(one: OnePortFile, other: OnePortFile): Failure | undefined {
  if (one.referenceOhm[0] !== other.referenceOhm[0]) {
    const message = `One file is referred to ${one.referenceOhm[0]} ohm, another to ${other.referenceOhm[0]} ohm.`
    return failure('E_REFERENCE', message)
  }
  const { frequencyHz } = other
  const isSame =
    one.frequencyHz.length === frequencyHz.length &&
    one.frequencyHz.every((hz, point) => Math.abs(hz - (frequencyHz[point] ?? NaN)) <= GRID_TOLERANCE_HZ)
  if (isSame) return undefined
  return failure(
    'E_GRID',
    'The files do not share their frequencies: sweep all three with the same settings.',
  )
}

/**
 * True unless the open shows the smaller impedance at the lowest frequency at which the two traces differ.
 * Lowest, because leads and leakage turn both traces around as the frequency rises.
 */
export function isOpenAboveShort(open: OnePortFile, short: OnePortFile): boolean {
  for (let point = 0; point < open.frequencyHz.length; point++) {
    const atOpen = valueAt(open.s11, point)
    const atShort = valueAt(short.s11, point)
    if (magnitude(subtract(atOpen, atShort)) >= DISTINCT) return isImpedanceLarger(atOpen, atShort)
  }
  return true
}

/** `|Z1| >= |Z2|`, cross-multiplied so that an open needs no infinity. */
function isImpedanceLarger(one: Complex, other: Complex): boolean {
  const left = magnitude(add(ONE, one)) * magnitude(subtract(ONE, other))
  const right = magnitude(add(ONE, other)) * magnitude(subtract(ONE, one))
  return left >= right
}

/** Mean share of the power that comes back, 0..1 for a passive trace. */
export function meanReflectedPower(file: OnePortFile): number {
  const { re, im } = file.s11
  let sum = 0
  for (let point = 0; point < re.length; point++) {
    sum += (re[point] ?? 0) ** 2 + (im[point] ?? 0) ** 2
  }
  return sum / re.length
}

/** True when two files hold the very same trace, which two measurements never do. */
export function isSameTrace(one: OnePortFile, other: OnePortFile): boolean {
  return one.s11.re.every(
    (re, point) => re === other.s11.re[point] && one.s11.im[point] === other.s11.im[point],
  )
}
