import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { roundAxis, ticksBetween } from '@/components/chart/ticks.ts'

describe('ticks of an axis', () => {
  it('are round numbers', () => {
    expect(ticksBetween(0, 100, 6)).toEqual({ values: [0, 20, 40, 60, 80, 100], digits: 0 })
    expect(ticksBetween(0.13, 0.61, 6)).toEqual({ values: [0.2, 0.3, 0.4, 0.5, 0.6], digits: 1 })
    expect(ticksBetween(0, 1, 5)).toEqual({ values: [0, 0.25, 0.5, 0.75, 1], digits: 2 })
    expect(ticksBetween(6.98, 7.32, 4).values).toEqual([7, 7.1, 7.2, 7.3])
  })

  it('pass through zero without a minus sign of their own', () => {
    expect(ticksBetween(-10, 10, 5).values).toEqual([-10, -5, 0, 5, 10])
    expect(Object.is(ticksBetween(-10, 10, 5).values[2], 0)).toBe(true)
  })

  it('say one value where there is no span', () => {
    expect(ticksBetween(5, 5, 6).values).toEqual([5])
    expect(ticksBetween(0, Infinity, 6).values).toEqual([0])
  })

  it('are never more than asked, in order, and inside', () => {
    const number = fc.double({ min: -1e6, max: 1e6, noNaN: true })
    fc.assert(
      fc.property(
        number,
        fc.double({ min: 1e-3, max: 1e6, noNaN: true }),
        fc.integer({ min: 2, max: 12 }),
        (low, span, most) => {
          const { values } = ticksBetween(low, low + span, most)
          expect(values.length).toBeLessThanOrEqual(most)
          for (const [index, value] of values.entries()) {
            expect(value).toBeGreaterThanOrEqual(low - span * 1e-6)
            expect(value).toBeLessThanOrEqual(low + span * (1 + 1e-6))
            if (index > 0) expect(value).toBeGreaterThan(values[index - 1]!)
          }
        },
      ),
    )
  })
})

describe('an axis with round ends', () => {
  it('holds what it is given', () => {
    expect(roundAxis(21.4, 86.2, 6)).toMatchObject({ low: 20, high: 100, digits: 0 })
    expect(roundAxis(0, 3.1, 6)).toMatchObject({ low: 0, high: 4 })
    expect(roundAxis(0.6, 0.6, 5)).toMatchObject({ low: 0.5, high: 2 })
  })

  it('holds both ends with no more ticks than asked, whatever they are', () => {
    const low = fc.double({ min: -1e4, max: 1e4, noNaN: true })
    fc.assert(
      fc.property(
        low,
        fc.double({ min: 1e-2, max: 1e4, noNaN: true }),
        fc.integer({ min: 3, max: 10 }),
        (from, span, most) => {
          const axis = roundAxis(from, from + span, most)
          expect(axis.low).toBeLessThanOrEqual(from + span * 1e-6)
          expect(axis.high).toBeGreaterThanOrEqual(from + span * (1 - 1e-6))
          expect(axis.values.length).toBeLessThanOrEqual(most)
        },
      ),
    )
  })
})
