import { describe, expect, it } from 'vitest'
import { packBands, unpackBands } from '#shared/engine/readiness/band-codes.ts'
import type { BandCapability } from '#shared/engine/readiness/period-types.ts'
import { BANDS } from '#shared/engine/vocabulary.ts'

const cell = (fields: Partial<BandCapability>): BandCapability => ({
  band: '40 m',
  state: 'proven',
  watts: 100,
  wattsAtAntenna: 85.4,
  fraction: 0.854,
  lossDb: 0.69,
  limit: '',
  testId: null,
  testedOn: null,
  ...fields,
})

describe('packed bands', () => {
  it('come back as band, state, share and watts', () => {
    const packed = packBands([cell({}), cell({ band: '10 m', state: 'limited', wattsAtAntenna: 12 })])
    expect(packed).toBe('3p85:85,9l85:12')
    expect(unpackBands(packed)).toEqual([
      { band: '40 m', state: 'proven', fraction: 0.85, wattsAtAntenna: 85 },
      { band: '10 m', state: 'limited', fraction: 0.85, wattsAtAntenna: 12 },
    ])
  })

  it('carry every band and state, and what nobody knows', () => {
    const states = ['proven', 'limited', 'not-proven', 'out'] as const
    const all = BANDS.map((band, index) =>
      cell({ band, state: states[index % 4]!, fraction: null, wattsAtAntenna: null }),
    )
    expect(unpackBands(packBands(all))).toEqual(
      all.map(({ band, state }) => ({ band, state, fraction: null, wattsAtAntenna: null })),
    )
  })

  it('leave out what cannot be read', () => {
    expect(unpackBands('')).toEqual([])
    expect(unpackBands('zz,3p85:85,3x1:1,zp1:1')).toHaveLength(1)
  })
})
