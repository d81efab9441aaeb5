import { describe, expect, it } from 'vitest'
import { fQuantile95, tQuantile975 } from '#shared/engine/t-quantile.ts'
import { readVectors } from '../../support/vectors.ts'

const vectors = readVectors<{ tQuantiles: { degrees: number; t: number }[] }>('heat-fit')

describe('tQuantile975', () => {
  // Calculation sheet, section 6.
  it.each([
    [1, 12.7062],
    [2, 4.30265],
    [3, 3.18245],
    [4, 2.77645],
    [5, 2.57058],
    [6, 2.44691],
    [7, 2.36462],
    [8, 2.306],
    [9, 2.26216],
    [10, 2.22814],
    [11, 2.20099],
    [12, 2.17881],
    [15, 2.13145],
    [20, 2.08596],
    [30, 2.04227],
    [60, 2.0003],
    [1e9, 1.95996],
  ])('of %i degrees is %f', (degrees, t) => {
    const answer = tQuantile975(degrees) as number
    expect(Math.abs(answer - t)).toBeLessThan(5.1e-6 * (degrees === 1 ? 10 : 1))
    expect(fQuantile95(degrees)).toBeCloseTo(answer ** 2, 12)
  })

  it('agrees with scipy to eight digits', () => {
    for (const { degrees, t } of vectors.tQuantiles)
      expect(Math.abs((tQuantile975(degrees) as number) / t - 1)).toBeLessThan(1e-8)
  })

  it('refuses degrees below 1 and between whole numbers', () => {
    for (const degrees of [0, -1, 2.5, 1e10]) expect(tQuantile975(degrees)).toMatchObject({ code: 'E_RANGE' })
    expect(fQuantile95(Number.NaN)).toMatchObject({ code: 'E_NUMBER' })
  })
})
