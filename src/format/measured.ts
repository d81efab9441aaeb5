import { numberText } from './quantity.ts'

/** Decimals that a figure is shown with where no uncertainty says how many it supports. Our choice. */
const DECIMALS: Readonly<Record<string, number>> = {
  efficiency: 1,
  capacityFraction: 1,
  swr: 2,
  swrChange: 2,
  lossDb: 2,
  peakC: 1,
  watts: 1,
}

/** The most a screen shows, however sure the figure is. */
const MOST_DECIMALS = 3

/**
 * How many decimals a figure supports: its expanded uncertainty is written with two digits where the first is 1 or 2,
 * else with one, and the figure ends where that ends (JCGM 100:2008, 7.2.6: no more digits than that).
 */
export function decimalsOf(uncertainty: number | null, measure: string): number {
  if (uncertainty === null || !(uncertainty > 0)) return DECIMALS[measure] ?? 2
  const exponent = Math.floor(Math.log10(uncertainty))
  const leading = uncertainty / 10 ** exponent
  return Math.min(MOST_DECIMALS, Math.max(0, leading < 3 ? 1 - exponent : -exponent))
}

interface Measured {
  readonly value: number
  readonly uncertainty: number | null
}

/** `82.5 ± 1.7`: both with the decimals that the uncertainty supports. */
export function measuredText({ value, uncertainty }: Measured, measure: string): string {
  const decimals = decimalsOf(uncertainty, measure)
  if (uncertainty === null) return numberText(value, decimals)
  return `${numberText(value, decimals, true)}\u00a0±\u00a0${numberText(uncertainty, decimals, true)}`
}
