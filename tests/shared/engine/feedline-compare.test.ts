import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compareLine, wetLineSigns } from '#shared/engine/feedline-compare.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

describe('compareLine', () => {
  it('gives the difference to new cable and to the baseline', () => {
    const found = valueOf(compareLine({ measuredDb: 2.2, uMeasuredDb: 0.1, newDb: 1.2, baselineDb: 1.4 }))
    expectClose(found.aboveNewDb, 1)
    expectClose(found.aboveBaselineDb, 0.8)
    expect(found.warnings).toEqual([])
  })

  it('compares with nothing where there is nothing', () => {
    expect(compareLine({ measuredDb: 2.2, uMeasuredDb: 0.1 })).toEqual({
      aboveNewDb: null,
      aboveBaselineDb: null,
      warnings: [],
    })
  })

  it('doubts a line better than new by more than 2 u', () => {
    const line = { measuredDb: 1, uMeasuredDb: 0.1, newDb: 1.19 }
    expect(compareLine(line)).toMatchObject({ warnings: [] })
    expect(compareLine({ ...line, newDb: 1.21 })).toMatchObject({ warnings: [{ code: 'W_BELOW_NEW' }] })
  })

  it.each(['measuredDb', 'uMeasuredDb', 'newDb', 'baselineDb'])('refuses a negative %s', (field) => {
    expect(compareLine({ measuredDb: 1, uMeasuredDb: 0.1, [field]: -1 })).toMatchObject({
      code: 'E_RANGE',
      field,
    })
  })
})

describe('wetLineSigns', () => {
  const baseline = { lossDb: 1.4, swrAtTransmitter: 1.52 }

  it('suspects a line whose loss rises while its SWR improves, and says what the loss alone would show', () => {
    const found = valueOf(wetLineSigns(baseline, { lossDb: 2.2, swrAtTransmitter: 1.42 }))
    expect(found.isSuspected).toBe(true)
    expectClose(found.lossRiseDb, 0.8)
    // rho at the load 0.20635 * 10^0.14; at the transmitter now that over 10^0.22.
    const rho = (0.52 / 2.52) * 10 ** (0.14 - 0.22)
    expectClose(found.expectedSwr, (1 + rho) / (1 - rho))
    expect(found.warnings).toEqual([
      {
        code: 'W_WET_LINE',
        message:
          'The loss rose by 0.8 dB while the SWR fell to 1.42: the line hides the antenna and may be wet. ' +
          'The loss alone would show 1.41.',
      },
    ])
  })

  it.each([
    ['a rise within the spread of a field measurement', { lossDb: 1.5, swrAtTransmitter: 1.51 }],
    ['an SWR that did not improve', { lossDb: 3.1, swrAtTransmitter: 1.52 }],
    ['a loss that fell', { lossDb: 1, swrAtTransmitter: 1.4 }],
  ])('does not suspect %s', (_, now) => {
    expect(wetLineSigns(baseline, now)).toMatchObject({ isSuspected: false, warnings: [] })
  })

  it('takes the threshold it is given', () => {
    const now = { lossDb: 1.55, swrAtTransmitter: 1.5 }
    expect(wetLineSigns(baseline, now, 0.1)).toMatchObject({ isSuspected: true })
    expect(wetLineSigns(baseline, now, 0.2)).toMatchObject({ isSuspected: false })
  })

  it('has no expectation when the baseline itself is impossible', () => {
    const impossible = { lossDb: 10, swrAtTransmitter: 3 }
    expect(wetLineSigns(impossible, { lossDb: 11, swrAtTransmitter: 2 })).toMatchObject({
      isSuspected: true,
      expectedSwr: null,
    })
  })

  it('refuses a negative loss and an SWR below 1', () => {
    expect(wetLineSigns({ ...baseline, lossDb: -1 }, baseline)).toMatchObject({
      code: 'E_RANGE',
      field: 'baseline.lossDb',
    })
    const now = { lossDb: 1, swrAtTransmitter: 0.9 }
    expect(wetLineSigns(baseline, now)).toMatchObject({ code: 'E_RANGE', field: 'now.swrAtTransmitter' })
    expect(wetLineSigns(baseline, baseline, NaN)).toMatchObject({ code: 'E_NUMBER' })
  })

  it('gives real figures or a failure for any input', () => {
    const state = fc.record({ lossDb: fc.double(), swrAtTransmitter: fc.double() })
    const near = fc.record({
      lossDb: fc.double({ min: 0, max: 1000, noNaN: true }),
      swrAtTransmitter: fc.double({ min: 1, max: 1e6, noNaN: true }),
    })
    fc.assert(fc.property(state, state, (one, other) => expectNumbersReal(wetLineSigns(one, other))))
    fc.assert(
      fc.property(near, near, (one, other) => {
        // A mismatch beyond the precision of a double ends in an infinite SWR at the load, never in NaN.
        expectNumbersReal(wetLineSigns(one, other), { infinity: true })
      }),
    )
  })
})
