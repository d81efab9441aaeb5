import { describe, expect, it } from 'vitest'
import { bankRuntime, cutOffText } from '#shared/engine/readiness/bank-runtime.ts'
import type { CountedBattery } from '#shared/engine/readiness/counted-battery.ts'

/** The profile and the batteries of the calculation sheet, section 10: 10 % at 18 A, 60 % at 1.2 A, 30 % at 0.35 A. */
const PROFILE = [
  { share: 0.1, currentA: 18 },
  { share: 0.6, currentA: 1.2 },
  { share: 0.3, currentA: 0.35 },
]

const battery = (part: Partial<CountedBattery>): CountedBattery => ({
  name: 'BAT-1',
  maxA: null,
  share: { ratedAh: 20, capacityFraction: 0.92, depth: 0.9, temperatureFactor: 1 },
  k: 1,
  usableAh: 20 * 0.92 * 0.9,
  factor: '',
  ...part,
})

/** At 10 °C: 1 / 1.19. */
const AGM = battery({
  share: { ratedAh: 35, capacityFraction: 0.85, depth: 0.5, temperatureFactor: 1 / 1.19 },
  k: 1.15,
  usableAh: (35 * 0.85 * 0.5) / 1.19,
})

describe('how long a bank carries a load', () => {
  it('gives lithium the hours of the sheet, by the mean current', () => {
    expect(bankRuntime([battery({})], PROFILE).hours).toBeCloseTo(6.30857, 4)
  })

  it('gives lead-acid the hours of the sheet, by the equivalent current and not by the mean, 19 % too long', () => {
    const { hours, factors } = bankRuntime([AGM], PROFILE)
    expect(hours).toBeCloseTo(3.58386, 4)
    expect(factors).toEqual(['Lead-acid empties as if 3.05 A were drawn steadily (Peukert exponent 1.15)'])
    expect(bankRuntime([AGM], [{ share: 1, currentA: 2.625 }]).hours).toBeCloseTo(4.26037, 4)
  })

  it('lets two like batteries carry twice the load for as long', () => {
    const twice = PROFILE.map(({ share, currentA }) => ({ share, currentA: 2 * currentA }))
    expect(bankRuntime([AGM, AGM], twice).hours).toBeCloseTo(3.58386, 4)
  })

  it('says that the estimate is poor where lead-acid would be empty within the hour', () => {
    const { factors } = bankRuntime([AGM], [{ share: 1, currentA: 30 }])
    expect(factors.join()).toContain('empty within the hour')
  })
})

describe('the rated current of packs', () => {
  const load = [
    { share: 0.2, currentA: 20 },
    { share: 0.8, currentA: 1 },
  ]

  it('is named where a transmission exceeds it', () => {
    expect(cutOffText([battery({ maxA: 15 })], load)).toBe(
      'BAT-1 may cut off while transmitting: 20 A drawn, 15 A rated',
    )
  })

  it('adds up side by side, and says nothing where one is not on record', () => {
    expect(cutOffText([battery({ maxA: 15 }), battery({ maxA: 15 })], load)).toBeUndefined()
    expect(cutOffText([battery({ maxA: 5 }), battery({})], load)).toBeUndefined()
  })
})
