/**
 * The SWR of a one-port file at every point, against 50 ohm, for a picture: a total reflection, and one that its
 * calibration has put beyond it, is Infinity. Source: calculation sheet, section 2.
 */
import { failure, isFailure, type Outcome } from './outcome.ts'
import { reflectionFromGamma } from './reflection.ts'
import { renormaliseGamma } from './renormalise.ts'
import { valueAt, type TouchstoneFile } from './touchstone/touchstone-file.ts'

/** Typed arrays: cheap to hand over from a worker. */
export interface SwrTrace {
  readonly frequencyHz: Float64Array
  readonly swr: Float64Array
}

/** `TS_PORTS` for a file of more than one port. */
export function swrTrace(file: TouchstoneFile): Outcome<SwrTrace> {
  if (file.ports !== 1)
    return failure('TS_PORTS', 'A trace of SWR is drawn from a one-port file (.s1p).', { field: 'file' })
  const swr = new Float64Array(file.frequencyHz.length)
  for (let at = 0; at < swr.length; at++) {
    const gamma = renormaliseGamma(valueAt(file.s11, at), file.referenceOhm[0] ?? 50, 50)
    const reflection = isFailure(gamma) ? gamma : reflectionFromGamma(gamma)
    swr[at] = isFailure(reflection) ? Infinity : reflection.swr
  }
  return { frequencyHz: file.frequencyHz, swr }
}
