import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { CABLES } from '#shared/engine/feedline-cable.ts'
import { feedlineLoss, lossWithSwr, matchedLoss } from '#shared/engine/feedline-loss.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

// Calculation sheet, section 8 (scikit-rf lossy line, real Z0 50): cable, MHz, m, matched loss.
const MATCHED = [
  ['rg-58', 7.1, 30, 1.17316],
  ['rg-58', 28.4, 15, 1.18217],
  ['rg-174', 14.2, 7.6, 0.78025],
  ['rg-316', 14.2, 7.6, 0.786224],
  ['rg-8x', 146, 15, 2.19773],
  ['rg-213', 28.4, 50, 1.72199],
  ['foam-10-mm', 146, 30, 1.53278],
  ['foam-10-mm', 50, 100, 2.90661],
] as const

// The same section: cable, MHz, m, SWR at load, matched, total, extra, SWR at the transmitter end.
const WITH_SWR = [
  ['rg-58', 7.1, 30, 1, 1.17316, 1.17316, 0, 1],
  ['rg-58', 7.1, 30, 2, 1.17316, 1.39404, 0.220882, 1.6825],
  ['rg-58', 28.4, 30, 5, 2.36434, 4.21327, 1.84893, 2.26152],
  ['rg-174', 14.2, 7.6, 3, 0.78025, 1.19661, 0.416358, 2.43511],
  ['rg-213', 3.6, 50, 10, 0.59826, 2.32327, 1.72501, 5.96602],
  ['foam-10-mm', 146, 30, 1.5, 1.53278, 1.62345, 0.0906689, 1.327],
] as const

// Table points of the same section, dB per 100 ft at 30 and 150 MHz.
const TABLE_POINTS = [
  ['rg-174', 4.56, 10.3],
  ['rg-58', 2.47, 5.63],
  ['rg-8x', 1.96, 4.53],
  ['rg-213', 1.08, 2.53],
  ['foam-10-mm', 0.68, 1.58],
] as const

describe('matchedLoss', () => {
  it.each(MATCHED)(
    'of %s at %d MHz over %d m is the one of the sheet',
    (cable, frequencyMhz, lengthM, lossDb) => {
      expectClose(valueOf(matchedLoss({ cable, frequencyMhz, lengthM })).matchedDb, lossDb)
    },
  )

  it.each(TABLE_POINTS)('of %s goes through the points of the table', (cable, at30, at150) => {
    for (const [frequencyMhz, lossDb] of [
      [30, at30],
      [150, at150],
    ] as const) {
      expectClose(valueOf(matchedLoss({ cable, frequencyMhz, lengthM: 30.48 })).matchedDb, lossDb, 1e-3)
    }
  })

  it('warns of thin cable below 10 MHz, where a handbook says 3.3 dB and the law 2.62', () => {
    const run = { cable: 'rg-174', frequencyMhz: 9.999, lengthM: 30.48 }
    expect(matchedLoss(run)).toMatchObject({ warnings: [{ code: 'W_THIN_COAX' }] })
    expect(matchedLoss({ ...run, cable: 'rg-316' })).toMatchObject({ warnings: [{ code: 'W_THIN_COAX' }] })
    expect(matchedLoss({ ...run, cable: 'rg-58' })).toMatchObject({ warnings: [] })
    const at10 = valueOf(matchedLoss({ ...run, frequencyMhz: 10 }))
    expect(at10.warnings).toEqual([])
    expectClose(at10.matchedDb, 2.62, 2e-3)
  })

  it.each([
    ['an unknown cable', { cable: 'rg-59', frequencyMhz: 7, lengthM: 1 }, 'E_CABLE'],
    ['a frequency below 1 MHz', { cable: 'rg-58', frequencyMhz: 0.999, lengthM: 1 }, 'E_RANGE'],
    ['a frequency above 1000 MHz', { cable: 'rg-58', frequencyMhz: 1000.1, lengthM: 1 }, 'E_RANGE'],
    ['a negative length', { cable: 'rg-58', frequencyMhz: 7, lengthM: -1 }, 'E_RANGE'],
    ['a length that is no number', { cable: 'rg-58', frequencyMhz: 7, lengthM: NaN }, 'E_NUMBER'],
  ])('refuses %s', (_, run, code) => {
    expect(matchedLoss(run)).toMatchObject({ code })
  })

  it('of no length is 0 dB', () => {
    expect(feedlineLoss({ cable: 'rg-58', frequencyMhz: 7, lengthM: 0, swrAtLoad: 3 })).toMatchObject({
      matchedDb: 0,
      totalDb: 0,
      extraDb: 0,
      swrAtTransmitter: valueOf(lossWithSwr(1, { swrAtLoad: 3 })).swrAtLoad,
    })
  })
})

describe('feedlineLoss', () => {
  it.each(WITH_SWR)('of %s at %d MHz over %d m with an SWR of %d is the one of the sheet', (...row) => {
    const [cable, frequencyMhz, lengthM, swrAtLoad, matchedDb, totalDb, extraDb, swrAtTransmitter] = row
    const loss = valueOf(feedlineLoss({ cable, frequencyMhz, lengthM, swrAtLoad }))
    expectClose(loss.matchedDb, matchedDb)
    expectClose(loss.totalDb, totalDb)
    expectClose(loss.extraDb, extraDb)
    expectClose(loss.swrAtTransmitter, swrAtTransmitter)
    const back = valueOf(lossWithSwr(loss.matchedDb, { swrAtTransmitter: loss.swrAtTransmitter }))
    expectClose(back.totalDb, totalDb)
    expectClose(back.swrAtLoad, swrAtLoad)
  })

  // Field practice, section 4.6: "a 3.0:1 antenna through 3.1 dB looks like 1.65:1".
  it('hides a 3:1 antenna behind 3.1 dB', () => {
    expect(valueOf(lossWithSwr(3.1, { swrAtLoad: 3 })).swrAtTransmitter).toBeCloseTo(1.65, 2)
  })

  it('loses everything at a total reflection, and says so', () => {
    const loss = valueOf(lossWithSwr(1, { swrAtLoad: Infinity }))
    expect(loss).toMatchObject({
      totalDb: Infinity,
      swrAtLoad: Infinity,
      warnings: [{ code: 'W_NO_SIGNAL' }],
    })
    expectClose(loss.swrAtTransmitter, (1 + 10 ** -0.1) / (1 - 10 ** -0.1))
  })

  it('warns above 30 dB', () => {
    expect(lossWithSwr(30.01, { swrAtLoad: 1 })).toMatchObject({ warnings: [{ code: 'W_NO_SIGNAL' }] })
    expect(lossWithSwr(30, { swrAtLoad: 1 })).toMatchObject({ warnings: [] })
  })

  it('refuses an SWR at the transmitter that the line cannot pass', () => {
    // 3 dB: rho at the transmitter is at most one half, an SWR of 3.
    const at3Db = 10 * Math.log10(2)
    expect(isFailure(lossWithSwr(at3Db, { swrAtTransmitter: 2.999 }))).toBe(false)
    expect(lossWithSwr(at3Db, { swrAtTransmitter: 3.001 })).toMatchObject({
      code: 'E_IMPOSSIBLE',
      message: 'This line is too lossy for that SWR at the transmitter: check cable, length or reading.',
    })
  })

  it.each([
    ['no SWR', {}, 'E_MISSING'],
    ['both ends', { swrAtLoad: 2, swrAtTransmitter: 1.5 }, 'E_AMBIGUOUS'],
    ['an SWR below 1', { swrAtLoad: 0.9 }, 'E_RANGE'],
    ['an SWR at the transmitter below 1', { swrAtTransmitter: 0.9 }, 'E_RANGE'],
  ])('refuses %s', (_, swr, code) => {
    expect(lossWithSwr(1, swr)).toMatchObject({ code })
  })

  it('gives no NaN for any input', () => {
    const any = fc.double()
    const cable = fc.constantFrom(...CABLES.map((each) => each.key), 'x')
    fc.assert(
      fc.property(cable, any, any, any, any, (cable, a, b, c, matchedDb) => {
        expectNumbersReal(feedlineLoss({ cable, frequencyMhz: a, lengthM: b, swrAtLoad: c }), {
          infinity: true,
        })
        expectNumbersReal(lossWithSwr(matchedDb, { swrAtLoad: c }), { infinity: true })
        expectNumbersReal(lossWithSwr(matchedDb, { swrAtTransmitter: c }), { infinity: true })
      }),
    )
    const db = fc.double({ min: 0, max: 20_000, noNaN: true })
    const swr = fc.double({ min: 1, max: 1e6, noNaN: true })
    fc.assert(
      fc.property(db, swr, (matchedDb, swr) => {
        const loss = valueOf(lossWithSwr(matchedDb, { swrAtLoad: swr }))
        expectNumbersReal(loss)
        expect(loss.extraDb).toBeGreaterThanOrEqual(0)
        expect(loss.swrAtTransmitter).toBeLessThanOrEqual(swr * (1 + 1e-9))
      }),
    )
  })
})
