import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  customaryHalfWaveFt,
  customaryHalfWaveM,
  freeHalfWaveM,
  HALF_WAVE_M_MHZ,
  halfWaveCutM,
} from '#shared/engine/antenna-length.ts'
import { metresFromFeet } from '#shared/engine/units.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { readVectors } from '../../support/vectors.ts'

interface Resonance {
  antenna: 'dipole' | 'end-fed'
  frequencyMhz: number
  heightM: number | null
  lengthM: number
  resistanceOhm: number
}
const resonances = readVectors<Resonance[]>('antenna-resonance')
const modelled = (antenna: string, frequencyMhz: number, heightM: number | null) =>
  resonances.find(
    (row) => row.antenna === antenna && row.frequencyMhz === frequencyMhz && row.heightM === heightM,
  )

describe('half wave', () => {
  // Calculation sheet, section 7.
  it.each([
    [1.9, 75.2632, 246.316, 75.0771, 78.8928, 74.9481],
    [3.6, 39.7222, 130, 39.624, 41.6378, 39.5559],
    [7.1, 20.1408, 65.9155, 20.091, 21.1121, 20.0565],
    [14.2, 10.0704, 32.9577, 10.0455, 10.5561, 10.0283],
    [28.4, 5.03521, 16.4789, 5.02276, 5.27804, 5.01413],
    [146, 0.979452, 3.20548, 0.97703, 1.02669, 0.975352],
  ])('at %f MHz', (mhz, customaryM, customaryFt, ftAsM, freeM, cutM) => {
    expectClose(customaryHalfWaveM(mhz), customaryM)
    expectClose(customaryHalfWaveFt(mhz), customaryFt)
    expectClose(metresFromFeet(customaryHalfWaveFt(mhz) as number), ftAsM)
    expectClose(freeHalfWaveM(mhz), freeM)
    expectClose(halfWaveCutM(mhz, 0.95), cutM)
  })

  it('keeps the two customary constants apart', () => {
    expectClose(143 / HALF_WAVE_M_MHZ, 0.954, 1e-3)
    expectClose(metresFromFeet(468) / HALF_WAVE_M_MHZ, 0.9516)
    expectClose(metresFromFeet(468), 142.646)
  })

  it('takes k from 0.5 to 1 and a frequency above 0', () => {
    for (const k of [0.49, 1.01]) expect(halfWaveCutM(7.1, k)).toMatchObject({ code: 'E_RANGE', field: 'k' })
    for (const mhz of [0, -7]) expect(freeHalfWaveM(mhz)).toMatchObject({ code: 'E_RANGE' })
    expect(halfWaveCutM(7.1, 0.5)).toBeTypeOf('number')
    expect(halfWaveCutM(7.1, 1)).toBe(freeHalfWaveM(7.1))
  })

  it('answers any input without throwing, NaN or Infinity', () => {
    const any = fc.oneof(fc.double(), fc.anything()) as fc.Arbitrary<number>
    fc.assert(
      fc.property(any, any, (mhz, k) => {
        for (const answer of [freeHalfWaveM, customaryHalfWaveM, customaryHalfWaveFt].map((f) => f(mhz)))
          expectNumbersReal(answer)
        expectNumbersReal(halfWaveCutM(mhz, k))
      }),
    )
  })
})

describe('modelled wires', () => {
  // Calculation sheet, section 7, against nec2c run anew: 1 %.
  it.each([
    [3.65, null, 40.042, 72.17],
    [3.65, 10, 39.5, 51.29],
    [7.1, null, 20.542, 72.12],
    [7.1, 10, 20.327, 79.52],
    [14.2, null, 10.244, 72.06],
    [14.2, 10, 10.321, 72.46],
    [28.4, null, 5.1057, 72],
    [28.4, 10, 5.1261, 74.82],
  ])('a dipole at %f MHz, height %s, is resonant at %f m and %f ohm', (mhz, heightM, lengthM, ohm) => {
    const row = modelled('dipole', mhz, heightM)
    expectClose(row?.lengthM, lengthM, 1e-2)
    expectClose(row?.resistanceOhm, ohm, 1e-2)
    // 143/f is 0.8 to 2.5 % short of it.
    const short = 1 - (customaryHalfWaveM(mhz) as number) / (row?.lengthM ?? 0)
    expect(short).toBeGreaterThan(0.0075)
    expect(short).toBeLessThan(0.025)
  })

  // 2 % on length, 15 % on resistance.
  it.each([
    [3.65, null, 39.37, 3281],
    [3.65, 10, 39.354, 5255],
    [7.1, null, 20.106, 2692],
    [7.1, 10, 19.777, 2400],
    [14.2, null, 9.9588, 2111],
    [14.2, 10, 10.008, 1992],
  ])(
    'an end-fed wire at %f MHz, height %s, has no reactance at %f m and %f ohm',
    (mhz, heightM, lengthM, ohm) => {
      const row = modelled('end-fed', mhz, heightM)
      expectClose(row?.lengthM, lengthM, 2e-2)
      expectClose(row?.resistanceOhm, ohm, 0.15)
    },
  )
})
