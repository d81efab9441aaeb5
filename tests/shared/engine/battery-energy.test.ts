import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  capacityAdvice,
  mayCharge,
  presentAh,
  runtimeAtPowerH,
  usableEnergyWh,
} from '#shared/engine/battery-energy.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

const battery = { nominalV: 12.8, ratedAh: 20, capacityFraction: 0.92, depth: 0.9, temperatureFactor: 1 }

describe('usableEnergyWh', () => {
  // Calculation sheet, section 10.
  it.each([
    [12.8, 20, 0.92, 0.9, 1, 211.968],
    [12.8, 20, 0.92, 0.9, 0.8, 169.574],
    [12, 35, 0.85, 0.5, 1 / 1.19, 150],
    [12.8, 100, 1, 0.8, 1, 1024],
  ])(
    'of %f V, %i Ah, fraction %f, depth %f, temperature %f is %f Wh',
    (v, ah, fraction, depth, factor, wh) => {
      const share = { ratedAh: ah, capacityFraction: fraction, depth, temperatureFactor: factor }
      expectClose(usableEnergyWh({ nominalV: v, ...share }), wh)
    },
  )

  it('counts a new battery at no more than 1.1 of its rating', () => {
    expect(presentAh({ ...battery, capacityFraction: 1.1 })).toBe(
      presentAh({ ...battery, capacityFraction: 1.3 }),
    )
    expect(presentAh({ ...battery, capacityFraction: 1.05 })).toBeCloseTo(21, 10)
  })

  it.each([
    ['capacityFraction', -0.01],
    ['capacityFraction', 1.31],
    ['depth', 0],
    ['depth', 1.01],
    ['temperatureFactor', 0],
    ['ratedAh', 0],
    ['nominalV', 0],
  ])('refuses a %s of %f', (field, value) => {
    expect(usableEnergyWh({ ...battery, [field]: value })).toMatchObject({ code: 'E_RANGE', field })
  })
})

describe('runtimeAtPowerH', () => {
  it('is energy over mean power', () => {
    expectClose(runtimeAtPowerH(211.968, 12), 17.664)
    expect(runtimeAtPowerH(100, 0)).toMatchObject({ code: 'E_RANGE', field: 'meanW' })
  })
})

describe('capacityAdvice', () => {
  // IEEE 1188-2005 and 450-2002 clause 8: 80.0 % exactly is not yet below.
  it.each([
    [0.799, 'REPLACE'],
    [0.8, 'TEST_YEARLY'],
    [15.2 / 19, 'TEST_YEARLY'],
    [0.8999, 'TEST_YEARLY'],
    [0.9, 'OK'],
    [1.3, 'OK'],
  ])('for %f of the rating is %s', (fraction, advice) => {
    expect(capacityAdvice(fraction)).toBe(advice)
  })

  it('refuses a fraction above 1.3', () => {
    expect(capacityAdvice(1.31)).toMatchObject({ code: 'E_RANGE' })
  })
})

describe('mayCharge', () => {
  it('is no below 0 C for lithium only', () => {
    expect(mayCharge('lifepo4', -0.1)).toBe(false)
    expect(mayCharge('lithium-ion', -0.1)).toBe(false)
    expect(mayCharge('lifepo4', 0)).toBe(true)
    expect(mayCharge('agm', -10)).toBe(true)
  })
})

describe('battery figures', () => {
  it('answer any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(
        any,
        any,
        any,
        any,
        any,
        (nominalV, ratedAh, capacityFraction, depth, temperatureFactor) => {
          const share = { ratedAh, capacityFraction, depth, temperatureFactor }
          expectNumbersReal(usableEnergyWh({ nominalV, ...share }))
          expectNumbersReal([runtimeAtPowerH(nominalV, ratedAh), capacityAdvice(depth)])
        },
      ),
    )
  })
})
