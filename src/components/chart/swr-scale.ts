/**
 * An SWR axis even in the reflected voltage, |Gamma| = (SWR - 1)/(SWR + 1): it reaches from 1 to infinity on a finite
 * length and gives equal lengths to equal changes of what comes back. Source: calculation sheet, section 2.
 */
import type { Scale } from './scale.ts'

/** |Gamma|, 0 to 1; an SWR of Infinity is 1. */
export function reflected(swr: number): number {
  return swr === Infinity ? 1 : (swr - 1) / (swr + 1)
}

/** The places of SWR 1 and of `highest`, px. */
export function swrScale(highest: number, from: number, to: number): Scale {
  const full = reflected(highest)
  return (swr) => from + ((to - from) * Math.min(reflected(swr), full)) / full
}

/** Which numbers go first where there is no room for all. */
const BY_IMPORTANCE = [1, Infinity, 2, 3, 1.5, 5, 10, 1.2, 2.5, 4, 7, 20] as const

/** The numbers to write on the axis, upwards, no two closer than `gap` px. */
export function swrTicks(highest: number, scale: Scale, gap: number): number[] {
  const chosen: number[] = []
  for (const swr of BY_IMPORTANCE) {
    if (swr > highest) continue
    if (chosen.every((other) => Math.abs(scale(other) - scale(swr)) >= gap)) chosen.push(swr)
  }
  return chosen.sort((a, b) => a - b)
}

/** The end of an axis that holds these: the next of the usual numbers above. */
export function highestSwr(values: readonly number[]): number {
  const most = values.reduce((a, b) => Math.max(a, b), 1)
  return [2, 2.5, 3, 4, 5, 7, 10, 20].find((swr) => swr >= most * 1.08) ?? Infinity
}
