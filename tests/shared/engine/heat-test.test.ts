import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { firstMinuteSlope, measureHeatTest, type HeatTestMeasurement } from '#shared/engine/heat-test.ts'
import { BOXBOD, logOf, SET_A, SET_B, SET_D } from '../../support/heat-sets.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('measureHeatTest', () => {
  // Calculation sheet, section 6: set A at 100 W, efficiency 0.83, 0.1176 kg.
  it('brings the figures of set A together', () => {
    const test = measureHeatTest({ ...SET_A, inputW: 100, efficiency: 0.83, massKg: 0.1176 })
    const { resistance, balance, ...rest } = test as HeatTestMeasurement
    expect(rest).toMatchObject({ peakC: 76.5, peakRiseK: 55, fit: { identifiable: true }, warnings: [] })
    expectClose(rest.twoPoint.riseK, 54.8)
    expectClose(resistance?.kPerW, 3.4105779)
    expect(resistance?.lowKPerW).toBeLessThan(3.41)
    expect(resistance?.highKPerW).toBeGreaterThan(3.411)
    expectClose(balance?.ratio, 0.975897)
  })

  it('balances heat by the first minute when there is no curve, and claims no resistance', () => {
    const test = measureHeatTest({ ...SET_B, inputW: 100, efficiency: 0.83, massKg: 0.1176 })
    expect(test).toMatchObject({ fit: { identifiable: false }, resistance: null })
    const slope = firstMinuteSlope(SET_B) as number
    expectClose((test as HeatTestMeasurement).balance?.heatW, 0.1176 * 750 * slope)
  })

  it('measures a device that stays cold', () => {
    const test = measureHeatTest({ ...logOf(20, 60, [20, 20, 20]), inputW: 5, efficiency: 0.9, massKg: 0.1 })
    expect(test).toMatchObject({ peakC: 20, fit: { code: 'E_NO_RISE' }, resistance: null, balance: null })
  })

  it('counts a peak that comes after key-up', () => {
    const test = measureHeatTest({ ...logOf(20, 60, [20, 40, 44, 41]), keyUpAtS: 60, inputW: 50 })
    expect(test).toMatchObject({ peakC: 44, peakRiseK: 24, twoPoint: { riseK: 20 } })
  })

  it('warns once when an efficiency of 1 leaves no heat', () => {
    const test = measureHeatTest({ ...SET_A, inputW: 100, efficiency: 1, massKg: 0.1176 })
    expect(test).toMatchObject({ resistance: null, balance: { ratio: null } })
    expect((test as HeatTestMeasurement).warnings.map(({ code }) => code)).toEqual(['W_HEAT_RF_DISAGREE'])
  })

  // Two minutes of full carrier at about 95 W: common practice, no source.
  it('ranks two builds by their rise and claims no end temperature for either', () => {
    const [first, third] = [115, 91].map((endF) =>
      measureHeatTest({
        ...logOf(24.4, 120, [(76 - 32) / 1.8, (endF - 32) / 1.8]),
        inputW: 95,
        efficiency: 0.72,
      }),
    ) as HeatTestMeasurement[]
    expectClose(first?.twoPoint.riseK, 21.67, 3e-4)
    expectClose(third?.twoPoint.riseK, 8.33, 5e-4)
    for (const test of [first, third])
      expect(test).toMatchObject({ fit: { identifiable: false }, resistance: null })
  })

  it('refuses a power of 0 and an efficiency outside 0 to 1', () => {
    expect(measureHeatTest({ ...SET_A, inputW: 0 })).toMatchObject({ code: 'E_RANGE', field: 'inputW' })
    expect(measureHeatTest({ ...SET_A, inputW: 9, efficiency: 1.1 })).toMatchObject({ field: 'efficiency' })
    expect(measureHeatTest({ ...SET_A, inputW: 9, massKg: 0 })).toMatchObject({ field: 'massKg' })
  })

  it('answers any device without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(
        fc.constantFrom(SET_A, SET_D, BOXBOD),
        any,
        any,
        any,
        any,
        (log, inputW, efficiency, massKg, c) => {
          expectNumbersReal(measureHeatTest({ ...log, inputW, efficiency, massKg, heatCapacityJPerKgK: c }))
        },
      ),
    )
  })
})

describe('firstMinuteSlope', () => {
  it('uses the readings of the first 60 s', () => {
    expectClose(firstMinuteSlope(logOf(20, 60, [20, 32, 40])), 0.2)
    expect(firstMinuteSlope(logOf(20, 61, [20, 32, 40]))).toMatchObject({ code: 'E_TOO_FEW' })
  })
})
