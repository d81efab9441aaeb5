import { describe, expect, it } from 'vitest'
import { powerAllowance, type PowerAllowance } from '#shared/engine/power-allowance.ts'
import { expectClose } from '../../support/sheet-close.ts'

describe('powerAllowance', () => {
  const use = { radioW: 100, resistanceKPerW: 3.4105779, tauS: 308.243, efficiency: 0.83 }

  // Calculation sheet, section 6: 86.2369 W of carrier from 35 C to 85 C.
  it('allows voice at full power and a carrier at less', () => {
    const climate = { ambientC: 35, limitC: 85 }
    expect(powerAllowance({ ...use, ...climate, emission: 'ssb-conversational' })).toMatchObject({
      withoutBreakW: 100,
      fullPower: true,
      longestOverS: null,
    })
    const carrier = powerAllowance({ ...use, ...climate, emission: 'carrier' }) as PowerAllowance
    expectClose(carrier.withoutBreakW, 86.2369)
    expect(carrier.fullPower).toBe(false)
    expectClose(carrier.longestOverS, 610.63, 2e-3)
  })

  it('refuses an emission that is not in the table', () => {
    const emission = 'toString' as 'carrier'
    expect(powerAllowance({ ...use, ambientC: 35, limitC: 85, emission })).toMatchObject({
      field: 'emission',
    })
  })
})
