import { describe, expect, it } from 'vitest'
import { digitsBeside, withUncertainty } from '@/format/figure-text.ts'

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
