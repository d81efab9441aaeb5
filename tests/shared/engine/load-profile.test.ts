import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  checkProfile,
  equivalentCurrentA,
  meanCurrentA,
  type LoadShare,
} from '#shared/engine/load-profile.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

/** Calculation sheet, section 10: 10 % at 18 A, 60 % at 1.2 A, 30 % at 0.35 A. */
const PROFILE = [
  { share: 0.1, currentA: 18 },
  { share: 0.6, currentA: 1.2 },
  { share: 0.3, currentA: 0.35 },
]

describe('load profile', () => {
  it('has the mean and equivalent currents of the sheet', () => {
    expectClose(meanCurrentA(PROFILE), 2.625)
    expectClose(equivalentCurrentA(PROFILE, 1.15), 3.05092)
    expectClose(equivalentCurrentA(PROFILE, 1.25), 3.35577)
    expectClose(equivalentCurrentA(PROFILE, 1), 2.625)
  })

  it('wants shares from 0 to 1 that sum to 1 within 0.001', () => {
    const two = (share: number) => [
      { share: 0.5, currentA: 1 },
      { share, currentA: 2 },
    ]
    expect(checkProfile(two(0.501))).toBeUndefined()
    expect(checkProfile(two(0.499))).toBeUndefined()
    for (const share of [0.5012, 0.4988]) expect(checkProfile(two(share))).toMatchObject({ code: 'E_SHARES' })
    for (const share of [-0.1, 1.1])
      expect(checkProfile(two(share))).toMatchObject({ code: 'E_SHARES', line: 2 })
  })

  it('refuses an empty profile, one without current, and k outside 1 to 1.5', () => {
    expect(checkProfile([])).toMatchObject({ code: 'E_MISSING' })
    expect(checkProfile([{ share: 1, currentA: 0 }])).toMatchObject({ code: 'E_RANGE', field: 'currentA' })
    expect(checkProfile([{ share: 1, currentA: -1 }])).toMatchObject({ code: 'E_RANGE', line: 1 })
    for (const k of [0.99, 1.51]) expect(equivalentCurrentA(PROFILE, k)).toMatchObject({ field: 'k' })
  })

  it('never has an equivalent current below the mean', () => {
    const currents = fc.array(fc.double({ min: 0.01, max: 50, noNaN: true }), { minLength: 1, maxLength: 6 })
    fc.assert(
      fc.property(currents, fc.double({ min: 1, max: 1.5, noNaN: true }), (list, k) => {
        const profile = list.map((currentA) => ({ share: 1 / list.length, currentA }))
        const mean = meanCurrentA(profile) as number
        expect(equivalentCurrentA(profile, k)).toBeGreaterThanOrEqual(mean * (1 - 1e-12))
      }),
    )
  })

  it('answers any profile without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    const profiles = fc.oneof(
      fc.array(fc.record({ share: any, currentA: any }), { maxLength: 3 }),
      fc.anything() as fc.Arbitrary<LoadShare[]>,
    )
    fc.assert(
      fc.property(profiles, any, (profile, k) => {
        expectNumbersReal([meanCurrentA(profile), equivalentCurrentA(profile, k)])
      }),
    )
  })
})
