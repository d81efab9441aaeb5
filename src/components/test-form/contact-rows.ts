import type { Band } from '#shared/engine/vocabulary.ts'
import { typedNumber } from './band-rows.ts'

/** One band of an on-air check as it stands in the form; a band that was not tried is not sent. */
export interface ContactRow {
  readonly band: Band
  outcome: 'not-tried' | 'answered' | 'silent'
  powerW: string
  answeredBy: string
  reportReceived: string
  reportSent: string
}

export function contactRows(bands: readonly Band[], watts: number | null): ContactRow[] {
  return bands.map((band) => ({
    band,
    outcome: 'not-tried',
    powerW: watts === null ? '' : String(watts),
    answeredBy: '',
    reportReceived: '',
    reportSent: '',
  }))
}

export function triedRows(rows: readonly ContactRow[]): ContactRow[] {
  return rows.filter(({ outcome }) => outcome !== 'not-tried')
}

export function sentContacts(rows: readonly ContactRow[]): object[] {
  return triedRows(rows).map(({ outcome, powerW, ...words }) => ({
    ...words,
    powerW: typedNumber(powerW),
    answered: outcome === 'answered',
  }))
}
