import { describe, expect, it } from 'vitest'
import { kitExposure, type ExposureUse } from '#shared/engine/kit-exposure.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { valueOf } from '../../support/value-of.ts'

const USE: ExposureUse = { emission: 'carrier', onMinutes: 1, offMinutes: 0, gainDbi: 2.15 }

describe('the exposure record of a kit', () => {
  it('keeps to the distances of the sheet at the upper edge of the band (section 11)', () => {
    const [row] = valueOf(kitExposure([{ band: '20 m', pepAtAntennaW: 100 }], USE, 'itu-2'))
    // The sheet has 0.865331 and 1.93494 m at 14.2 MHz; the distance grows with frequency here.
    expect(row?.frequencyMHz).toBe(14.35)
    expect(row?.controlled.distanceM).toBeCloseTo((0.865331 * 14.35) / 14.2, 4)
    expect(row?.general.distanceM).toBeCloseTo((1.93494 * 14.35) / 14.2, 4)
    expect(row?.warnings.map(({ code }) => code)).toEqual(['W_NEAR_FIELD'])
  })

  it('warns of the near field where only the shorter of the two distances lies within it (section 11)', () => {
    // Within wavelength/(2 pi), 1.61 m at 29.7 MHz: 1.57 m for the controlled tier, 3.5 m for everybody.
    const [row] = valueOf(kitExposure([{ band: '10 m', pepAtAntennaW: 75 }], USE, 'itu-2'))
    expect([row?.controlled.distanceM, row?.general.distanceM].map((m) => m! < 1.61)).toEqual([true, false])
    expect(row?.warnings.map(({ code }) => code)).toEqual(['W_NEAR_FIELD'])
  })

  it('averages over the window of each tier (sheet: 5 minutes of 10 in 30 are half)', () => {
    const use = { ...USE, emission: 'ssb-conversational', onMinutes: 5, offMinutes: 5 } as const
    const [row] = valueOf(kitExposure([{ band: '20 m', pepAtAntennaW: 100 }], use, 'itu-2'))
    expect(row?.general.averageW).toBeCloseTo(10, 9)
    // Five of the six minutes.
    expect(row?.controlled.averageW).toBeCloseTo((100 * 0.2 * 5) / 6, 9)
  })

  it('says the voltage at a known feed point at full peak power (sheet, section 12)', () => {
    const use = { ...USE, feedOhm: 2450 }
    const [row] = valueOf(kitExposure([{ band: '40 m', pepAtAntennaW: 100 }], use, 'itu-2'))
    expect(row?.feedPoint?.rmsV).toBeCloseTo(494.975, 2)
    expect(row?.feedPoint?.peakV).toBeCloseTo(700, 2)
    expect(
      valueOf(kitExposure([{ band: '40 m', pepAtAntennaW: 100 }], USE, 'itu-2'))[0]?.feedPoint,
    ).toBeNull()
  })

  it('names the band of what cannot be computed, and leaves out bands that a region has not', () => {
    const never = { ...USE, onMinutes: 0 }
    const refused = kitExposure([{ band: '40 m', pepAtAntennaW: 10 }], never, 'itu-2')
    expect(isFailure(refused) && refused.message).toMatch(/^40 m: /)
    expect(kitExposure([{ band: '1.25 m', pepAtAntennaW: 10 }], USE, 'itu-1')).toEqual([])
  })
})
