import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { magnitude } from '#shared/engine/complex.ts'
import { gammaFromImpedance, impedanceFromGamma, reflectionFromImpedance } from '#shared/engine/impedance.ts'
import {
  reflectionFromGamma,
  reflectionFromMagnitude,
  reflectionFromReturnLoss,
  reflectionFromSwr,
} from '#shared/engine/reflection.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

// Calculation sheet, section 2 (scikit-rf z2s, Z0 = 50): Z, Gamma, |Gamma|, return loss, SWR, mismatch loss.
const IMPEDANCES = [
  [25, 0, -0.333333, 0, 0.333333, 9.54243, 2, 0.511525],
  [100, 0, 0.333333, 0, 0.333333, 9.54243, 2, 0.511525],
  [50, 50, 0.2, 0.4, 0.447214, 6.9897, 2.61803, 0.9691],
  [73, 42.5, 0.273704, 0.250956, 0.371339, 8.60458, 2.18137, 0.644388],
  [36.5, -21.3, -0.089978, -0.268399, 0.28308, 10.9618, 1.78971, 0.362755],
  [2450, 0, 0.96, 0, 0.96, 0.354575, 49, 11.0568],
  [5, 0, -0.818182, 0, 0.818182, 1.743, 10, 4.80725],
] as const

// The same section: SWR, |Gamma|, return loss, mismatch loss.
const RATIOS = [
  [1.5, 0.2, 13.9794, 0.177288],
  [2, 0.333333, 9.54243, 0.511525],
  [3, 0.5, 6.0206, 1.24939],
  [5, 0.666667, 3.52183, 2.55273],
  [10, 0.818182, 1.743, 4.80725],
] as const

describe('the check values of reflection', () => {
  it.each(IMPEDANCES)(
    'converts %d + j%d ohm',
    (re, im, gammaRe, gammaIm, size, returnLossDb, swr, lossDb) => {
      const gamma = valueOf(gammaFromImpedance({ re, im }))
      expectClose(gamma.re, gammaRe)
      expectClose(gamma.im, gammaIm)
      const match = valueOf(reflectionFromImpedance({ re, im }))
      expectClose(match.magnitude, size)
      expectClose(match.returnLossDb, returnLossDb)
      expectClose(match.swr, swr)
      expectClose(match.mismatchLossDb, lossDb)
      const back = valueOf(impedanceFromGamma(gamma))
      expectClose(back.impedance.re, re)
      expectClose(back.impedance.im, im)
    },
  )

  it.each(RATIOS)('converts an SWR of %d', (swr, size, returnLossDb, lossDb) => {
    for (const match of [
      reflectionFromSwr(swr),
      reflectionFromReturnLoss(returnLossDb),
      reflectionFromMagnitude(size),
    ]) {
      const reflection = valueOf(match)
      expectClose(reflection.magnitude, size)
      expectClose(reflection.returnLossDb, returnLossDb)
      expectClose(reflection.mismatchLossDb, lossDb)
      expectClose(reflection.swr, swr)
      expect(reflection.warnings).toEqual([])
    }
  })
})

describe('the ends of the range', () => {
  it('gives infinite SWR and mismatch loss for a total reflection', () => {
    const total = { magnitude: 1, returnLossDb: 0, swr: Infinity, mismatchLossDb: Infinity, warnings: [] }
    expect(reflectionFromMagnitude(1)).toEqual(total)
    expect(reflectionFromSwr(Infinity)).toEqual(total)
    expect(reflectionFromReturnLoss(0)).toEqual(total)
    expect(reflectionFromImpedance({ re: 0, im: 12.3 })).toEqual(total)
  })

  it('gives an infinite return loss for a perfect match', () => {
    const perfect = { magnitude: 0, returnLossDb: Infinity, swr: 1, mismatchLossDb: 0, warnings: [] }
    expect(reflectionFromMagnitude(0)).toEqual(perfect)
    expect(reflectionFromSwr(1)).toEqual(perfect)
    expect(reflectionFromReturnLoss(Infinity)).toEqual(perfect)
    expect(reflectionFromImpedance({ re: 50, im: 0 })).toEqual(perfect)
  })

  it('takes a reflection up to 1.05 as exactly 1 and says so', () => {
    expect(reflectionFromMagnitude(1.05)).toMatchObject({ swr: Infinity, warnings: [{ code: 'W_CLAMPED' }] })
    expect(reflectionFromGamma({ re: 0, im: 1.01 })).toMatchObject({ swr: Infinity, returnLossDb: 0 })
    const clamped = valueOf(impedanceFromGamma({ re: 0, im: 1.01 }))
    expect(clamped.warnings).toMatchObject([{ code: 'W_CLAMPED' }])
    expectClose(clamped.impedance.re, 0)
    expectClose(clamped.impedance.im, 50)
  })

  it('refuses a reflection above 1.05', () => {
    expect(reflectionFromMagnitude(1.0501)).toMatchObject({ code: 'E_ACTIVE' })
    expect(impedanceFromGamma({ re: -1.06, im: 0 })).toMatchObject({ code: 'E_ACTIVE' })
  })

  it('writes an open and a short', () => {
    const open = valueOf(impedanceFromGamma({ re: 1, im: 0 }))
    expect(open).toMatchObject({ impedance: { re: Infinity, im: 0 }, admittance: { re: 0, im: 0 } })
    expect(gammaFromImpedance(open.impedance)).toEqual({ re: 1, im: 0 })
    const short = valueOf(impedanceFromGamma({ re: -1, im: 0 }))
    expect(short).toMatchObject({ impedance: { re: 0, im: 0 }, admittance: { re: Infinity, im: 0 } })
  })
})

describe('bad input', () => {
  it.each([
    ['an SWR below 1', reflectionFromSwr(0.99), 'E_RANGE', 'SWR cannot be below 1.'],
    [
      'a negative return loss',
      reflectionFromReturnLoss(-3),
      'E_RANGE',
      'Return loss is entered as a positive number of dB.',
    ],
    ['a negative magnitude', reflectionFromMagnitude(-0.1), 'E_RANGE', undefined],
    ['no SWR', reflectionFromSwr(undefined as unknown as number), 'E_MISSING', undefined],
    ['an SWR that is no number', reflectionFromSwr(NaN), 'E_NUMBER', undefined],
    ['a negative resistance', gammaFromImpedance({ re: -1, im: 0 }), 'E_ACTIVE', undefined],
    ['a Z0 of 0', gammaFromImpedance({ re: 1, im: 0 }, 0), 'E_RANGE', undefined],
    ['a negative Z0', impedanceFromGamma({ re: 0, im: 0 }, -50), 'E_RANGE', undefined],
    ['a reactance that is no number', gammaFromImpedance({ re: 1, im: NaN }), 'E_NUMBER', undefined],
  ])('refuses %s', (_, outcome, code, message) => {
    expect(outcome).toMatchObject(message === undefined ? { code } : { code, message })
  })

  it('never throws and never answers NaN', () => {
    const any = fc.double()
    fc.assert(
      fc.property(any, any, any, (a, b, c) => {
        const outcomes = [
          reflectionFromMagnitude(a),
          reflectionFromSwr(a),
          reflectionFromReturnLoss(a),
          reflectionFromGamma({ re: a, im: b }),
          gammaFromImpedance({ re: a, im: b }, c),
          reflectionFromImpedance({ re: a, im: b }, c),
          impedanceFromGamma({ re: a, im: b }, c),
        ]
        for (const outcome of outcomes) expectNumbersReal(outcome, { infinity: true })
      }),
      { numRuns: 1000 },
    )
  })

  it('comes back from impedance to the same reflection', () => {
    const part = fc.double({ min: -0.7, max: 0.7, noNaN: true })
    fc.assert(
      fc.property(part, part, fc.double({ min: 1, max: 1000, noNaN: true }), (re, im, z0) => {
        const back = valueOf(gammaFromImpedance(valueOf(impedanceFromGamma({ re, im }, z0)).impedance, z0))
        expect(magnitude({ re: back.re - re, im: back.im - im })).toBeLessThan(1e-9)
      }),
    )
  })
})
