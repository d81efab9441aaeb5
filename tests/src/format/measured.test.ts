import { describe, expect, it } from 'vitest'
import { decimalsOf, measuredText } from '@/format/measured.ts'

const text = (value: number, uncertainty: number | null, measure = 'efficiency') =>
  measuredText({ value, uncertainty }, measure).replaceAll('\u00a0', ' ')

describe('a measured figure', () => {
  it.each([
    [82.461, 1.714, '82.5 ± 1.7'],
    [82.461, 4.2, '82 ± 4'],
    [0.8375, 0.0857, '0.84 ± 0.09'],
    [0.8375, 0.0153, '0.838 ± 0.015'],
    [61.25, 0.5, '61.3 ± 0.5'],
    [0, 0.31, '0.0 ± 0.3'],
  ])('%d with an uncertainty of %d is %s', (value, uncertainty, shown) => {
    expect(text(value, uncertainty)).toBe(shown)
  })

  it('without an uncertainty has the digits of its kind', () => {
    expect(text(1.4567, null, 'swr')).toBe('1.46')
    expect(text(61.04, null, 'peakC')).toBe('61')
    expect(text(-0.4, null, 'lossDb')).toBe('\u22120.4')
  })

  it('shows three decimals at most', () => {
    expect(decimalsOf(1e-9, 'swr')).toBe(3)
    expect(decimalsOf(0, 'swr')).toBe(2)
    expect(decimalsOf(250, 'watts')).toBe(0)
  })
})
