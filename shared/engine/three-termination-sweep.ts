import { checkPositive } from './check-range.ts'
import { isFailure, checkNumber, type Failure, type Outcome, type Warning } from './outcome.ts'
import { checkReadingError, DEFAULT_READING_ERROR } from './reading-error.ts'
import { renormaliseGamma } from './renormalise.ts'
import type { SweepPoint } from './sweep-point.ts'
import { checkSameGrid, isOpenAboveShort } from './termination-traces.ts'
import type { TerminationReadings } from './terminations.ts'
import { threeTermination, type TerminationSetup, type ThreeTermination } from './three-termination.ts'
import { valueAt, type OnePortFile, type TouchstoneFile } from './touchstone/touchstone-file.ts'

export interface TerminationFiles {
  readonly open: TouchstoneFile
  readonly short: TouchstoneFile
  readonly load: TouchstoneFile
}

export interface ThreeTerminationSweep {
  readonly points: readonly SweepPoint<ThreeTermination>[]
  /** About the three files together: `W_SWAPPED`. */
  readonly warnings: readonly Warning[]
}

/** All S11, S22 and P, and the limits that hang on them, are against 50 ohm. */
const REFERENCE_OHM = 50

/**
 * `threeTermination` at every point of three one-port files with the secondary open, shorted and loaded with
 * `loadOhm` (above 0, up to 1e6). The files share their frequencies to 1 Hz (`E_GRID`; nothing is
 * interpolated) and their reference (`E_REFERENCE`), which is brought to 50 ohm first. `TS_PORTS` unless one
 * port. `W_SWAPPED` when the open looks like the short at the lowest frequency: efficiency and Gmax do not
 * notice, other loads do.
 */
export function threeTerminationSweep(
  files: TerminationFiles,
  setup: Omit<TerminationSetup, 'frequencyHz'>,
): Outcome<ThreeTerminationSweep> {
  const bad = checkSetup(setup)
  if (bad) return bad
  const traces = checkSameGrid([files.open, files.short, files.load])
  if (isFailure(traces)) return traces
  const [open, short, load] = traces
  const points = Array.from(open.frequencyHz, (frequencyHz, point) => {
    const readings = readingsAt({ open, short, load }, point)
    const result = isFailure(readings) ? readings : threeTermination(readings, { ...setup, frequencyHz })
    return { frequencyHz, result }
  })
  return { points, warnings: isOpenAboveShort(open, short) ? [] : [swapped()] }
}

function checkSetup({
  loadOhm,
  readingError = DEFAULT_READING_ERROR,
  openStrayPf = 0,
}: Omit<TerminationSetup, 'frequencyHz'>): Failure | undefined {
  return (
    checkPositive('loadOhm', loadOhm, 1e6) ??
    checkReadingError(readingError) ??
    checkNumber('openStrayPf', openStrayPf, 0, 1000)
  )
}

function readingsAt(
  files: Record<'open' | 'short' | 'load', OnePortFile>,
  point: number,
): Outcome<TerminationReadings> {
  const from = files.open.referenceOhm[0] ?? REFERENCE_OHM
  const open = renormaliseGamma(valueAt(files.open.s11, point), from, REFERENCE_OHM)
  if (isFailure(open)) return open
  const short = renormaliseGamma(valueAt(files.short.s11, point), from, REFERENCE_OHM)
  if (isFailure(short)) return short
  const load = renormaliseGamma(valueAt(files.load.s11, point), from, REFERENCE_OHM)
  return isFailure(load) ? load : { open, short, load }
}

function swapped(): Warning {
  const message = 'At the lowest frequency the open has the smaller impedance: open and short look swapped.'
  return { code: 'W_SWAPPED', message }
}
