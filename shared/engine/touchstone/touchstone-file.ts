import type { Complex } from '../complex.ts'
import type { Warning } from '../outcome.ts'

/**
 * A remark on a file; `line` is the first physical line it is about (1-based), `count` how many there are.
 */
export interface FileNote extends Warning {
  readonly line?: number
  readonly count?: number
}

/** One S-parameter over frequency. Typed arrays: quick to fill, and cheap to hand over from a worker. */
export interface Trace {
  readonly re: Float64Array
  readonly im: Float64Array
}

interface FileCommon {
  readonly version: '1' | '2.0' | '2.1'
  /** One resistance a port, ohm. Two different ones: S12 and S21 are power waves. */
  readonly referenceOhm: readonly number[]
  /** Strictly rising, Hz. */
  readonly frequencyHz: Float64Array
  readonly noisePoints: number
  readonly warnings: readonly FileNote[]
  readonly info: readonly FileNote[]
}

export interface OnePortFile extends FileCommon {
  readonly ports: 1
  readonly s11: Trace
}

export interface TwoPortFile extends FileCommon {
  readonly ports: 2
  readonly s11: Trace
  readonly s21: Trace
  readonly s12: Trace
  readonly s22: Trace
}

export type TouchstoneFile = OnePortFile | TwoPortFile

/** Largest file the reader takes. */
export interface TouchstoneLimits {
  readonly maxBytes: number
  readonly maxPoints: number
}

/** What a person may upload (promise P26): 2 MiB and 20,001 points. */
export const UPLOAD_LIMITS: TouchstoneLimits = { maxBytes: 2 * 1024 * 1024, maxPoints: 20_001 }

/** What the reader is built and timed for: reading time stays in proportion to the size up to here. */
export const ENGINE_LIMITS: TouchstoneLimits = { maxBytes: 64 * 1024 * 1024, maxPoints: 200_000 }

/** The value of a trace at one point; `point` lies within the file. */
export function valueAt(trace: Trace, point: number): Complex {
  return { re: trace.re[point] ?? 0, im: trace.im[point] ?? 0 }
}
