import { describe, expect, it } from 'vitest'
import { departures } from '#shared/engine/builds/departures.ts'
import type { Measured } from '#shared/engine/builds/matching.ts'
import { spreads } from '#shared/engine/builds/spread.ts'
import type { Band } from '#shared/engine/vocabulary.ts'

const losses = (band: Band, ...values: number[]): Measured[] =>
  values.map((value, at) => ({
    unitId: `u${at}`,
    designation: `XFM-${at}`,
    band,
    measure: 'lossDb',
    value,
    testId: `t${at}`,
  }))

describe('departures', () => {
  it('names a unit from five units on, and says how far it stands from the others', () => {
    const [one, ...others] = departures(losses('10 m', 0.6, 0.6, 0.7, 0.7, 1.6))
    expect(others).toEqual([])
    expect(one).toMatchObject({ unitId: 'u4', isWorse: true, median: 0.7, units: 5 })
    // Median absolute deviation 0.1, times 1.4826.
    expect(one?.score).toBeCloseTo(0.9 / 0.14826, 6)
    expect(one?.text).toBe(
      'loses 1.60 dB on 10 m; the median of 5 units is 0.70 dB, and this is 6.1 times the usual spread above it ' +
        '(3.5 is the mark)',
    )
  })

  it('names nobody among four', () => {
    expect(departures(losses('10 m', 0.6, 0.6, 0.7, 9))).toEqual([])
  })

  it('names a unit that is suspiciously better, after those that are worse', () => {
    const found = departures(losses('10 m', 1, 1, 1.1, 1.1, 1, 0.1, 3))
    expect(found.map(({ unitId, isWorse }) => [unitId, isWorse])).toEqual([
      ['u6', true],
      ['u5', false],
    ])
  })

  it('does not take the last digit of like units for a departure', () => {
    expect(departures(losses('40 m', 0.32, 0.32, 0.32, 0.32, 0.36))).toEqual([])
  })

  it('holds each band against itself', () => {
    const found = departures([...losses('40 m', 0.3, 0.3, 0.3, 0.3, 0.3), ...losses('10 m', 2, 2, 2, 2, 2)])
    expect(found).toEqual([])
  })
})

describe('spreads', () => {
  it('gives median, lowest and highest of each band in band order', () => {
    expect(spreads([...losses('10 m', 2), ...losses('40 m', 0.3, 0.5, 0.4)])).toEqual([
      { band: '40 m', measure: 'lossDb', units: 3, median: 0.4, lowest: 0.3, highest: 0.5 },
      { band: '10 m', measure: 'lossDb', units: 1, median: 2, lowest: 2, highest: 2 },
    ])
  })
})
