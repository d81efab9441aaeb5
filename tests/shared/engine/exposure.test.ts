import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  EXPOSURE_CAUTION,
  exposureDistance,
  exposureShare,
  FREE_SPACE,
  nearFieldM,
  powerDensity,
  type ExposureDistance,
  type Radiator,
} from '#shared/engine/exposure.ts'
import type { ExposureTier } from '#shared/engine/exposure-limits.ts'
import { feetFromMetres } from '#shared/engine/units.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

const distance = (radiator: Radiator, tier: ExposureTier) =>
  (exposureDistance(radiator, tier) as ExposureDistance).distanceM
const DIPOLE: Radiator = { averageW: 100, gainDbi: 2.15, frequencyMhz: 14.2 }

describe('exposureDistance', () => {
  // Calculation sheet, section 11.
  it.each([
    [100, 2.15, 14.2, 0.865331, 1.93494, 0.371354, 1.20934],
    [100, 2.15, 28.4, 1.73066, 3.86988, 0.371354, 2.41867],
    [40, 0, 7.1, 0.21364, 0.477713, 0.0905415, 0.298571],
    [20, 2.15, 3.6, 0.0981096, 0.21938, 0.0742707, 0.137112],
    [50, 6, 146, 2.01372, 4.50282, 0.450565, 2.81427],
  ])('of %i W, %f dBi, %f MHz', (averageW, gainDbi, frequencyMhz, controlled, general, at3m, free) => {
    const radiator = { averageW, gainDbi, frequencyMhz }
    expectClose(distance(radiator, 'controlled'), controlled)
    expectClose(distance(radiator, 'general'), general)
    expectClose(powerDensity(radiator, 3), at3m)
    expectClose(distance({ ...radiator, reflectionFactor: FREE_SPACE }, 'general'), free)
  })

  // Eight-Yagi 144 MHz array, 24 dBi, limits 1.0 and 0.2: computed, and published in Supplement B within 1 ft.
  it.each([
    [150, 90.896, 203.25, null, null],
    [500, 165.95, 371.08, 166, null],
    [1500, 287.44, 642.73, 287, 642],
  ])('of %i W from 24 dBi is %f and %f ft', (averageW, controlledFt, generalFt, publishedC, publishedG) => {
    const array = { averageW, gainDbi: 24, frequencyMhz: 144 }
    const [c, g] = (['controlled', 'general'] as const).map((tier) => feetFromMetres(distance(array, tier)))
    expectClose(c, controlledFt)
    expectClose(g, generalFt)
    if (publishedC !== null) expect(Math.abs((c ?? 0) - publishedC)).toBeLessThanOrEqual(1)
    if (publishedG !== null) expect(Math.abs((g ?? 0) - publishedG)).toBeLessThanOrEqual(1)
  })

  it('is 0 without power', () => {
    expect(exposureDistance({ ...DIPOLE, averageW: 0 }, 'general')).toMatchObject({
      distanceM: 0,
      covered: false,
    })
  })

  it('flags the near field, on 7 MHz every result under 6.7 m', () => {
    expect(nearFieldM(7.1)).toBeCloseTo(6.72, 2)
    const at = (averageW: number) => exposureDistance({ averageW, gainDbi: 0, frequencyMhz: 7.1 }, 'general')
    expect(at(40)).toMatchObject({ warnings: [{ code: 'W_NEAR_FIELD' }] })
    expect(at(7800)).toMatchObject({ warnings: [{ code: 'W_NEAR_FIELD' }] })
    expect(at(8000)).toMatchObject({ warnings: [] })
  })

  it('flags a distance within half the antenna', () => {
    const near = { averageW: 50, gainDbi: 6, frequencyMhz: 146 }
    expect(exposureDistance({ ...near, antennaLengthM: 8 }, 'general')).toMatchObject({ warnings: [] })
    expect(exposureDistance({ ...near, antennaLengthM: 10 }, 'general')).toMatchObject({
      warnings: [{ code: 'W_NEAR_FIELD' }],
    })
  })

  it('does not cover distances below 0.2 m', () => {
    const weak = { averageW: 20, gainDbi: 2.15, frequencyMhz: 3.6 }
    expect(exposureDistance(weak, 'controlled')).toMatchObject({ covered: false })
    expect(exposureDistance(weak, 'general')).toMatchObject({ covered: true })
  })

  it('has the density of the limit at its distance', () => {
    const found = exposureDistance(DIPOLE, 'general') as ExposureDistance
    expectClose(powerDensity(DIPOLE, found.distanceM), found.limitMWPerCm2)
  })

  it('refuses what lies out of range', () => {
    expect(powerDensity(DIPOLE, 0)).toMatchObject({ code: 'E_RANGE', field: 'distanceM' })
    expect(exposureDistance({ ...DIPOLE, averageW: -1 }, 'general')).toMatchObject({ field: 'averageW' })
    expect(exposureDistance({ ...DIPOLE, frequencyMhz: 0.2 }, 'general')).toMatchObject({
      field: 'frequencyMhz',
    })
  })

  it('carries words to show with every result', () => {
    expect(EXPOSURE_CAUTION).toMatch(/^This is a far-field estimate .* while it is keyed\.$/)
  })
})

describe('exposureShare', () => {
  it('sums the shares of several transmitters, each at its distance', () => {
    const one = { radiator: DIPOLE, distanceM: distance(DIPOLE, 'general') }
    expectClose(exposureShare([one], 'general'), 1)
    expectClose(exposureShare([one, { ...one, distanceM: one.distanceM * 2 }], 'general'), 1.25)
  })

  it('refuses none, and names the bad row', () => {
    expect(exposureShare([], 'general')).toMatchObject({ code: 'E_TOO_FEW' })
    const bad = { radiator: { ...DIPOLE, averageW: -1 }, distanceM: 3 }
    expect(exposureShare([{ radiator: DIPOLE, distanceM: 3 }, bad], 'general')).toMatchObject({ line: 2 })
  })

  it('answers any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, any, any, any, (averageW, gainDbi, frequencyMhz, distanceM, antennaLengthM) => {
        const radiator = { averageW, gainDbi, frequencyMhz, antennaLengthM }
        expectNumbersReal([powerDensity(radiator, distanceM), exposureDistance(radiator, 'general')])
        expectNumbersReal(exposureShare([{ radiator, distanceM }], 'controlled'))
      }),
      { numRuns: 500 },
    )
  })
})
