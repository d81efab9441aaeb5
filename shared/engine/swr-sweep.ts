/**
 * An SWR sweep and what is read off it, at the samples: no curve is fitted through them.
 * Source: calculation sheet, section 7.
 */
import { checkPositive } from './check-range.ts'
import { checkNumber, failure, type Failure, type Outcome } from './outcome.ts'

export interface SwrSample {
  readonly frequencyHz: number
  /** 1 or more, referred to 50 ohm; Infinity is a total reflection. */
  readonly swr: number
}

/** A contiguous run of samples at or under an SWR. An open end met the edge of the sweep: "or more". */
export interface SwrBandwidth {
  readonly lowHz: number
  readonly highHz: number
  readonly widthHz: number
  readonly lowOpen: boolean
  readonly highOpen: boolean
}

/**
 * `E_TOO_FEW` under two samples; `E_GRID` where frequencies do not increase; `E_RANGE`, `E_NUMBER` for a
 * frequency not above 0 (to 1e12 Hz) or an SWR below 1. Faults name the 1-based row as `line`.
 */
export function checkSweep(samples: readonly SwrSample[]): Failure | undefined {
  if (!Array.isArray(samples) || samples.length < 2)
    return failure('E_TOO_FEW', 'A sweep needs at least two samples.', { field: 'samples' })
  let before = 0
  for (let row = 0; row < samples.length; row++) {
    const sample: SwrSample | undefined = samples[row]
    const bad = checkPositive('frequencyHz', sample?.frequencyHz, 1e12) ?? checkSwr(sample?.swr)
    if (bad) return { ...bad, line: row + 1 }
    const { frequencyHz = 0 } = sample ?? {}
    if (frequencyHz <= before) {
      const message = `Sample ${row + 1} does not have a higher frequency than the one before.`
      return failure('E_GRID', message, { field: 'frequencyHz', line: row + 1 })
    }
    before = frequencyHz
  }
  return undefined
}

/** The sample of lowest SWR, the first of equals. Errors of `checkSweep`. */
export function sweepMinimum(samples: readonly SwrSample[]): Outcome<SwrSample> {
  const bad = checkSweep(samples)
  if (bad) return bad
  return samples[lowestIndex(samples)] as SwrSample
}

/**
 * The run with SWR <= `swr` (1 to 1000) around the minimum, each end moved to the crossing by linear
 * interpolation of SWR against frequency; null when the minimum lies above. Errors of `checkSweep`.
 */
export function swrBandwidth(samples: readonly SwrSample[], swr: number): Outcome<SwrBandwidth | null> {
  const bad = checkSweep(samples) ?? checkNumber('swr', swr, 1, 1000)
  if (bad) return bad
  const at = lowestIndex(samples)
  if ((samples[at]?.swr ?? Infinity) > swr) return null
  const low = runEnd(samples, { at, swr, step: -1 })
  const high = runEnd(samples, { at, swr, step: 1 })
  return {
    lowHz: low.frequencyHz,
    highHz: high.frequencyHz,
    widthHz: high.frequencyHz - low.frequencyHz,
    lowOpen: low.open,
    highOpen: high.open,
  }
}

/** SWR at a frequency within a checked sweep, by linear interpolation; Infinity beside a total reflection. */
export function swrAt(samples: readonly SwrSample[], frequencyHz: number): number {
  const upper = firstAtOrAbove(samples, frequencyHz)
  const [a, b] = [samples[upper - 1], samples[upper]]
  if (!b || !a || b.frequencyHz === frequencyHz) return b?.swr ?? samples.at(-1)?.swr ?? Infinity
  if (a.swr === Infinity || b.swr === Infinity) return Infinity
  return a.swr + ((b.swr - a.swr) * (frequencyHz - a.frequencyHz)) / (b.frequencyHz - a.frequencyHz)
}

/** Index of the first sample at or above a frequency, by halving; the length when there is none. */
export function firstAtOrAbove(
  samples: readonly { readonly frequencyHz: number }[],
  frequencyHz: number,
): number {
  let [low, high] = [0, samples.length]
  while (low < high) {
    const middle = (low + high) >> 1
    if ((samples[middle]?.frequencyHz ?? Infinity) < frequencyHz) low = middle + 1
    else high = middle
  }
  return low
}

function checkSwr(swr: unknown): Failure | undefined {
  return swr === Infinity ? undefined : checkNumber('swr', swr, 1)
}

function lowestIndex(samples: readonly SwrSample[]): number {
  let at = 0
  for (let i = 1; i < samples.length; i++) {
    if ((samples[i]?.swr ?? Infinity) < (samples[at]?.swr ?? Infinity)) at = i
  }
  return at
}

function runEnd(
  samples: readonly SwrSample[],
  from: { at: number; swr: number; step: 1 | -1 },
): { frequencyHz: number; open: boolean } {
  const { swr, step } = from
  let { at } = from
  while ((samples[at + step]?.swr ?? Infinity) <= swr) at += step
  const [inside, outside] = [samples[at] as SwrSample, samples[at + step]]
  if (!outside) return { frequencyHz: inside.frequencyHz, open: true }
  // Beside a total reflection the straight line is vertical: the crossing is at the last sample inside.
  const part = (swr - inside.swr) / (outside.swr - inside.swr)
  return { frequencyHz: inside.frequencyHz + part * (outside.frequencyHz - inside.frequencyHz), open: false }
}
