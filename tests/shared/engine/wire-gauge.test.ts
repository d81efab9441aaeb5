import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { awgAreaMm2, awgDiameterMm, awgNumber, awgOhmPerM } from '#shared/engine/wire-gauge.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

describe('wire gauge', () => {
  // Calculation sheet, section 10 (ASTM B258, IEC 60028).
  it.each([
    [6, 4.11538, 13.3018, 1.29614, 1.4999],
    [8, 3.26364, 8.36556, 2.06095, 2.38493],
    [10, 2.58819, 5.26115, 3.27704, 3.79219],
    [12, 2.05253, 3.30877, 5.21069, 6.02981],
    [14, 1.62773, 2.08091, 8.28533, 9.58778],
    [16, 1.29085, 1.3087, 13.1742, 15.2452],
    [18, 1.02369, 0.823047, 20.9478, 24.2408],
  ])('AWG %i is %f mm, %f mm2, %f and %f mohm/m', (gauge, mm, mm2, at20, at60) => {
    expectClose(awgDiameterMm(gauge), mm)
    expectClose(awgAreaMm2(gauge), mm2)
    expectClose((awgOhmPerM(gauge) as number) * 1000, at20)
    expectClose((awgOhmPerM(gauge, 60) as number) * 1000, at60)
  })

  // NBS Handbook 100 (1966): 0.9989 ohm per 1000 ft; from memory, verify.
  it('agrees with the handbook on AWG 10', () => {
    expectClose((awgOhmPerM(10) as number) * 304.8, 0.9989, 2e-4)
  })

  it('halves its resistance every three gauges, about', () => {
    expectClose((awgOhmPerM(12) as number) / (awgOhmPerM(9) as number), 2, 6e-3)
  })

  it.each([
    ['12', 12],
    [' 0 ', 0],
    ['1/0', 0],
    ['2/0', -1],
    ['4/0', -3],
    ['-3', -3],
  ])('reads %s as %i', (text, gauge) => expect(awgNumber(text)).toBe(gauge))

  it.each(['', '41', '-4', '5/0', '12.5', '0x1', 'twelve', '1/1'])('refuses %s', (text) => {
    expect(awgNumber(text)).toMatchObject({ code: 'E_AWG' })
  })

  it('takes whole gauges from -3 to 40 and copper from -40 to 105 C', () => {
    for (const gauge of [-4, 41, 12.5, Number.NaN]) expect(awgOhmPerM(gauge)).toMatchObject({ code: 'E_AWG' })
    for (const c of [-41, 106]) expect(awgOhmPerM(12, c)).toMatchObject({ code: 'E_RANGE' })
    expect(awgDiameterMm(-3)).toBeCloseTo(11.684, 3)
    expect(awgDiameterMm(36)).toBeCloseTo(0.127, 12)
  })

  it('answers any input without throwing or NaN', () => {
    const any = fc.anything({ withNullPrototype: true }) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, (gauge, c) => {
        expectNumbersReal([awgOhmPerM(gauge, c), awgAreaMm2(gauge), awgNumber(gauge as unknown as string)])
      }),
    )
  })
})
