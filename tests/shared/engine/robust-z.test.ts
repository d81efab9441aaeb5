import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { robustZ } from '#shared/engine/robust-z.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

describe('robustZ', () => {
  it('names the unit that departs, which cannot widen the spread to hide itself', () => {
    const found = valueOf(robustZ([0.8, 0.82, 0.79, 0.81, 1.6]))
    expectClose(found.median, 0.81)
    // Deviations 0.01, 0.01, 0.02, 0, 0.79: median 0.01.
    expectClose(found.spread, 0.014826)
    expectClose(found.scores[4], 0.79 / 0.014826)
    expect(found.departing).toEqual([4])
  })

  it('names units on both sides', () => {
    expect(valueOf(robustZ([10, 11, 9, 10.5, 9.5, 30, -20])).departing).toEqual([5, 6])
  })

  it('works from five units on', () => {
    expect(robustZ([1, 1, 1, 9])).toMatchObject({ code: 'E_TOO_FEW' })
    expect(isFailure(robustZ([1, 1, 1, 1, 9]))).toBe(false)
  })

  it('scores like units 0 and names none of them', () => {
    expect(robustZ([2, 2, 2, 2, 2])).toEqual({ median: 2, spread: 0, scores: [0, 0, 0, 0, 0], departing: [] })
  })

  it('falls back to the mean deviation when most units are alike to the last digit', () => {
    const found = valueOf(robustZ([2, 2, 2, 2, 2, 2, 9]))
    expectClose(found.spread, 1.2533)
    expect(found.departing).toEqual([6])
  })

  it('names no unit for a difference the instrument cannot see', () => {
    const values = [0.8, 0.801, 0.799, 0.8, 0.81]
    expect(valueOf(robustZ(values)).departing).toEqual([4])
    expect(valueOf(robustZ(values, 0.05)).departing).toEqual([])
  })

  it('draws the line at 3.5', () => {
    // Deviations 1, 1, 2, 0, x: spread 1.4826, so 3.5 is a deviation of 5.1891.
    expect(valueOf(robustZ([9, 11, 8, 10, 15.189])).departing).toEqual([])
    expect(valueOf(robustZ([9, 11, 8, 10, 15.19])).departing).toEqual([4])
  })

  it('refuses what is no number', () => {
    expect(robustZ([1, 2, NaN, 4, 5])).toMatchObject({ code: 'E_NUMBER', field: 'values.2' })
    expect(robustZ([1, 2, 3, 4, 1e13])).toMatchObject({ code: 'E_RANGE', field: 'values.4' })
    expect(robustZ([1, 2, 3, 4, 5], -1)).toMatchObject({ code: 'E_RANGE', field: 'resolution' })
  })

  it('gives real scores or a failure for any values, whatever their order', () => {
    const values = fc.array(fc.double(), { maxLength: 12 })
    fc.assert(
      fc.property(values, fc.double(), (values, resolution) => {
        const found = robustZ(values, resolution)
        expectNumbersReal(found)
      }),
    )
    const near = fc.array(fc.integer({ min: -20, max: 20 }), { minLength: 5, maxLength: 12 })
    fc.assert(
      fc.property(near, (values) => {
        const found = valueOf(robustZ(values))
        const turned = valueOf(robustZ(values.toReversed()))
        expectNumbersReal(found)
        expect(turned.departing.map((at) => values.length - 1 - at).toSorted((a, b) => a - b)).toEqual(
          found.departing,
        )
      }),
    )
  })
})
