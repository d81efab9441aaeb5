import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  cyclePeakTemperature,
  maximumPower,
  steadyTemperature,
  thermalResistance,
  type ThermalUse,
} from '#shared/engine/thermal.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

/** Set A at 100 W and an efficiency of 0.83 (calculation sheet, section 6). */
const RTH = 3.4105779

describe('thermalResistance', () => {
  it('divides the end rise by the heat', () => {
    const thermal = thermalResistance({ steadyRiseK: 57.979824, inputW: 100, efficiency: 0.83 })
    expect(thermal).toMatchObject({ warnings: [] })
    expectClose((thermal as { resistanceKPerW: number }).resistanceKPerW, 3.4105779)
    expectClose((thermal as { heatW: number }).heatW, 17)
  })

  it('has none when an efficiency of 1 leaves no heat', () => {
    expect(thermalResistance({ steadyRiseK: 10, inputW: 100, efficiency: 1 })).toMatchObject({
      resistanceKPerW: null,
      warnings: [{ code: 'W_HEAT_RF_DISAGREE' }],
    })
  })

  it.each([
    [0, 0.5],
    [-5, 0.5],
    [100, -0.01],
    [100, 1.01],
  ])('refuses %f W at an efficiency of %f', (inputW, efficiency) => {
    expect(thermalResistance({ steadyRiseK: 10, inputW, efficiency })).toMatchObject({ code: 'E_RANGE' })
  })
})

describe('steadyTemperature', () => {
  // Calculation sheet, section 6.
  it.each([
    [25, 100, 0.83, 1, 82.9798],
    [35, 100, 0.83, 0.5, 63.9899],
    [35, 100, 0.83, 0.2, 46.596],
    [40, 50, 0.75, 1, 82.6322],
    [20, 100, 0.9, 0.4, 33.6423],
  ])('at %i C, %i W, efficiency %f, duty %f is %f C', (ambientC, inputW, efficiency, duty, steadyC) => {
    expectClose(steadyTemperature({ ambientC, resistanceKPerW: RTH, inputW, efficiency, duty }), steadyC)
  })

  it('refuses a duty outside 0 to 1', () => {
    const use = { ambientC: 25, resistanceKPerW: RTH, inputW: 100, efficiency: 0.83 }
    for (const duty of [-0.1, 1.1])
      expect(steadyTemperature({ ...use, duty })).toMatchObject({ code: 'E_RANGE' })
    expect(steadyTemperature({ ...use, duty: 0 })).toBe(25)
  })
})

describe('cyclePeakTemperature', () => {
  const use = { ambientC: 25, resistanceKPerW: RTH, inputW: 100, efficiency: 0.83, tauS: 308.243 }

  it('tends to the average for short cycles and to the full end temperature for long ones', () => {
    const average = steadyTemperature({ ...use, duty: 0.4 * 0.25 }) as number
    expectClose(cyclePeakTemperature({ ...use, emissionDuty: 0.4, onS: 0.1, offS: 0.3 }), average, 1e-3)
    const full = steadyTemperature({ ...use, duty: 0.4 }) as number
    expectClose(cyclePeakTemperature({ ...use, emissionDuty: 0.4, onS: 1e5, offS: 1e5 }), full)
  })

  it('repeats itself: a cycle later the peak is the same', () => {
    const [onS, offS] = [300, 600]
    const peak = cyclePeakTemperature({ ...use, emissionDuty: 1, onS, offS }) as number
    const rested = 25 + (peak - 25) * Math.exp(-offS / use.tauS)
    const end = steadyTemperature({ ...use, duty: 1 }) as number
    expectClose(end + (rested - end) * Math.exp(-onS / use.tauS), peak)
  })
})

describe('maximumPower', () => {
  // Calculation sheet, section 6.
  it.each([
    [85, 35, 0.83, 1, 86.2369],
    [85, 35, 0.83, 0.4, 215.592],
    [105, 40, 0.8, 1, 95.2918],
  ])(
    'to %i C at %i C ambient, efficiency %f, duty %f is %f W',
    (limitC, ambientC, efficiency, duty, powerW) => {
      expectClose(maximumPower({ limitC, ambientC, resistanceKPerW: RTH, efficiency, duty }), powerW)
    },
  )

  it('brings the end temperature to the limit', () => {
    const use = { ambientC: 35, resistanceKPerW: RTH, efficiency: 0.83, duty: 0.4 }
    const inputW = maximumPower({ ...use, limitC: 85 }) as number
    expectClose(steadyTemperature({ ...use, inputW }), 85)
  })

  it('is 0 in an ambient at the limit, and refuses a duty of 0 or an efficiency of 1', () => {
    const use = { limitC: 85, ambientC: 85, resistanceKPerW: RTH, efficiency: 0.83, duty: 1 }
    expect(maximumPower(use)).toBe(0)
    expect(maximumPower({ ...use, duty: 0 })).toMatchObject({ code: 'E_RANGE', field: 'duty' })
    expect(maximumPower({ ...use, efficiency: 1 })).toMatchObject({ code: 'E_RANGE', field: 'efficiency' })
  })
})

describe('thermal figures', () => {
  it('answer any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    const use = fc.record({
      ...{ ambientC: any, resistanceKPerW: any, inputW: any, efficiency: any, duty: any, limitC: any },
      ...{ emissionDuty: any, onS: any, offS: any, tauS: any, steadyRiseK: any },
    })
    fc.assert(
      fc.property(use, (input) => {
        for (const answer of [
          thermalResistance(input),
          steadyTemperature(input satisfies ThermalUse),
          cyclePeakTemperature(input),
          maximumPower(input),
        ])
          expectNumbersReal(answer)
      }),
      { numRuns: 500 },
    )
  })
})
