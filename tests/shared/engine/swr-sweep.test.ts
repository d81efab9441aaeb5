import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { swrOfSweep } from '#shared/engine/reflection-sweep.ts'
import { checkSweep, swrAt, swrBandwidth, sweepMinimum, type SwrSample } from '#shared/engine/swr-sweep.ts'
import { BASELINE, NEW_SWEEP } from '../../support/series-antenna.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

const before = swrOfSweep(BASELINE) as SwrSample[]
const now = swrOfSweep(NEW_SWEEP) as SwrSample[]
const sweep = (...swrs: number[]) => swrs.map((swr, i) => ({ frequencyHz: 7e6 + i * 1e5, swr }))

describe('sweepMinimum', () => {
  // Calculation sheet, section 7 (scikit-rf).
  it('is at a sample', () => {
    const [a, b] = [sweepMinimum(before), sweepMinimum(now)] as SwrSample[]
    expectClose(a?.swr, 1.12815)
    expectClose(b?.swr, 1.07246)
    expect([a?.frequencyHz, b?.frequencyHz]).toEqual([7_100_000, 7_050_000])
  })

  it('is the first of equals', () => {
    expect(sweepMinimum(sweep(2, 1.5, 1.5, 3))).toMatchObject({ frequencyHz: 7.1e6 })
  })
})

describe('swrBandwidth', () => {
  // Calculation sheet, section 7 (scikit-rf).
  it.each([
    ['baseline', before, 2, 6.886124, 7.362027, false, false],
    ['new', now, 2, 6.8, 7.276911, true, false],
    ['baseline', before, 3, 6.8, 7.5, true, true],
    ['new', now, 3, 6.8, 7.438647, true, false],
  ])('of the %s sweep', (_, samples, swr, lowMhz, highMhz, lowOpen, highOpen) => {
    const bandwidth = swrBandwidth(samples, swr) as { lowHz: number; highHz: number; widthHz: number }
    expect(bandwidth).toMatchObject({ lowOpen, highOpen })
    expectClose(bandwidth.lowHz / 1e6, lowMhz, 1e-6)
    expectClose(bandwidth.highHz / 1e6, highMhz, 1e-6)
    expectClose(bandwidth.widthHz / 1e6, highMhz - lowMhz)
  })

  it('is none when the minimum lies above, and one sample wide at the least', () => {
    expect(swrBandwidth(sweep(3, 2.01, 3), 2)).toBeNull()
    expect(swrBandwidth(sweep(3, 2, 3), 2)).toMatchObject({ lowHz: 7.1e6, highHz: 7.1e6, widthHz: 0 })
  })

  it('leaves the second dip out', () => {
    expect(swrBandwidth(sweep(5, 1.5, 5, 1.2, 5), 2)).toMatchObject({ lowOpen: false, highOpen: false })
    const bandwidth = swrBandwidth(sweep(5, 1.5, 5, 1.2, 5), 2) as { lowHz: number }
    expect(bandwidth.lowHz).toBeGreaterThan(7.2e6)
  })

  it('ends at the last sample beside a total reflection', () => {
    expect(swrBandwidth(sweep(Infinity, 1.5, Infinity), 2)).toMatchObject({ lowHz: 7.1e6, highHz: 7.1e6 })
  })

  it('refuses an SWR below 1', () => {
    expect(swrBandwidth(before, 0.9)).toMatchObject({ code: 'E_RANGE', field: 'swr' })
  })
})

describe('swrAt', () => {
  it('runs straight between samples', () => {
    expect(swrAt(sweep(1, 3), 7.05e6)).toBe(2)
    expect(swrAt(sweep(1, 3), 7e6)).toBe(1)
    expect(swrAt(sweep(1, 3), 7.1e6)).toBe(3)
    expect(swrAt(sweep(1, Infinity), 7.05e6)).toBe(Infinity)
    expect(swrAt(sweep(1, Infinity), 7e6)).toBe(1)
  })
})

describe('checkSweep', () => {
  it('wants two samples in rising order', () => {
    expect(checkSweep(sweep(1.5))).toMatchObject({ code: 'E_TOO_FEW' })
    expect(checkSweep(sweep(1.5, 2))).toBeUndefined()
    const same = [...sweep(1.5, 2), { frequencyHz: 7.1e6, swr: 2 }]
    expect(checkSweep(same)).toMatchObject({ code: 'E_GRID', line: 3 })
  })

  it('names the row of a bad frequency or SWR', () => {
    expect(checkSweep(sweep(1.5, 0.99))).toMatchObject({ code: 'E_RANGE', field: 'swr', line: 2 })
    expect(checkSweep([{ frequencyHz: 0, swr: 2 }, ...sweep(2)])).toMatchObject({ code: 'E_RANGE', line: 1 })
    expect(checkSweep(sweep(1.5, Number.NaN))).toMatchObject({ code: 'E_NUMBER', line: 2 })
  })

  it('answers any samples without throwing or NaN', () => {
    const swr = fc.oneof(fc.double(), fc.double({ min: 1, max: 100 }), fc.constant(Infinity))
    const samples = fc.array(swr, { maxLength: 12 }).map((swrs) => sweep(...swrs))
    fc.assert(
      fc.property(fc.oneof(samples, fc.anything() as fc.Arbitrary<SwrSample[]>), swr, (any, limit) => {
        expectNumbersReal([sweepMinimum(any), swrBandwidth(any, limit)], { infinity: true })
      }),
    )
  })

  it('keeps the minimum within every bandwidth', () => {
    const samples = fc.array(fc.double({ min: 1, max: 20, noNaN: true }), { minLength: 2, maxLength: 30 })
    fc.assert(
      fc.property(samples, fc.double({ min: 1, max: 20, noNaN: true }), (swrs, limit) => {
        const bandwidth = swrBandwidth(sweep(...swrs), limit) as { lowHz: number; highHz: number } | null
        const { frequencyHz, swr } = sweepMinimum(sweep(...swrs)) as SwrSample
        expect(bandwidth !== null).toBe(swr <= limit)
        if (!bandwidth) return
        expect(bandwidth.lowHz).toBeLessThanOrEqual(frequencyHz)
        expect(bandwidth.highHz).toBeGreaterThanOrEqual(frequencyHz)
      }),
    )
  })
})
