import { describe, expect, it } from 'vitest'
import { checkNumber, failure, isFailure } from '#shared/engine/outcome.ts'

describe('outcome', () => {
  it('tells a failure from a value', () => {
    expect(isFailure(failure('E_RANGE', 'too much'))).toBe(true)
    expect(isFailure({ value: 1 })).toBe(false)
    expect(isFailure(4)).toBe(false)
  })

  it('names the field and the range of a number out of range', () => {
    expect(checkNumber('P1', 0, 1, 5)).toEqual({
      code: 'E_RANGE',
      message: 'P1 is 0: it must be from 1 to 5.',
      field: 'P1',
    })
  })

  it('refuses a missing value and anything that is not a finite number', () => {
    expect(checkNumber('P1', undefined)?.code).toBe('E_MISSING')
    for (const bad of [NaN, Infinity, '4', {}, true]) expect(checkNumber('P1', bad)?.code).toBe('E_NUMBER')
  })

  it('accepts both ends of the range', () => {
    expect(checkNumber('P1', 1, 1, 5)).toBeUndefined()
    expect(checkNumber('P1', 5, 1, 5)).toBeUndefined()
  })
})
