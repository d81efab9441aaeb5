import { describe, expect, it } from 'vitest'
import { editableNumber, typedNumber } from '@/format/typed-number.ts'

describe('a number as it is typed', () => {
  it.each([
    ['12', 12],
    [' 12.5 ', 12.5],
    ['12,5', 12.5],
    ['-8', -8],
    ['\u22128', -8],
    ['.5', 0.5],
    ['5.', 5],
    ['', null],
    ['   ', null],
  ])('reads %j as %j', (typed, value) => {
    expect(typedNumber(typed)).toBe(value)
  })

  it.each(['abc', '12 V', '1.2.3', '1e3', '-', '1,234.5'])('leaves %j as it is', (typed) => {
    expect(typedNumber(typed)).toBe(typed)
  })

  it.each([
    [12, 2, '12'],
    [12.5, 2, '12.5'],
    [49.212598, 2, '49.21'],
    [-0.001, 2, '0'],
  ])('puts %d with %d decimals into a field as %s', (value, digits, text) => {
    expect(editableNumber(value, digits)).toBe(text)
  })
})
