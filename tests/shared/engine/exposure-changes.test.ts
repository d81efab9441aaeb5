import { describe, expect, it } from 'vitest'
import { exposureChanges, type ExposureConfiguration } from '#shared/engine/exposure-changes.ts'

const antenna = { id: 'a', designation: 'ANT-1', lengthM: 20, feedOhm: 2450 }
const THEN: ExposureConfiguration = {
  antenna,
  bands: [
    { band: '40 m', pepAtAntennaW: 80 },
    { band: '10 m', pepAtAntennaW: 60 },
  ],
}
const changed = (now: Partial<ExposureConfiguration>) => exposureChanges(THEN, { ...THEN, ...now })

describe('what changed since an exposure was evaluated', () => {
  it('is nothing for the same antenna, bands and power within a tenth', () => {
    const bands = THEN.bands.map((one) => ({ ...one, pepAtAntennaW: one.pepAtAntennaW * 1.09 }))
    expect(changed({ bands })).toEqual([])
  })

  it('is the antenna, or what its record says of it', () => {
    expect(changed({ antenna: { ...antenna, id: 'b', designation: 'ANT-2' } })).toEqual([
      'the antenna is ANT-2, it was ANT-1',
    ])
    expect(changed({ antenna: null })).toEqual(['the antenna is none, it was ANT-1'])
    expect(changed({ antenna: { ...antenna, lengthM: 10, feedOhm: 50 } })).toEqual([
      'the length of ANT-1 on record',
      'the feed resistance of ANT-1 on record',
    ])
  })

  it('is the power on a band, up or down', () => {
    const bands = [
      { band: '40 m' as const, pepAtAntennaW: 40 },
      { band: '10 m' as const, pepAtAntennaW: 70 },
    ]
    expect(changed({ bands })).toEqual([
      '40 W at the antenna on 40 m, 80 W then',
      '70 W at the antenna on 10 m, 60 W then',
    ])
  })

  it('is a band that came or went', () => {
    expect(changed({ bands: [THEN.bands[0]!, { band: '20 m', pepAtAntennaW: 80 }] })).toEqual([
      '20 m was not in it',
      'no power is known on 10 m any more',
    ])
  })
})
