import { describe, expect, it } from 'vitest'
import { digitsBeside, digitsOfFinding, withUncertainty } from '@/format/figure-text.ts'

const plain = (text: string) => text.replaceAll('\u00a0', ' ')

describe('a figure with its uncertainty', () => {
  // JCGM 100:2008 (GUM), 7.2.6: an uncertainty is given with two digits at most, the figure to its last one.
  it('has no more decimals than the uncertainty supports', () => {
    expect([24, 2.4, 0.24, 0.024].map((spread) => digitsBeside(spread, 3))).toEqual([0, 1, 2, 3])
    expect(plain(withUncertainty(82.558, 1.621, '%', 3))).toBe('82.6 ± 1.6 %')
    expect(plain(withUncertainty(812.4, 38, 'W', 1))).toBe('812 ± 38 W')
  })

  it('has no more than asked for where the uncertainty is small, zero or not known', () => {
    expect(plain(withUncertainty(1.23456, 0.00012, 'dB', 2))).toBe('1.23 ± 0.00 dB')
    expect(digitsBeside(0, 2)).toBe(2)
    expect(plain(withUncertainty(92, null, '%', 1))).toBe('92 %')
  })
})

describe('a figure that a test found', () => {
  const found = (value: number, uncertainty: number | null, measure = 'efficiency') =>
    plain(withUncertainty(value, uncertainty, '', digitsOfFinding(measure, uncertainty)))

  it.each([
    [82.461, 1.714, '82.5 ± 1.7'],
    [82.461, 42, '82 ± 42'],
    [0.8375, 0.0857, '0.838 ± 0.086'],
    [0.8375, 0.0153, '0.838 ± 0.015'],
    [61.25, 0.5, '61.25 ± 0.50'],
    [0, 0.31, '0.00 ± 0.31'],
  ])('%d with an uncertainty of %d is %s', (value, uncertainty, shown) => {
    expect(found(value, uncertainty)).toBe(shown)
  })

  it('without an uncertainty has the digits of its kind', () => {
    expect(found(1.4567, null, 'swr')).toBe('1.46')
    expect(found(61.04, null, 'peakC')).toBe('61')
    expect(found(-0.4, null, 'lossDb')).toBe('\u22120.4')
    expect(digitsOfFinding('swr', 0)).toBe(2)
  })

  it('shows three decimals at most', () => {
    expect(digitsOfFinding('swr', 1e-9)).toBe(3)
    expect(digitsOfFinding('watts', 250)).toBe(0)
  })
})
