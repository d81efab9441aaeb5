import { describe, expect, it } from 'vitest'
import { EMISSION_DUTIES } from '#shared/engine/emission-duty.ts'

describe('EMISSION_DUTIES', () => {
  // OET Bulletin 65 Supplement B, Table 2.
  it('holds the duties of Supplement B', () => {
    expect(EMISSION_DUTIES['ssb-conversational'].duty).toBe(0.2)
    expect(EMISSION_DUTIES['ssb-processed'].duty).toBe(0.5)
    expect(EMISSION_DUTIES['cw-conversational'].duty).toBe(0.4)
    for (const mode of ['fm-voice', 'fsk-rtty', 'afsk-ssb', 'carrier', 'digital-keyed'] as const)
      expect(EMISSION_DUTIES[mode].duty).toBe(1)
  })
})
