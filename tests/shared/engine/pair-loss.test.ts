import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Complex } from '#shared/engine/complex.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { pairLoss, pairLossSweep, type PairReading } from '#shared/engine/pair-loss.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import { PAIR_SWEEP } from '../../support/transformer-sheet.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

const symmetric = (reflected: Complex, through: Complex): PairReading => ({
  s11: reflected,
  s22: reflected,
  s21: through,
  s12: through,
})
const matched = symmetric({ re: 0.1, im: 0 }, { re: 0.8, im: 0 })
const codes = (reading: PairReading): string[] =>
  valueOf(pairLoss(reading)).warnings.map((warning) => warning.code)

describe('pairLoss', () => {
  it.each(PAIR_SWEEP)('gives the figures of the sheet at $mhz MHz', (row) => {
    const loss = valueOf(pairLoss(symmetric(row.s11, row.s21)))
    expectClose(loss.lossDb, row.lossDb)
    expectClose(loss.insertionLossDb, row.insertionLossDb)
    expectClose(loss.efficiency, row.efficiency)
    expect(loss.differenceDb).toBe(0)
    expect(loss.warnings.map((warning) => warning.code)).toEqual(row.mhz > 21 ? ['W_MISMATCH'] : [])
  })

  it('understates the loss into the real load and never passes the insertion loss', () => {
    for (const row of PAIR_SWEEP) {
      expect(row.lossDb).toBeLessThan(row.trueLossDb)
      expect(row.insertionLossDb).toBeGreaterThan(row.lossDb)
    }
    const [low, , , , high] = PAIR_SWEEP
    // The sheet: 7 % low at 3.6 MHz, 20 % low at 28.4 MHz.
    expect(1 - (low?.lossDb ?? 0) / (low?.trueLossDb ?? 1)).toBeCloseTo(0.07, 2)
    expect(1 - (high?.lossDb ?? 0) / (high?.trueLossDb ?? 1)).toBeCloseTo(0.2, 2)
  })

  it('reports the mean of both directions and their difference', () => {
    const loss = valueOf(pairLoss({ ...matched, s12: { re: 0.7, im: 0 } }))
    expectClose(loss.lossDb, (loss.forward.lossDb + loss.reverse.lossDb) / 2)
    expectClose(loss.differenceDb, loss.forward.lossDb - loss.reverse.lossDb)
    expect(loss.differenceDb).toBeLessThan(0)
  })

  it.each<[string, Partial<PairReading>, string[]]>([
    ['nothing when all is well', {}, []],
    ['W_NOT_RECIPROCAL above 0.02', { s12: { re: 0.7799, im: 0 } }, ['W_NOT_RECIPROCAL']],
    ['nothing at a difference just below 0.02', { s12: { re: 0.7801, im: 0 } }, []],
    ['W_NOT_ALIKE above 0.3 dB', { s12: { re: 0.745, im: 0 } }, ['W_NOT_RECIPROCAL', 'W_NOT_ALIKE']],
    ['W_MISMATCH above 0.5', { s11: { re: 0, im: 0.51 } }, ['W_NOT_ALIKE', 'W_MISMATCH']],
  ])('warns of %s', (_, change, wanted) => {
    expect(codes({ ...matched, ...change })).toEqual(wanted)
  })

  it('takes a little gain as no loss and flags it', () => {
    const loss = valueOf(pairLoss(symmetric({ re: 0, im: 0 }, { re: 1.005, im: 0 })))
    expect(loss).toMatchObject({ lossDb: 0, efficiency: 1, warnings: [{ code: 'W_CLAMPED' }] })
  })

  it.each<[string, PairReading, string]>([
    ['more power out than in', symmetric({ re: 0.5, im: 0 }, { re: 0.9, im: 0 }), 'E_GAIN'],
    ['a reflection of 1', symmetric({ re: 1, im: 0 }, { re: 0, im: 0 }), 'E_ACTIVE'],
    ['a dead pair', symmetric({ re: 0.5, im: 0 }, { re: 0, im: 0 }), 'E_NO_SIGNAL'],
    ['a value that is no number', symmetric({ re: NaN, im: 0 }, { re: 0, im: 0 }), 'E_NUMBER'],
  ])('refuses %s', (_, reading, code) => {
    expect(pairLoss(reading)).toMatchObject({ code })
  })
})

describe('pairLossSweep', () => {
  const file = (text: string) => valueOf(readTouchstone(text))

  it('keeps one bad point apart from the others', () => {
    const rows = ['7 0.1 0 0.8 0 0.8 0 0.1 0', '8 0.5 0 0.95 0 0.95 0 0.5 0', '9 0.1 0 0.8 0 0.8 0 0.1 0']
    const points = valueOf(pairLossSweep(file(`# MHz S RI R 50\n${rows.join('\n')}`)))
    expect(points.map((point) => point.frequencyHz)).toEqual([7e6, 8e6, 9e6])
    expect(points.map((point) => isFailure(point.result))).toEqual([false, true, false])
  })

  it('refuses a one-port file, another reference and an impossible reading error', () => {
    expect(pairLossSweep(file('# MHz S RI R 50\n7 0.1 0'))).toMatchObject({ code: 'TS_PORTS' })
    expect(pairLossSweep(file('# MHz S RI R 75\n7 0.1 0 0.8 0 0.8 0 0.1 0'))).toMatchObject({
      code: 'E_REFERENCE',
    })
    const good = file('# MHz S RI R 50\n7 0.1 0 0.8 0 0.8 0 0.1 0')
    expect(pairLossSweep(good, -0.01)).toMatchObject({ code: 'E_RANGE' })
  })
})

describe('any pair', () => {
  const part = fc.double({ min: -1.2, max: 1.2, noNaN: true })
  const complex = fc.record({ re: part, im: part })
  const reading = fc.record({ s11: complex, s21: complex, s12: complex, s22: complex })

  it('has an efficiency above 0 and up to 1, real figures, and insertion loss above the heat', () => {
    fc.assert(
      fc.property(reading, (reading) => {
        const loss = pairLoss(reading)
        if (isFailure(loss)) return
        expectNumbersReal(loss)
        expect(loss.efficiency).toBeGreaterThan(0)
        expect(loss.efficiency).toBeLessThanOrEqual(1)
        expect(loss.insertionLossDb - loss.lossDb).toBeGreaterThan(
          loss.warnings.some((warning) => warning.code === 'W_CLAMPED') ? -1 : -1e-12,
        )
      }),
      { numRuns: 2000 },
    )
  })

  it('is known better with a better analyzer', () => {
    fc.assert(
      fc.property(reading, fc.double({ min: 0.001, max: 0.02, noNaN: true }), (reading, error) => {
        const coarse = pairLoss(reading, error)
        const fine = pairLoss(reading, error / 2)
        if (isFailure(coarse) || isFailure(fine)) return
        expect(fine.uLossDb).toBeLessThan(coarse.uLossDb)
        expect(fine.lossDb).toBe(coarse.lossDb)
      }),
    )
  })

  it('throws nothing, whatever it is given', () => {
    const any = fc.record({ re: fc.double(), im: fc.double() })
    fc.assert(
      fc.property(any, any, any, any, (s11, s21, s12, s22) => {
        expectNumbersReal(pairLoss({ s11, s21, s12, s22 }))
      }),
    )
  })
})
