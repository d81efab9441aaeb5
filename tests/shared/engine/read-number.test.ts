import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { readNumber } from '#shared/engine/touchstone/read-number.ts'

const read = (text: string): number | undefined => readNumber(text)

describe('readNumber', () => {
  it('gives the same double as Number for every decimal', () => {
    const digits = fc.stringMatching(/^[+-]?\d{0,20}(\.\d{0,20})?([eE][+-]?\d{1,3})?$/)
    fc.assert(
      fc.property(digits, (text) => {
        const wanted = text === '' ? NaN : Number(text)
        expect(read(text)).toBe(Number.isFinite(wanted) ? wanted : undefined)
      }),
      { numRuns: 2000 },
    )
  })

  it('reads back every double that JavaScript writes', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(read(String(value))).toBe(value + 0)
      }),
    )
  })

  it.each([
    '',
    '-',
    '+',
    '.',
    '-.',
    '1e',
    'e5',
    '1..2',
    '1.2.3',
    '--1',
    '1-2',
    '0x1',
    'NaN',
    'inf',
    '1,5',
    '1e400',
  ])('refuses %j', (text) => {
    expect(read(text)).toBeUndefined()
  })

  it.each([
    ['5.', 5],
    ['.5', 0.5],
    ['+0.1', 0.1],
    ['-14.2', -14.2],
    ['123456789012345', 123456789012345],
    ['0.123456789012345678', 0.123456789012345678],
    ['1E6', 1e6],
  ])('reads %j', (text, value) => {
    expect(read(text)).toBe(value)
  })
})
