import type { PlainDate } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'

/** The words and figures that sentences are made of. */

/** Of what a sentence speaks: how it is, was known to be, or will be if nobody does anything. */
export type Tense = 'now' | 'past' | 'future'

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** "14 Mar 2026". */
export function dayText(day: PlainDate): string {
  return `${Number(day.slice(8))} ${MONTHS[Number(day.slice(5, 7)) - 1]} ${day.slice(0, 4)}`
}

/** "a heat test", "an antenna": by the first letter, which decides for every word of ours. */
export function withArticle(noun: string): string {
  return `${/^[aeiou]/i.test(noun) ? 'an' : 'a'} ${noun}`
}

/** No more digits than mean something: 84.8 is "85", 12.03 "12", 4.12 "4.1". */
export function amountText(value: number): string {
  return value >= 10 ? String(Math.round(value)) : String(Math.round(value * 10) / 10)
}

/** A figure that misses its limit must not be rounded onto it: 79.96 % is "79.9 %", 15.97 h "15.9". */
export function shortText(value: number): string {
  return String(Math.floor(value * 10 + 1e-6) / 10)
}

export const PROCEDURE_WORDS: Readonly<Record<Procedure, string>> = {
  'heat-test': 'heat test',
  'pair-loss': 'efficiency test',
  'open-short-load': 'efficiency test',
  'antenna-sweep': 'antenna sweep',
  'feedline-loss': 'feedline loss test',
  'battery-capacity': 'capacity test',
  'radio-check': 'radio check',
  inspection: 'inspection',
  count: 'count',
  calibration: 'calibration',
  'session-check': 'session check',
  'boot-and-update': 'boot and update',
  'on-air-check': 'on-air check',
}

export function onBand(band: Band | null): string {
  return band ? ` on ${band}` : ''
}

export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
