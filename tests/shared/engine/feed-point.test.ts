import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  capacitorStress,
  feedPointVoltage,
  worstLineVoltage,
  type AcVoltage,
  type CapacitorStress,
} from '#shared/engine/feed-point.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('feedPointVoltage', () => {
  // Calculation sheet, section 12. 5255 ohm is the modelled feed point of section 7 at 3.65 MHz.
  it.each([
    [100, 2450, 0, 494.975, 700],
    [20, 2450, 0, 221.359, 313.05],
    [100, 3200, 0, 565.685, 800],
    [5, 2450, 0, 110.68, 156.525],
    [400, 2450, 0, 989.949, 1400],
    [100, 5255, 0, 724.914, 1025.18],
    [100, 1100, -2800, 907.043, 1282.75],
    [100, 2000, 1000, 500, 707.107],
  ])('of %i W in %i %+i j ohm is %f V rms, %f V peak', (powerW, resistanceOhm, reactanceOhm, rms, peak) => {
    const voltage = feedPointVoltage({ powerW, resistanceOhm, reactanceOhm }) as AcVoltage
    expectClose(voltage.rmsV, rms)
    expectClose(voltage.peakV, peak)
  })

  it('is 0 without power and refuses less than 0.1 ohm', () => {
    expect(feedPointVoltage({ powerW: 0, resistanceOhm: 50 })).toEqual({ rmsV: 0, peakV: 0 })
    expect(feedPointVoltage({ powerW: 5, resistanceOhm: 0.1, reactanceOhm: 9 })).toHaveProperty('rmsV')
    for (const resistanceOhm of [0.09, 0, -50])
      expect(feedPointVoltage({ powerW: 5, resistanceOhm })).toMatchObject({ code: 'E_RANGE' })
    expect(feedPointVoltage({ powerW: -1, resistanceOhm: 50 })).toMatchObject({ field: 'powerW' })
  })
})

describe('worstLineVoltage', () => {
  it('grows with the root of the SWR', () => {
    expectClose((worstLineVoltage({ powerW: 100, swr: 1 }) as AcVoltage).rmsV, 70.7107)
    expectClose((worstLineVoltage({ powerW: 100, swr: 9 }) as AcVoltage).rmsV, 212.132)
    expect(worstLineVoltage({ powerW: 100, swr: 0.9 })).toMatchObject({ code: 'E_RANGE', field: 'swr' })
  })
})

describe('capacitorStress', () => {
  // Calculation sheet, section 12.
  it.each([
    [100, 100, 28.4, 70.7107, 100, 1.26178],
    [100, 100, 3.6, 70.7107, 100, 0.159944],
    [400, 150, 21.2, 141.421, 200, 2.82567],
    [20, 100, 14.2, 31.6228, 44.7214, 0.282142],
  ])(
    'of %i W, %i pF, %f MHz is %f V, %f V peak, %f A',
    (powerW, capacitancePf, frequencyMhz, rms, peak, amps) => {
      const stress = capacitorStress({ powerW, capacitancePf, frequencyMhz }) as CapacitorStress
      expectClose(stress.rmsV, rms)
      expectClose(stress.peakV, peak)
      expectClose(stress.rmsA, amps)
      expectClose(stress.wantedPeakV, 2 * peak)
      expect(stress.dissipationW).toBeNull()
    },
  )

  it('dissipates by its loss factor', () => {
    const part = { powerW: 100, capacitancePf: 100, frequencyMhz: 28.4, lossFactor: 0.001 }
    expectClose((capacitorStress(part) as CapacitorStress).dissipationW, 70.7107 * 1.26178 * 0.001)
  })

  it('warns when the rating leaves less than twice the peak', () => {
    const part = { powerW: 100, capacitancePf: 100, frequencyMhz: 28.4 }
    expect(capacitorStress({ ...part, ratedPeakV: 201 })).toMatchObject({ warnings: [] })
    expect(capacitorStress({ ...part, ratedPeakV: 199 })).toMatchObject({
      warnings: [{ code: 'W_CAPACITOR_RATING' }],
    })
  })

  it('refuses a capacitance or frequency of 0', () => {
    expect(capacitorStress({ powerW: 1, capacitancePf: 0, frequencyMhz: 7 })).toMatchObject({
      code: 'E_RANGE',
    })
    expect(capacitorStress({ powerW: 1, capacitancePf: 9, frequencyMhz: 0 })).toMatchObject({
      code: 'E_RANGE',
    })
  })

  it('answers any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, any, any, any, (powerW, a, b, c, d) => {
        expectNumbersReal([
          feedPointVoltage({ powerW, resistanceOhm: a, reactanceOhm: b }),
          worstLineVoltage({ powerW, swr: a, lineOhm: b }),
          capacitorStress({ powerW, capacitancePf: a, frequencyMhz: b, lossFactor: c, ratedPeakV: d }),
        ])
      }),
    )
  })
})
