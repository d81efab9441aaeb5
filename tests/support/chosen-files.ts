/** Touchstone files of the calculation sheet's transformer, written by the engine's own writer, as a phone offers them. */
import type { Complex } from '#shared/engine/complex.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import type { TouchstoneFile, Trace } from '#shared/engine/touchstone/touchstone-file.ts'
import { writeTouchstone } from '#shared/engine/touchstone/write-touchstone.ts'
import { PAIR_SWEEP, THREE_TERMINATIONS } from './transformer-sheet.ts'

/** What `setInputFiles` takes. */
export interface SweepFile {
  readonly name: string
  readonly mimeType: string
  readonly buffer: Buffer
}

/** Open, short and load at 2450 ohm, in the order given; `prefix` says nothing about which is which. */
export function terminationFiles(names: Readonly<Record<'open' | 'short' | 'load', string>>): SweepFile[] {
  return (['open', 'short', 'load'] as const).map((role) =>
    sweepFile(
      names[role],
      onePort(THREE_TERMINATIONS.map(({ mhz, readings }) => ({ hz: mhz * 1e6, s11: readings[role] }))),
    ),
  )
}

/** The pair of section 3; both directions alike. */
export function pairFile(name: string): SweepFile {
  return sweepFile(name, twoPort(PAIR_SWEEP.map(({ mhz, s11, s21 }) => ({ hz: mhz * 1e6, s11, s21 }))))
}

/** A pair of smooth, alike, lossy devices at so many points from 1 to 30 MHz. */
export function longPairFile(name: string, points: number): SweepFile {
  const rows = Array.from({ length: points }, (_, place) => {
    const hz = Math.round(1e6 + (29e6 * place) / (points - 1))
    const turn = hz / 5e6
    return {
      hz,
      s11: { re: -0.2 * Math.cos(turn), im: 0.15 * Math.sin(turn) },
      s21: { re: 0.8 * Math.cos(turn), im: -0.8 * Math.sin(turn) },
    }
  })
  return sweepFile(name, twoPort(rows))
}

export function sweepFile(name: string, file: TouchstoneFile): SweepFile {
  const text = writeTouchstone(file)
  if (isFailure(text)) throw new Error(text.message)
  return { name, mimeType: 'application/octet-stream', buffer: Buffer.from(text) }
}

export function onePort(points: readonly { readonly hz: number; readonly s11: Complex }[]): TouchstoneFile {
  return { ...common(points, 1), ports: 1, s11: trace(points.map(({ s11 }) => s11)) }
}

function twoPort(
  points: readonly { readonly hz: number; readonly s11: Complex; readonly s21: Complex }[],
): TouchstoneFile {
  const s11 = trace(points.map((point) => point.s11))
  const s21 = trace(points.map((point) => point.s21))
  return { ...common(points, 2), ports: 2, s11, s21, s12: s21, s22: s11 }
}

function common(points: readonly { readonly hz: number }[], ports: number) {
  return {
    version: '1' as const,
    referenceOhm: Array.from({ length: ports }, () => 50),
    frequencyHz: Float64Array.from(points, ({ hz }) => Math.round(hz)),
    noisePoints: 0,
    warnings: [],
    info: [],
  }
}

function trace(values: readonly Complex[]): Trace {
  return { re: Float64Array.from(values, ({ re }) => re), im: Float64Array.from(values, ({ im }) => im) }
}
