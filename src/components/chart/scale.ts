/** From a value to its place in the picture, px. */
export type Scale = (value: number) => number

export interface Range {
  readonly low: number
  readonly high: number
}

/** Even steps; `from` is the place of the low end, which on a vertical axis is the larger one. */
export function linearScale({ low, high }: Range, from: number, to: number): Scale {
  const perUnit = high > low ? (to - from) / (high - low) : 0
  return (value) => from + (value - low) * perUnit
}

/** The smallest and the largest of what is known; undefined values are left out. */
export function extentOf(values: readonly (number | null | undefined)[]): Range | undefined {
  const known = values.filter((value): value is number => typeof value === 'number' && Number.isFinite(value))
  if (known.length === 0) return undefined
  return {
    low: known.reduce((a, b) => Math.min(a, b)),
    high: known.reduce((a, b) => Math.max(a, b)),
  }
}

/** Widened on both sides by a share of its length, or by `least` where it has none. */
export function padded({ low, high }: Range, share: number, least = 0): Range {
  const pad = Math.max((high - low) * share, least)
  return { low: low - pad, high: high + pad }
}
