import type { PlainDate } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'
import type { Doubt } from './doubt.ts'
import type { Action } from './types.ts'

/** Every sentence of a verdict, in one place: plain enough to be read out to a served agency. */

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec']

/** "14 Mar 2026". */
export function dayText(day: PlainDate): string {
  const [year, month, date] = day.split('-').map(Number)
  return `${date} ${MONTHS[(month ?? 1) - 1]} ${year}`
}

/** At most three digits that mean something: 84.8 is "85", 12.03 "12", 4.12 "4.1". */
export function amountText(value: number): string {
  return value >= 10 ? String(Math.round(value)) : String(Math.round(value * 10) / 10)
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
  'boot-and-update': 'boot and update',
  'on-air-check': 'on-air check',
}

/** Attended minutes; a capacity run is unattended after its first ten (common practice, no source). */
export const MINUTES: Readonly<Record<Procedure, number>> = {
  'heat-test': 60,
  'pair-loss': 20,
  'open-short-load': 20,
  'antenna-sweep': 15,
  'feedline-loss': 15,
  'battery-capacity': 10,
  'radio-check': 15,
  inspection: 10,
  count: 30,
  calibration: 60,
  'boot-and-update': 60,
  'on-air-check': 15,
}
export const SWAP_MINUTES = 15
export const FETCH_MINUTES = 120

export function lapsedText(
  name: string,
  procedure: Procedure,
  testedOn: PlainDate,
  band: Band | null,
): string {
  return `${name}: last ${PROCEDURE_WORDS[procedure]}${onBand(band)} on ${dayText(testedOn)}, its time has run out`
}

export function neverText(name: string, procedure: Procedure, band: Band | null): string {
  return `${name}: no ${PROCEDURE_WORDS[procedure]}${onBand(band)} on record`
}

export function raisedText(name: string, procedure: Procedure, reason: string, dueOn: PlainDate): string {
  return `${name}: ${PROCEDURE_WORDS[procedure]} asked for by ${dayText(dueOn)} (${reason}) has not come`
}

export function doubtText(name: string, procedure: Procedure, doubt: Doubt, band: Band | null): string {
  const what = `${name}: ${PROCEDURE_WORDS[procedure]}${onBand(band)} is in doubt`
  if (doubt.kind === 'recall') return `${what}, ${doubt.check.reason}`
  const how = doubt.kind === 'calibration-lapsed' ? 'had lapsed' : 'failed'
  return `${what}, the calibration of ${doubt.instrument} ${how}`
}

/** What lifts a missing, lapsed or doubted check. */
export function testAction(name: string, procedure: Procedure, band: Band | null): Action {
  const kind = procedure === 'count' ? 'count' : procedure === 'calibration' ? 'calibrate' : 'test'
  const text =
    procedure === 'count'
      ? `Count ${name}`
      : `${capital(PROCEDURE_WORDS[procedure])} of ${name}${onBand(band)}`
  return { kind, text, minutes: MINUTES[procedure] }
}

export function replaceAction(name: string): Action {
  return { kind: 'replace', text: `Replace ${name}`, minutes: SWAP_MINUTES }
}

export function onBand(band: Band | null): string {
  return band ? ` on ${band}` : ''
}

export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** "10 m, 15 m and 20 m". */
export function listText(words: readonly string[]): string {
  if (words.length < 2) return words.join('')
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`
}
