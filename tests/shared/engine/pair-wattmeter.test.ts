import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { meterLimit, standardFromLimit } from '#shared/engine/meter-accuracy.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import {
  lossFromPowers,
  pairLossFromPowers,
  worstCasePairErrorDb,
  type PowerReadings,
} from '#shared/engine/pair-wattmeter.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

const readings = (
  inW: number,
  outW: number,
  inRelative = 0.05,
  outRelative = 0.05,
  correlation = 0,
): PowerReadings => ({
  inW,
  outW,
  inRelative,
  outRelative,
  correlation,
})

describe('pairLossFromPowers', () => {
  // Calculation sheet, section 3 (numpy): P in, P out, r in, r out, rho, loss, efficiency, u(loss),
  // u(efficiency).
  it.each([
    [100, 66, 0.05, 0.05, 0, 0.90228, 0.812404, 0.153546, 0.0287228],
    [100, 66, 0.05, 0.05, 1, 0.90228, 0.812404, 0, 0],
    [20, 15, 0.1, 0.1, 0, 0.624694, 0.866025, 0.307093, 0.0612372],
    [50, 41, 0.05, 0.05, 0.5, 0.430931, 0.905539, 0.108574, 0.0226385],
    [100, 100, 0.05, 0.05, 0, 0, 1, 0.153546, 0.0353553],
    [100, 72.25, 0.05, 0.07, 0, 0.705811, 0.85, 0.186797, 0.0365599],
  ])('of %d W in and %d W out at %d, %d, %d is the row of the sheet', (...row) => {
    const [inW, outW, inRelative, outRelative, correlation, lossDb, efficiency, uLossDb, uEfficiency] = row
    const loss = valueOf(pairLossFromPowers({ inW, outW, inRelative, outRelative, correlation }))
    expectClose(loss.lossDb, lossDb)
    expectClose(loss.efficiency, efficiency)
    expectClose(loss.uLossDb, uLossDb)
    expectClose(loss.uEfficiency, uEfficiency)
  })

  it('says that a loss below 3 u is too good for the meters', () => {
    expect(pairLossFromPowers(readings(100, 100))).toMatchObject({ isResolved: false })
    const [warning] = valueOf(pairLossFromPowers(readings(20, 15, 0.1, 0.1))).warnings
    expect(warning).toEqual({
      code: 'W_BELOW_RESOLUTION',
      message: 'Too good to measure with these meters: the loss is below 0.92 dB.',
    })
    expect(pairLossFromPowers(readings(100, 66))).toMatchObject({ isResolved: true, warnings: [] })
  })

  it('takes a little more out than in as no loss, up to 2 u', () => {
    // 2 u of the pair is 0.307 dB a device, a ratio of 1.152.
    expect(pairLossFromPowers(readings(100, 115))).toMatchObject({
      lossDb: 0,
      efficiency: 1,
      warnings: [{ code: 'W_BELOW_RESOLUTION' }],
    })
    expect(pairLossFromPowers(readings(100, 116))).toMatchObject({ code: 'E_GAIN' })
    expect(pairLossFromPowers(readings(100, 100.1, 0.05, 0.05, 1))).toMatchObject({ code: 'E_GAIN' })
  })

  it.each<[string, PowerReadings, string]>([
    ['no power in', readings(0, 66), 'inW'],
    ['no power out', readings(100, 0), 'outW'],
    ['negative power', readings(-100, 66), 'inW'],
    ['an uncertainty below 0', readings(100, 66, -0.01), 'inRelative'],
    ['an uncertainty above one half', readings(100, 66, 0.05, 0.51), 'outRelative'],
    ['a correlation above 1', readings(100, 66, 0.05, 0.05, 1.01), 'correlation'],
    ['a correlation below 0', readings(100, 66, 0.05, 0.05, -0.01), 'correlation'],
  ])('refuses %s', (_, bad, field) => {
    expect(pairLossFromPowers(bad)).toMatchObject({ code: 'E_RANGE', field })
  })

  it('halves what a single device between the meters would lose', () => {
    const single = valueOf(lossFromPowers(readings(100, 66)))
    const pair = valueOf(pairLossFromPowers(readings(100, 66)))
    expectClose(single.lossDb, 2 * pair.lossDb)
    expectClose(single.uLossDb, 2 * pair.uLossDb)
    expectClose(single.efficiency, 0.66)
    expectClose(single.uEfficiency, 0.66 * Math.SQRT2 * 0.05)
  })
})

describe('the accuracy of a meter', () => {
  it('becomes a rectangular standard uncertainty', () => {
    expectClose(standardFromLimit(valueOf(meterLimit({ kind: 'of-reading', percent: 5 }, 20))), 0.0288675)
  })

  it('in percent of full scale grows as the reading falls', () => {
    const accuracy = { kind: 'of-full-scale', percent: 5, fullScaleW: 200 } as const
    expectClose(meterLimit(accuracy, 200), 0.05)
    expectClose(meterLimit(accuracy, 20), 0.5)
  })

  // Calculation sheet, section 3: both readings off by 5 % in opposite directions.
  it('gives a worst case of 0.217328 dB for 5 %', () => {
    expectClose(worstCasePairErrorDb(0.05), 0.217328)
    expect(worstCasePairErrorDb(1)).toMatchObject({ code: 'E_RANGE' })
  })

  it('refuses a reading of 0 and a negative percentage', () => {
    expect(meterLimit({ kind: 'of-reading', percent: -1 }, 20)).toMatchObject({
      code: 'E_RANGE',
      field: 'percent',
    })
    expect(meterLimit({ kind: 'of-reading', percent: 5 }, 0)).toMatchObject({
      code: 'E_RANGE',
      field: 'readingW',
    })
    const noScale = { kind: 'of-full-scale', percent: 5, fullScaleW: NaN } as const
    expect(meterLimit(noScale, 20)).toMatchObject({ code: 'E_NUMBER', field: 'fullScaleW' })
  })
})

describe('any two readings', () => {
  it('give real figures and an efficiency of at most 1, or a failure', () => {
    const any = fc.double()
    fc.assert(
      fc.property(any, any, any, any, any, (inW, outW, inRelative, outRelative, correlation) => {
        expectNumbersReal(pairLossFromPowers({ inW, outW, inRelative, outRelative, correlation }))
      }),
    )
    const watts = fc.double({ min: 0.01, max: 1000, noNaN: true })
    const relative = fc.double({ min: 0, max: 0.5, noNaN: true })
    fc.assert(
      fc.property(watts, watts, relative, relative, (inW, outW, inRelative, outRelative) => {
        const loss = pairLossFromPowers({ inW, outW, inRelative, outRelative, correlation: 0 })
        if (isFailure(loss)) return
        expectNumbersReal(loss)
        expect(loss.efficiency).toBeLessThanOrEqual(1)
        if (outW > inW) expect(loss.warnings).toHaveLength(1)
      }),
    )
  })

  it('are known better with better meters', () => {
    const relative = fc.double({ min: 0.01, max: 0.5, noNaN: true })
    fc.assert(
      fc.property(relative, relative, (inRelative, outRelative) => {
        const coarse = valueOf(pairLossFromPowers(readings(100, 66, inRelative, outRelative)))
        const fine = valueOf(pairLossFromPowers(readings(100, 66, inRelative * 0.9, outRelative)))
        expect(fine.uLossDb).toBeLessThan(coarse.uLossDb)
        expect(fine.uEfficiency).toBeLessThan(coarse.uEfficiency)
      }),
    )
  })
})
