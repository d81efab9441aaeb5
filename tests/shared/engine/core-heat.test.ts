import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  heatBalance,
  type HeatBalance,
  surfaceLagS,
  toroidMassKg,
  toroidVolumeCm3,
} from '#shared/engine/core-heat.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('toroid', () => {
  // Calculation sheet, section 6.
  it.each([
    [61, 35.55, 12.7, 24.509, 117.65],
    [35.55, 23, 12.7, 7.3293, 35.181],
    [29, 19, 7.5, 2.8274, 13.572],
    [21, 13, 6.35, 1.3565, 6.5114],
  ])('of %f x %f x %f mm has %f cm3 and %f g', (outsideMm, insideMm, heightMm, cm3, g) => {
    const size = { outsideMm, insideMm, heightMm }
    expectClose(toroidVolumeCm3(size), cm3)
    expectClose((toroidMassKg(size) as number) * 1000, g)
  })

  it('has a hole smaller than its outside', () => {
    expect(toroidMassKg({ outsideMm: 20, insideMm: 20, heightMm: 5 })).toMatchObject({ field: 'insideMm' })
  })

  // Calculation sheet, section 6: 6 mm and 1.1e-6 m2/s give 33 s.
  it('lets the surface follow the core after 33 s at 6 mm', () => {
    expect(Math.round(surfaceLagS(6) as number)).toBe(33)
  })
})

describe('heatBalance', () => {
  // Calculation sheet, section 6.
  it.each([
    [0.1176, 0.188098, 100, 0.83, 16.5902, 17, 0.975897],
    [0.0352, 0.5, 100, 0.87, 13.2, 13, 1.01538],
    [0.1176, 0.05, 100, 0.83, 4.41, 17, 0.259412],
    [0.2352, 0.1, 100, 0.82, 17.64, 18, 0.98],
  ])(
    'of %f kg at %f K/s, %i W, efficiency %f: %f W of %f W',
    (massKg, slopeKPerS, inputW, efficiency, h, r, q) => {
      const balance = heatBalance({ massKg, slopeKPerS, inputW, efficiency }) as HeatBalance
      expectClose(balance.heatW, h)
      expectClose(balance.rfLossW, r)
      expectClose(balance.ratio, q)
    },
  )

  it('warns outside 0.6 to 1.6 and says on which side', () => {
    const balance = (slopeKPerS: number) =>
      heatBalance({ massKg: 0.1, heatCapacityJPerKgK: 1000, slopeKPerS, inputW: 100, efficiency: 0.5 })
    expect(balance(0.3)).toMatchObject({ ratio: 0.6, warnings: [] })
    expect(balance(0.8)).toMatchObject({ ratio: 1.6, warnings: [] })
    expect(balance(0.299)).toMatchObject({
      warnings: [{ code: 'W_HEAT_RF_DISAGREE', message: expect.stringMatching(/^Less heat/) as string }],
    })
    expect(balance(0.801)).toMatchObject({
      warnings: [{ code: 'W_HEAT_RF_DISAGREE', message: expect.stringMatching(/^More heat/) as string }],
    })
  })

  it('has no ratio at an efficiency of 1, and warns', () => {
    const balance = heatBalance({ massKg: 0.1, slopeKPerS: 0.1, inputW: 100, efficiency: 1 })
    expect(balance).toMatchObject({ ratio: null, warnings: [{ code: 'W_HEAT_RF_DISAGREE' }] })
  })

  it('refuses a mass or heat capacity of 0', () => {
    const test = { massKg: 0.1, slopeKPerS: 0.1, inputW: 100, efficiency: 0.8 }
    expect(heatBalance({ ...test, massKg: 0 })).toMatchObject({ code: 'E_RANGE', field: 'massKg' })
    expect(heatBalance({ ...test, heatCapacityJPerKgK: 0 })).toMatchObject({ code: 'E_RANGE' })
  })

  it('answers any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, any, any, any, (massKg, slopeKPerS, inputW, efficiency, heatCapacityJPerKgK) => {
        expectNumbersReal(heatBalance({ massKg, slopeKPerS, inputW, efficiency, heatCapacityJPerKgK }))
        expectNumbersReal(toroidMassKg({ outsideMm: massKg, insideMm: inputW, heightMm: slopeKPerS }))
        expectNumbersReal(surfaceLagS(massKg, inputW))
      }),
      { numRuns: 500 },
    )
  })
})
