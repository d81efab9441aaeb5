import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  efficiencyFromLossDb,
  heatW,
  lossDbFromEfficiency,
  sUnitsFromLossDb,
} from '#shared/engine/efficiency.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

describe('efficiency', () => {
  // Calculation sheet, section 5 (numpy): efficiency, loss dB, W lost per 100 W in, S-units.
  it.each([
    [0.95, 0.222764, 5, 0.0371273],
    [0.9, 0.457575, 10, 0.0762625],
    [0.83, 0.809219, 17, 0.13487],
    [0.8, 0.9691, 20, 0.161517],
    [0.7, 1.54902, 30, 0.25817],
    [0.5, 3.0103, 50, 0.501717],
    [0.25, 6.0206, 75, 1.00343],
  ])('of %d is the loss of the sheet', (efficiency, lossDb, lostW, sUnits) => {
    expectClose(lossDbFromEfficiency(efficiency), lossDb)
    expectClose(efficiencyFromLossDb(lossDb), efficiency)
    expectClose(heatW(100, efficiency), lostW)
    expectClose(sUnitsFromLossDb(lossDb), sUnits)
  })

  it('of 1 is 0 dB, not minus 0', () => {
    expect(lossDbFromEfficiency(1)).toBe(0)
    expect(efficiencyFromLossDb(0)).toBe(1)
    expect(heatW(100, 1)).toBe(0)
  })

  it('typed as a percentage is refused with the number to enter', () => {
    expect(lossDbFromEfficiency(83)).toEqual({
      code: 'E_RANGE',
      field: 'efficiency',
      message: 'Efficiency is 83: it must be above 0 and up to 1. For 83 % enter 0.83.',
    })
  })

  it.each([
    ['an efficiency of 0', lossDbFromEfficiency(0), 'E_RANGE'],
    ['an efficiency of 101', lossDbFromEfficiency(101), 'E_RANGE'],
    ['a negative loss', efficiencyFromLossDb(-0.1), 'E_RANGE'],
    ['negative power', heatW(-1, 0.5), 'E_RANGE'],
    ['heat at an efficiency of 0', heatW(1, 0), 'E_RANGE'],
    ['negative S-units', sUnitsFromLossDb(-6), 'E_RANGE'],
    ['no loss', efficiencyFromLossDb(NaN), 'E_NUMBER'],
  ])('refuses %s', (_, outcome, code) => {
    expect(outcome).toMatchObject({ code })
  })

  it('never throws, never answers NaN or Infinity', () => {
    fc.assert(
      fc.property(fc.double(), fc.double(), (a, b) => {
        for (const outcome of [
          lossDbFromEfficiency(a),
          efficiencyFromLossDb(a),
          heatW(a, b),
          sUnitsFromLossDb(a),
        ]) {
          if (!isFailure(outcome)) expectNumbersReal(outcome)
        }
      }),
    )
  })

  it('comes back from decibels', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1, noNaN: true }), (efficiency) => {
        expectClose(efficiencyFromLossDb(valueOf(lossDbFromEfficiency(efficiency))), efficiency, 1e-12)
      }),
    )
  })
})
