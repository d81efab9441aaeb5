import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { estimateLoss, matchedAttenuatorLossDb, shuntLossDb } from '#shared/engine/termination-estimate.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { THREE_TERMINATIONS } from '../../support/transformer-sheet.ts'
import { valueOf } from '../../support/value-of.ts'

// Calculation sheet, section 4, trade rule (common practice, no source): SWR, matched-attenuator and shunt
// loss.
const TRADE_RULE = [
  [2, 4.77121, 1.76091],
  [3, 3.0103, 1.24939],
  [5, 1.76091, 0.791812],
  [7, 1.24939, 0.579919],
  [10, 0.871502, 0.413927],
  [20, 0.434657, 0.211893],
] as const

describe('the trade rule', () => {
  it.each(TRADE_RULE)('at an SWR of %d gives both models', (swr, matchedDb, shuntDb) => {
    expectClose(matchedAttenuatorLossDb(swr), matchedDb)
    expectClose(shuntLossDb(swr), shuntDb)
  })

  it('at an SWR of 5 on the open trace means 0.8 dB of shunt loss, not 1.76 dB', () => {
    expect(valueOf(shuntLossDb(5))).toBeCloseTo(0.8, 1)
    expect(valueOf(matchedAttenuatorLossDb(5))).toBeCloseTo(1.76, 2)
  })

  it('gives no loss for a total reflection and refuses an SWR below 1', () => {
    expect(matchedAttenuatorLossDb(Infinity)).toBe(0)
    expect(shuntLossDb(Infinity)).toBe(0)
    expectClose(shuntLossDb(1), 3.0103)
    for (const swr of [0.9, -1]) expect(shuntLossDb(swr)).toMatchObject({ code: 'E_RANGE' })
    for (const swr of [0.9, 1]) expect(matchedAttenuatorLossDb(swr)).toMatchObject({ code: 'E_RANGE' })
    expect(shuntLossDb(NaN)).toMatchObject({ code: 'E_NUMBER' })
  })
})

describe('estimateLoss', () => {
  // The sheet prints these with four digits.
  it.each(THREE_TERMINATIONS)('gives the estimates of the sheet at $mhz MHz', ({ readings, estimate }) => {
    const found = valueOf(estimateLoss(readings))
    expect(found.flag).toBe('ESTIMATE')
    expectClose(found.openHalfReturnLossDb, estimate.openHalfReturnLossDb, 5e-4)
    expectClose(found.meanHalfReturnLossDb, estimate.meanHalfReturnLossDb, 5e-4)
    expectClose(found.twoResistorDb, estimate.twoResistorDb, 5e-4)
  })

  it('hides half the loss at 28 MHz', () => {
    const high = THREE_TERMINATIONS[4]
    expect(valueOf(estimateLoss(high.readings)).twoResistorDb).toBeLessThan(0.51 * high.lossDb)
  })

  it('refuses traces that reflect nothing or too much', () => {
    const short = { re: -1, im: 0 }
    expect(estimateLoss({ open: { re: 0, im: 0 }, short })).toMatchObject({ code: 'E_ILL_CONDITIONED' })
    expect(estimateLoss({ open: { re: 1.06, im: 0 }, short })).toMatchObject({ code: 'E_ACTIVE' })
  })

  it('gives real figures or a failure for any traces', () => {
    const any = fc.record({ re: fc.double(), im: fc.double() })
    fc.assert(fc.property(any, any, (open, short) => expectNumbersReal(estimateLoss({ open, short }))))
    const part = fc.double({ min: -1, max: 1, noNaN: true })
    const near = fc.record({ re: part, im: part })
    fc.assert(fc.property(near, near, (open, short) => expectNumbersReal(estimateLoss({ open, short }))))
  })
})
