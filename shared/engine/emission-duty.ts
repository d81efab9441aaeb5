/**
 * Average over peak power of an emission while transmitting; the share of time transmitting comes on top.
 * Source: FCC OET Bulletin 65 Supplement B, Edition 97-01, Table 2 (confirmed by quotation), except where
 * an entry says otherwise.
 */

export interface EmissionDuty {
  readonly name: string
  /** 0 to 1. */
  readonly duty: number
  readonly source: string
}

const SUPPLEMENT_B = 'OET 65 Supplement B, Table 2'
const HANDBOOKS = 'amateur handbooks, from memory, verify'

export const EMISSION_DUTIES = {
  'ssb-conversational': { name: 'SSB voice, no processing', duty: 0.2, source: SUPPLEMENT_B },
  'ssb-processed': { name: 'SSB voice, heavy processing', duty: 0.5, source: SUPPLEMENT_B },
  'cw-conversational': { name: 'CW', duty: 0.4, source: SUPPLEMENT_B },
  'fm-voice': { name: 'FM voice', duty: 1, source: SUPPLEMENT_B },
  'fsk-rtty': { name: 'FSK or RTTY', duty: 1, source: SUPPLEMENT_B },
  'afsk-ssb': { name: 'AFSK on SSB', duty: 1, source: SUPPLEMENT_B },
  carrier: { name: 'Carrier', duty: 1, source: SUPPLEMENT_B },
  'am-50': { name: 'AM voice, 50 % modulated, of PEP', duty: 0.5, source: HANDBOOKS },
  'am-100': { name: 'AM voice, 100 % modulated, of PEP', duty: 0.25, source: HANDBOOKS },
  'am-unmodulated': { name: 'AM, unmodulated', duty: 1, source: HANDBOOKS },
  'digital-keyed': { name: 'Other keyed digital modes', duty: 1, source: 'conservative default, our choice' },
} as const satisfies Record<string, EmissionDuty>

export type EmissionId = keyof typeof EMISSION_DUTIES
