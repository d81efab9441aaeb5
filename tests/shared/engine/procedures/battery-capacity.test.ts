import { describe, expect, it } from 'vitest'
import {
  judgeBatteryCapacity,
  type BatteryCapacityInputs,
} from '#shared/engine/procedures/battery-capacity.ts'
import type { Chemistry } from '#shared/engine/vocabulary.ts'
import { valueOf } from '../../../support/value-of.ts'

const AGM = { ratedAh: 26, chemistry: 'agm' as Chemistry }

const judge = (
  inputs: Partial<BatteryCapacityInputs>,
  facts: { ratedAh?: number; chemistry?: Chemistry } = AGM,
) =>
  judgeBatteryCapacity(
    { cutOffV: 10.5, temperatureC: 25, ...inputs },
    { limits: { minCapacityFraction: 0.8 }, facts, tester: null },
  )

describe('a capacity test', () => {
  it.each([
    [20.8, 'pass'],
    [20.79, 'fail'],
  ])('of %s Ah of 26 at 25 °C is a %s', (measuredAh, word) => {
    expect(valueOf(judge({ measuredAh })).finding).toBe(word)
  })

  it('is not rounded onto the limit that it misses', () => {
    expect(valueOf(judge({ measuredAh: 20.79 })).findings[0]?.text).toMatch(/^79\.96 % of its rating: /)
    expect(valueOf(judge({ measuredAh: 20.8 })).findings[0]?.text).toMatch(/^80 % of its rating: /)
  })

  it('takes current and time in the place of ampere-hours', () => {
    const judged = valueOf(judge({ currentA: 1.3, hours: 16 }))
    expect(judged.results).toMatchObject({ measuredAh: expect.closeTo(20.8, 9) })
  })

  it('refers a cold test to 25 °C, so that a cold room does not fail a sound battery', () => {
    const judged = valueOf(judge({ measuredAh: 18, temperatureC: 10 }))
    expect(judged.results).toMatchObject({
      measuredFraction: 18 / 26,
      referredAh: expect.closeTo(18 * 1.19, 9),
    })
    expect(judged.finding).toBe('pass')
    expect(judged.findings[0]!.text).toBe('82.4 % of its rating referred to 25 °C: 18 Ah at 10 °C')
  })

  it('gives no bonus for a warm room', () => {
    expect(valueOf(judge({ measuredAh: 20, temperatureC: 40 })).findings[0]!.value).toBeCloseTo(20 / 26, 9)
  })

  it('leaves a chemistry without a table as measured', () => {
    const facts = { ratedAh: 2.5, chemistry: 'nimh' as Chemistry }
    expect(valueOf(judge({ measuredAh: 2, temperatureC: 5 }, facts)).results).toMatchObject({ factor: 1 })
  })

  it('refuses a voltage as evidence of capacity', () => {
    expect(judge({ restingV: 12.8 })).toMatchObject({
      code: 'E_MISSING',
      field: 'measuredAh',
      message: expect.stringContaining('voltage says nothing about capacity'),
    })
  })

  it('asks for the rated capacity first', () => {
    expect(judge({ measuredAh: 20 }, {})).toMatchObject({ code: 'E_MISSING', field: 'ratedAh' })
  })

  it('does not guess below the coldest figure known', () => {
    expect(judge({ measuredAh: 20, temperatureC: -10 })).toMatchObject({
      code: 'E_RANGE',
      field: 'temperatureC',
    })
  })

  it('warns that a fast discharge shows less of a lead-acid battery', () => {
    const warnings = (fields: Partial<BatteryCapacityInputs>) =>
      valueOf(judge(fields)).warnings.map(({ code }) => code)
    expect(warnings({ measuredAh: 20, currentA: 10 })).toEqual(['W_HIGH_RATE'])
    expect(warnings({ measuredAh: 20, currentA: 4 })).toEqual([])
    expect(warnings({ measuredAh: 20 })).toEqual([])
  })
})
