import { describe, expect, it } from 'vitest'
import { dayScale, dayTicks } from '@/components/chart/day-axis.ts'
import { extentOf, linearScale, padded } from '@/components/chart/scale.ts'
import { highestSwr, reflected, swrScale, swrTicks } from '@/components/chart/swr-scale.ts'

describe('a linear scale', () => {
  it('runs downwards on a vertical axis', () => {
    const y = linearScale({ low: 0, high: 100 }, 200, 0)
    expect([y(0), y(50), y(100)]).toEqual([200, 100, 0])
  })

  it('puts everything in one place where there is no span', () => {
    expect(linearScale({ low: 5, high: 5 }, 10, 90)(7)).toBe(10)
  })

  it('knows the extent of what is known', () => {
    expect(extentOf([3, null, undefined, 1, Infinity])).toEqual({ low: 1, high: 3 })
    expect(extentOf([null])).toBeUndefined()
    expect(padded({ low: 10, high: 20 }, 0.1)).toEqual({ low: 9, high: 21 })
    expect(padded({ low: 10, high: 10 }, 0.1, 2)).toEqual({ low: 8, high: 12 })
  })
})

describe('an SWR scale', () => {
  it('is even in what is reflected, up to a total reflection', () => {
    expect([reflected(1), reflected(3), reflected(Infinity)]).toEqual([0, 0.5, 1])
    const y = swrScale(Infinity, 100, 0)
    expect([y(1), y(3), y(Infinity)]).toEqual([100, 50, 0])
  })

  it('keeps what lies beyond its end at its end', () => {
    expect(swrScale(3, 100, 0)(9)).toBe(0)
  })

  it('writes the important numbers and leaves out what has no room', () => {
    const y = swrScale(Infinity, 240, 0)
    expect(swrTicks(Infinity, y, 20)).toEqual([1, 1.2, 1.5, 2, 3, 5, 10, 20, Infinity])
    expect(swrTicks(Infinity, y, 60)).toEqual([1, 2, 5, Infinity])
    expect(swrTicks(3, swrScale(3, 240, 0), 20).at(-1)).toBe(3)
  })

  it('ends at a usual number above what it holds', () => {
    expect(highestSwr([1.4, 2.5])).toBe(3)
    expect(highestSwr([])).toBe(2)
    expect(highestSwr([99])).toBe(Infinity)
  })
})

describe('days on an axis', () => {
  it('are ticked at the first of months, the year said once', () => {
    const labels = dayTicks('2025-09-13', '2026-11-02', 5).map(({ label }) => label)
    expect(labels).toEqual(['Oct 2025', 'Jan 2026', 'Apr', 'Jul', 'Oct'])
  })

  it('are ticked at Januaries over many years', () => {
    const labels = dayTicks('2021-05-01', '2026-03-01', 6).map(({ label }) => label)
    expect(labels).toEqual(['Jan 2022', 'Jan 2023', 'Jan 2024', 'Jan 2025', 'Jan 2026'])
  })

  it('lie evenly', () => {
    const x = dayScale('2026-01-01', '2026-01-11', 0, 100)
    expect([x('2026-01-01'), x('2026-01-06'), x('2026-01-11')]).toEqual([0, 50, 100])
  })
})
