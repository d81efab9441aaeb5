import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { keyDownTime, keyDownTimeBySlope } from '#shared/engine/key-down-time.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('keyDownTime', () => {
  // Calculation sheet, section 6.
  it.each([
    [85, 35, 58, 308.243, undefined, 610.63],
    [85, 35, 120, 308.243, undefined, 166.142],
    [85, 35, 120, 308.243, 60, 94.1318],
    [85, 35, 120, 308.243, 85, 0],
    [70, 20, 60, 600, undefined, 1075.06],
  ])(
    'to %i C at %i C ambient, %i K, tau %f s, from %s: %f s',
    (limitC, ambientC, steadyRiseK, tauS, startC, s) => {
      const start = startC === undefined ? {} : { startC }
      expectClose(keyDownTime({ limitC, ambientC, steadyRiseK, tauS, ...start }), s)
    },
  )

  it('is unlimited when the end temperature does not exceed the limit', () => {
    expect(keyDownTime({ limitC: 105, ambientC: 35, steadyRiseK: 58, tauS: 308.243 })).toBe(Infinity)
    expect(keyDownTime({ limitC: 93, ambientC: 35, steadyRiseK: 58, tauS: 308.243 })).toBe(Infinity)
    expect(keyDownTime({ limitC: 92.9, ambientC: 35, steadyRiseK: 58, tauS: 308.243 })).not.toBe(Infinity)
  })

  it('is 0 above the limit even when the device would cool', () => {
    expect(keyDownTime({ limitC: 85, ambientC: 20, steadyRiseK: 10, tauS: 300, startC: 90 })).toBe(0)
  })

  it('refuses a tau of 0 and a negative rise', () => {
    expect(keyDownTime({ limitC: 85, ambientC: 20, steadyRiseK: 10, tauS: 0 })).toMatchObject({
      code: 'E_RANGE',
    })
    expect(keyDownTime({ limitC: 85, ambientC: 20, steadyRiseK: -1, tauS: 9 })).toMatchObject({
      code: 'E_RANGE',
    })
  })
})

describe('keyDownTimeBySlope', () => {
  const question = { limitC: 85, startC: 23, slopeKPerS: 0.111, loggedS: 60 }

  it('divides the headroom by the slope', () => {
    expect(keyDownTimeBySlope(question)).toEqual({ known: true, seconds: 62 / 0.111 })
    expect(keyDownTimeBySlope({ ...question, heatRatio: 2 })).toEqual({ known: true, seconds: 31 / 0.111 })
  })

  it('is not known inside the logged time', () => {
    const shorter = { known: false, reason: 'shorter-than-log' }
    expect(keyDownTimeBySlope({ ...question, heatRatio: 10 })).toEqual(shorter)
    expect(keyDownTimeBySlope({ ...question, slopeKPerS: 0.5, loggedS: 124 })).toEqual({
      known: true,
      seconds: 124,
    })
    expect(keyDownTimeBySlope({ ...question, slopeKPerS: 0.5, loggedS: 124.1 })).toEqual(shorter)
  })

  it('is 0 at the limit and has no answer for a slope of 0', () => {
    expect(keyDownTimeBySlope({ ...question, startC: 85 })).toEqual({ known: true, seconds: 0 })
    expect(keyDownTimeBySlope({ ...question, slopeKPerS: 0 })).toMatchObject({ code: 'E_NO_RISE' })
  })

  it('answers any input without throwing or NaN', () => {
    const any = fc.oneof(fc.double(), fc.anything())
    fc.assert(
      fc.property(any, any, any, any, any, (a, b, c, d, e) => {
        const [limitC, x, y, z, w] = [a, b, c, d, e] as number[] as [number, number, number, number, number]
        expectNumbersReal(keyDownTimeBySlope({ limitC, startC: x, slopeKPerS: y, loggedS: z, heatRatio: w }))
        const time = keyDownTime({ limitC, ambientC: x, steadyRiseK: y, tauS: z, startC: w })
        expectNumbersReal(time, { infinity: true })
      }),
    )
  })
})
