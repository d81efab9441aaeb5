import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { solarBalance, type SolarBalance } from '#shared/engine/solar.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('solarBalance', () => {
  // Calculation sheet, section 10.
  it.each([
    [100, 4, 0.7, 280, 10, 40],
    [60, 2.5, 0.65, 97.5, 12, -190.5],
    [100, 5.5, 0.8, 440, 15, 80],
  ])(
    'of %i W, %f h, factor %f: %f Wh, load %i W, balance %f Wh',
    (panelW, sunHours, systemFactor, wh, loadW, b) => {
      const balance = solarBalance({ panelW, sunHours, systemFactor, meanLoadW: loadW }) as SolarBalance
      expectClose(balance.harvestWhPerDay, wh)
      expectClose(balance.balanceWhPerDay, b)
    },
  )

  it('names the days of autonomy when the balance is negative', () => {
    const day = { panelW: 60, sunHours: 2.5, systemFactor: 0.65, meanLoadW: 12 }
    expectClose((solarBalance({ ...day, energyWh: 381 }) as SolarBalance).autonomyDays, 2)
    expect(solarBalance(day)).toMatchObject({ autonomyDays: null })
    expect(solarBalance({ ...day, meanLoadW: 4, energyWh: 381 })).toMatchObject({ autonomyDays: null })
  })

  it('refuses more than 24 sun hours and a factor of 0', () => {
    const day = { panelW: 60, sunHours: 2.5, systemFactor: 0.65, meanLoadW: 12 }
    expect(solarBalance({ ...day, sunHours: 24.1 })).toMatchObject({ code: 'E_RANGE', field: 'sunHours' })
    expect(solarBalance({ ...day, systemFactor: 0 })).toMatchObject({ code: 'E_RANGE' })
  })

  it('answers any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, any, any, any, (panelW, sunHours, systemFactor, meanLoadW, energyWh) => {
        expectNumbersReal(solarBalance({ panelW, sunHours, systemFactor, meanLoadW, energyWh }))
      }),
    )
  })
})
