import { describe, expect, it } from 'vitest'
import { exposureLimit, type ExposureLimit, type ExposureTier } from '#shared/engine/exposure-limits.ts'
import { expectClose } from '../../support/sheet-close.ts'

const density = (tier: ExposureTier, mhz: number) => (exposureLimit(tier, mhz) as ExposureLimit).mWPerCm2

describe('exposureLimit', () => {
  // Calculation sheet, section 11 (47 CFR 1.1310(e)(1) Table 1).
  it.each([
    [1.9, 100, 49.8615],
    [3.6, 69.4444, 13.8889],
    [7.1, 17.8536, 3.57072],
    [14.2, 4.4634, 0.89268],
    [21.2, 2.00249, 0.400498],
    [28.4, 1.11585, 0.22317],
    [50.1, 1, 0.2],
    [146, 1, 0.2],
    [440, 1.46667, 0.293333],
    [1296, 4.32, 0.864],
    [2400, 5, 1],
  ])('at %f MHz is %f controlled and %f general', (mhz, controlled, general) => {
    expectClose(density('controlled', mhz), controlled)
    expectClose(density('general', mhz), general)
  })

  it('gives a boundary frequency to the higher row', () => {
    expectClose(density('general', 1.34), 180 / 1.34 ** 2)
    expectClose(density('general', 1.339), 100)
    expectClose(density('controlled', 3), 100)
    expectClose(density('general', 1500), 1)
  })

  it('has rows that agree at their boundaries within 0.3 %', () => {
    for (const [tier, mhz] of [
      ['controlled', 3],
      ['controlled', 30],
      ['controlled', 300],
      ['controlled', 1500],
      ['general', 1.34],
      ['general', 30],
      ['general', 300],
      ['general', 1500],
    ] as const)
      expectClose(density(tier, mhz * (1 - 1e-9)), density(tier, mhz), 3e-3)
  })

  it('has tiers that are a factor of five apart only outside 1.34 to 3 MHz', () => {
    expectClose(density('controlled', 1) / density('general', 1), 1)
    expectClose(density('controlled', 2) / density('general', 2), 2.2222)
    expectClose(density('controlled', 7) / density('general', 7), 5)
  })

  // Field limits: 47 CFR 1.1310(e)(1) Table 1.
  it.each<[ExposureTier, number, number | null, number | null]>([
    ['controlled', 1, 614, 1.63],
    ['controlled', 7, 1842 / 7, 4.89 / 7],
    ['controlled', 146, 61.4, 0.163],
    ['general', 1, 614, 1.63],
    ['general', 7, 824 / 7, 2.19 / 7],
    ['general', 146, 27.5, 0.073],
    ['general', 440, null, null],
  ])('%s at %f MHz allows %s V/m and %s A/m', (tier, mhz, electricVPerM, magneticAPerM) => {
    expect(exposureLimit(tier, mhz)).toMatchObject({ electricVPerM, magneticAPerM })
  })

  it('covers 0.3 to 100,000 MHz', () => {
    for (const mhz of [0.29, 100_001])
      expect(exposureLimit('general', mhz)).toMatchObject({ code: 'E_RANGE' })
    for (const mhz of [0.3, 100_000]) expect(exposureLimit('general', mhz)).toHaveProperty('mWPerCm2')
    expect(exposureLimit('other' as ExposureTier, 7)).toMatchObject({ code: 'E_RANGE', field: 'tier' })
  })
})
