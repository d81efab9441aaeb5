import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { averagePowerW, worstOnFraction } from '#shared/engine/average-power.ts'
import { EMISSION_DUTIES } from '#shared/engine/emission-duty.ts'
import { AVERAGING_MINUTES } from '#shared/engine/exposure-limits.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('worstOnFraction', () => {
  // Calculation sheet, section 11.
  it.each([
    [5, 5, 30, 0.5],
    [10, 5, 30, 0.666667],
    [4, 8, 6, 0.666667],
    [2, 3, 6, 0.5],
    [1, 1, 6, 0.5],
    [20, 40, 30, 0.666667],
  ])('of %i on, %i off in %i min is %f', (on, off, window, fraction) => {
    expectClose(worstOnFraction({ on, off, window }), fraction)
  })

  it('refuses a cycle of nothing', () => {
    expect(worstOnFraction({ on: 0, off: 0, window: 6 })).toMatchObject({ code: 'E_RANGE', field: 'on' })
    expect(worstOnFraction({ on: 0, off: 5, window: 6 })).toBe(0)
    expect(worstOnFraction({ on: 5, off: 0, window: 6 })).toBe(1)
  })

  it('is never below the share of the cycle nor above 1', () => {
    const part = fc.double({ min: 0, max: 1000, noNaN: true })
    fc.assert(
      fc.property(part, part, fc.double({ min: 0.001, max: 1000, noNaN: true }), (on, off, window) => {
        if (on + off === 0) return
        const fraction = worstOnFraction({ on, off, window }) as number
        expect(fraction).toBeLessThanOrEqual(1)
        expect(fraction).toBeGreaterThanOrEqual((on / (on + off)) * (1 - 1e-9))
      }),
    )
  })

  it('answers any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, any, (on, off, window) => {
        expectNumbersReal(worstOnFraction({ on, off, window }))
        expectNumbersReal(averagePowerW({ pepW: on, emissionDuty: off, onFraction: window }))
      }),
      { numRuns: 500 },
    )
  })
})

describe('averagePowerW', () => {
  // Supplement B, worked example: 500 W, 0.4, 45 s in 360 s -> 25 W (published).
  it('agrees with the published example', () => {
    const onFraction = worstOnFraction({ on: 45, off: 315, window: 360 }) as number
    expectClose(averagePowerW({ pepW: 500, emissionDuty: 0.4, onFraction }), 25)
  })

  // Calculation sheet, section 11: 100 W SSB, 5 on 5 off, 30 min -> 10 W.
  it('of SSB, five minutes on and five off, is 10 W', () => {
    const onFraction = worstOnFraction({ on: 5, off: 5, window: AVERAGING_MINUTES.general }) as number
    const emissionDuty = EMISSION_DUTIES['ssb-conversational'].duty
    expectClose(averagePowerW({ pepW: 100, emissionDuty, onFraction }), 10)
  })

  it('refuses a duty or share above 1 and a power below 0', () => {
    expect(averagePowerW({ pepW: 9, emissionDuty: 1.1, onFraction: 1 })).toMatchObject({
      field: 'emissionDuty',
    })
    expect(averagePowerW({ pepW: 9, emissionDuty: 1, onFraction: 1.1 })).toMatchObject({
      field: 'onFraction',
    })
    expect(averagePowerW({ pepW: -1, emissionDuty: 1, onFraction: 1 })).toMatchObject({ field: 'pepW' })
  })
})
