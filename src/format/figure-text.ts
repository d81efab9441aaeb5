import { numberText } from '@/format/quantity.ts'

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

/** The most that a figure of a test is shown with, however sure it is. */
const MOST_DECIMALS = 3

/** Decimals that an uncertainty supports: two of its digits, never more than `most`. Source: JCGM 100:2008, 7.2.6. */
export function digitsBeside(uncertainty: number | null, most: number): number {
  if (uncertainty === null || !(uncertainty > 0)) return most
  return Math.min(Math.max(1 - Math.floor(Math.log10(uncertainty)), 0), most)
}

/** Decimals of what a test found, by its uncertainty, else by what kind of figure it is. In the unit that is shown. */
export function digitsOfFinding(measure: string, uncertainty: number | null): number {
  const known = uncertainty !== null && uncertainty > 0
  return digitsBeside(uncertainty, known ? MOST_DECIMALS : (DECIMALS[measure] ?? 2))
}

/** `92.1 % ± 2.4 %` with one unit: `92.1 ± 2.4 %`; without a known uncertainty the value alone. */
export function withUncertainty(
  value: number,
  uncertainty: number | null,
  unit: string,
  most: number,
): string {
  const ending = unit === '' ? '' : `\u00a0${unit}`
  if (uncertainty === null) return `${numberText(value, most)}${ending}`
  const digits = digitsBeside(uncertainty, most)
  return `${numberText(value, digits, true)}\u00a0±\u00a0${numberText(uncertainty, digits, true)}${ending}`
}
