import type { BuildMeasure } from '#shared/engine/builds/matching.ts'
import { numberText } from './quantity.ts'

/** How the measures of a build are called and written. */
interface MeasureWords {
  readonly label: string
  /** Inside a sentence. */
  readonly word: string
  /** As it stands behind a number; empty for SWR. */
  readonly unit: string
  readonly digits: number
  readonly about: string
}

export const MEASURE_WORDS: Readonly<Record<BuildMeasure, MeasureWords>> = {
  lossDb: {
    label: 'Loss',
    word: 'loss',
    unit: 'dB',
    digits: 2,
    about: 'what a unit loses, and the share that it passes on',
  },
  kPerW: {
    label: 'Heat',
    word: 'heat',
    unit: 'K/W',
    digits: 2,
    about: 'rise of the hottest surface for each watt sent in, over runs of one length',
  },
  swr: { label: 'SWR', word: 'SWR', unit: '', digits: 2, about: 'the worst working point of each band' },
}

export interface MeasureWriter {
  readonly unit: string
  readonly value: (stored: number) => number
  /** The number alone, with the digits that the measure carries. */
  readonly number: (stored: number) => string
  /** With its unit. */
  readonly text: (stored: number) => string
}

/** Writes figures of one measure in the member's units. */
export function measureWriter(
  measure: BuildMeasure,
  { shown, unitOf }: { shown: (stored: number, unit: string) => number; unitOf: (unit: string) => string },
): MeasureWriter {
  const { unit, digits } = MEASURE_WORDS[measure]
  const isRise = measure === 'kPerW'
  const shownUnit = isRise ? `${unitOf('K')}/W` : unit
  const value = (stored: number) => (isRise ? shown(stored, 'K') : stored)
  const number = (stored: number) => numberText(value(stored), digits, true)
  return {
    unit: shownUnit,
    value,
    number,
    text: (stored) => (shownUnit === '' ? number(stored) : `${number(stored)}\u00a0${shownUnit}`),
  }
}

/** What a loss leaves of the power, in whole percent: 0.62 dB is "87 %". */
export function passedOn(lossDb: number): string {
  return `${numberText(100 * 10 ** (-lossDb / 10), 0)}\u00a0%`
}
