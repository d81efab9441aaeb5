import { describe, expect, it } from 'vitest'
import { checkPositive, checkWhole, finiteResult } from '#shared/engine/check-range.ts'

describe('check-range', () => {
  it('keeps zero out of a positive range and lets the top in', () => {
    expect(checkPositive('inputW', 0, 5)).toMatchObject({ code: 'E_RANGE', field: 'inputW' })
    expect(checkPositive('inputW', -1, 5)).toMatchObject({ code: 'E_RANGE' })
    expect(checkPositive('inputW', 5.1, 5)).toMatchObject({ code: 'E_RANGE' })
    expect(checkPositive('inputW', 5, 5)).toBeUndefined()
    expect(checkPositive('inputW', '5', 5)).toMatchObject({ code: 'E_NUMBER' })
  })

  it('takes whole numbers only', () => {
    expect(checkWhole('months', 3, 1, 5)).toBeUndefined()
    expect(checkWhole('months', 3.5, 1, 5)).toMatchObject({ code: 'E_RANGE' })
    expect(checkWhole('months', undefined, 1, 5)).toMatchObject({ code: 'E_MISSING' })
  })

  it('turns an overflow into a failure', () => {
    expect(finiteResult(4)).toBe(4)
    for (const value of [Infinity, -Infinity, Number.NaN])
      expect(finiteResult(value)).toMatchObject({ code: 'E_RANGE' })
  })
})
