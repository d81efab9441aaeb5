import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  leadAcidRuntime,
  lithiumRuntime,
  peukertHours,
  type Runtime,
} from '#shared/engine/battery-runtime.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

const PROFILE = [
  { share: 0.1, currentA: 18 },
  { share: 0.6, currentA: 1.2 },
  { share: 0.3, currentA: 0.35 },
]
const steady = (currentA: number) => [{ share: 1, currentA }]

describe('peukertHours', () => {
  // Calculation sheet, section 10.
  it.each([
    [100, 20, 1.2, 5, 20, 100],
    [100, 20, 1.2, 10, 8.70551, 87.0551],
    [100, 20, 1.2, 20, 3.78929, 75.7858],
    [35, 20, 1.15, 7, 4.06126, 28.4288],
    [20, 5, 1.03, 10, 1.94577, 19.4577],
  ])('of %i Ah at %i h, k %f, %i A is %f h and %f Ah', (ratedAh, hourRateH, k, currentA, hours, ah) => {
    const answer = peukertHours({ ratedAh, hourRateH, k, currentA }) as number
    expectClose(answer, hours)
    expectClose(answer * currentA, ah)
  })

  it('takes k from 1 to 1.5', () => {
    for (const k of [0.99, 1.51])
      expect(peukertHours({ ratedAh: 100, currentA: 5, k })).toMatchObject({ code: 'E_RANGE', field: 'k' })
  })
})

describe('lithiumRuntime', () => {
  const pack = { ratedAh: 20, capacityFraction: 0.92, depth: 0.9, temperatureFactor: 1 }

  // Calculation sheet, section 10.
  it('follows the mean current', () => {
    const runtime = lithiumRuntime(pack, PROFILE) as Runtime
    expectClose(runtime.hours, 6.30857)
    expectClose(runtime.currentA, 2.625)
    expect(runtime.warnings).toEqual([])
  })

  it('warns when a current exceeds what the pack bears', () => {
    expect(lithiumRuntime({ ...pack, continuousA: 18 }, PROFILE)).toMatchObject({ warnings: [] })
    expect(lithiumRuntime({ ...pack, continuousA: 17.9 }, PROFILE)).toMatchObject({
      warnings: [{ code: 'W_OVER_CURRENT' }],
    })
  })
})

describe('leadAcidRuntime', () => {
  const battery = { ratedAh: 35, capacityFraction: 0.85, depth: 0.5, temperatureFactor: 1 / 1.19, k: 1.15 }

  // Calculation sheet, section 10: with the mean instead it would read 4.26037 h, 19 % too long.
  it('follows the equivalent current, not the mean', () => {
    const runtime = leadAcidRuntime(battery, PROFILE) as Runtime
    expectClose(runtime.hours, 3.58386)
    expectClose(runtime.currentA, 3.05092)
    expectClose((leadAcidRuntime(battery, steady(2.625)) as Runtime).hours, 4.26037)
  })

  it('keeps the depth outside the power', () => {
    const [half, full] = [0.5, 1].map((depth) => leadAcidRuntime({ ...battery, depth }, PROFILE)) as Runtime[]
    expectClose(full?.hours, 2 * (half?.hours ?? 0))
  })

  it('gives no bonus below the rated current', () => {
    // C' = 25 Ah at 20 h: 1.25 A.
    expectClose((leadAcidRuntime(battery, steady(0.5)) as Runtime).hours, (0.5 * 25) / 0.5)
    expectClose((leadAcidRuntime(battery, steady(1.25)) as Runtime).hours, 10)
  })

  it('warns above a current of the capacity', () => {
    expect(leadAcidRuntime(battery, steady(24.9))).toMatchObject({ warnings: [] })
    expect(leadAcidRuntime(battery, steady(25.1))).toMatchObject({ warnings: [{ code: 'W_HIGH_RATE' }] })
  })

  it('never runs longer on more current, and never longer than at the mean', () => {
    const current = fc.double({ min: 0.05, max: 60, noNaN: true })
    fc.assert(
      fc.property(current, current, (a, b) => {
        const [low, high] = [Math.min(a, b), Math.max(a, b)]
        const hours = (runtime: unknown) => (runtime as Runtime).hours
        const atLow = hours(leadAcidRuntime(battery, steady(low)))
        const atHigh = hours(leadAcidRuntime(battery, steady(high)))
        expect(atHigh).toBeLessThanOrEqual(atLow * (1 + 1e-12))
        const mixed = [a, b].map((currentA) => ({ share: 0.5, currentA }))
        const atMean = hours(leadAcidRuntime(battery, steady((a + b) / 2)))
        expect(hours(leadAcidRuntime(battery, mixed))).toBeLessThanOrEqual(atMean * (1 + 1e-12))
      }),
    )
  })
})

describe('runtimes', () => {
  it('answer any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double({ min: 0, max: 1 }), fc.double(), fc.anything()) as fc.Arbitrary<number>
    const input = fc.record({
      ...{ ratedAh: any, capacityFraction: any, depth: any, temperatureFactor: any, currentA: any },
      ...{ hourRateH: any, k: any, continuousA: any },
    })
    fc.assert(
      fc.property(input, (battery) => {
        expectNumbersReal([
          peukertHours(battery),
          leadAcidRuntime(battery, PROFILE),
          lithiumRuntime(battery, PROFILE),
        ])
        expectNumbersReal(leadAcidRuntime(battery, steady(battery.currentA)))
      }),
      { numRuns: 500 },
    )
  })
})
