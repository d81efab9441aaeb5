import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { magnitude, type Complex } from '#shared/engine/complex.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import {
  reflectionOfStrayOpen,
  sensitivities,
  type TerminationReadings,
} from '#shared/engine/terminations.ts'
import { threeTermination } from '#shared/engine/three-termination.ts'
import { efficiencyIntoLoad } from '#shared/engine/two-port-power.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { OTHER_LOADS, THREE_TERMINATIONS } from '../../support/transformer-sheet.ts'
import { valueOf } from '../../support/value-of.ts'

const LOAD_OHM = 2450
const setup = (mhz: number) => ({ frequencyHz: mhz * 1e6, loadOhm: LOAD_OHM })
const solved = (readings: TerminationReadings) => valueOf(threeTermination(readings, setup(7.1)))

function expectComplex(actual: Complex, wanted: Complex): void {
  expectClose(actual.re, wanted.re)
  expectClose(actual.im, wanted.im)
}

// Calculation sheet, section 4 (ngspice; recovery cross-checked with scikit-rf).
describe('threeTermination', () => {
  it.each(THREE_TERMINATIONS)('gives the figures of the sheet at $mhz MHz', (row) => {
    const found = valueOf(threeTermination(row.readings, setup(row.mhz)))
    expectComplex(found.s11, row.readings.load)
    expectComplex(found.s22, row.s22)
    expectComplex(found.p, row.p)
    expectClose(found.efficiency, row.efficiency)
    expectClose(found.efficiency, row.simulatedEfficiency)
    expectClose(found.lossDb, row.lossDb)
    expectClose(found.gMax, row.gMax)
    expectClose(found.intrinsicLossDb, row.intrinsicLossDb)
    expectClose(found.swr.load, row.swr.load)
    expectClose(found.swr.open, row.swr.open)
    expectClose(found.swr.short, row.swr.short)
    expectClose(found.openShortDistance, row.openShortDistance)
    expectClose(found.uEfficiency, row.uEfficiency)
    expect(found.warnings).toEqual([])
  })

  it.each(OTHER_LOADS)(
    'finds at %d MHz the efficiency into %d ohm',
    (mhz, ohm, gammaL, formula, simulated) => {
      expectClose((ohm - LOAD_OHM) / (ohm + LOAD_OHM), gammaL)
      const row = THREE_TERMINATIONS.find((each) => each.mhz === mhz)
      const twoPort = valueOf(threeTermination(row?.readings ?? noReadings, setup(mhz)))
      const { efficiency } = valueOf(efficiencyIntoLoad(twoPort, { re: ohm, im: 0 }, LOAD_OHM))
      expectClose(efficiency, formula)
      expectClose(efficiency, simulated)
    },
  )

  it('gives the same efficiency into the reference load by both formulas', () => {
    for (const row of THREE_TERMINATIONS) {
      const twoPort = solved(row.readings)
      expectClose(
        valueOf(efficiencyIntoLoad(twoPort, { re: LOAD_OHM, im: 0 }, LOAD_OHM)).efficiency,
        row.efficiency,
      )
    }
  })
})

/** What port 1 reads when the open carries 2 pF: the exact answer of the two-port found from the sheet. */
function withStrayOpen(readings: TerminationReadings, mhz: number): TerminationReadings {
  const { s11, s22, p } = solved(readings)
  const gamma = reflectionOfStrayOpen(mhz * 1e6, 2, LOAD_OHM)
  const loop = {
    re: 1 - (s22.re * gamma.re - s22.im * gamma.im),
    im: -(s22.re * gamma.im + s22.im * gamma.re),
  }
  const size = loop.re ** 2 + loop.im ** 2
  const through = { re: p.re * gamma.re - p.im * gamma.im, im: p.re * gamma.im + p.im * gamma.re }
  const open = {
    re: s11.re + (through.re * loop.re + through.im * loop.im) / size,
    im: s11.im + (through.im * loop.re - through.re * loop.im) / size,
  }
  return { ...readings, open }
}

describe('2 pF on the open only', () => {
  it.each(THREE_TERMINATIONS)('is corrected by the general solver at $mhz MHz', (row) => {
    const readings = withStrayOpen(row.readings, row.mhz)
    const found = valueOf(threeTermination(readings, { ...setup(row.mhz), openStrayPf: 2 }))
    expectClose(found.efficiency, row.stray.corrected)
    expectComplex(found.s22, row.s22)
  })

  it.each(THREE_TERMINATIONS.slice(0, 4))('ignored, changes the efficiency in silence at $mhz MHz', (row) => {
    const found = valueOf(threeTermination(withStrayOpen(row.readings, row.mhz), setup(row.mhz)))
    expectClose(found.efficiency, row.stray.ignored)
    expectClose(magnitude(found.s22), row.stray.s22Size, 1e-3)
  })

  it('ignored, gives an impossible efficiency at 28.4 MHz, which is refused', () => {
    const row = THREE_TERMINATIONS[4]
    expect(row.stray.ignored).toBeGreaterThan(1.02)
    expect(threeTermination(withStrayOpen(row.readings, row.mhz), setup(row.mhz))).toMatchObject({
      code: 'E_NOT_PHYSICAL',
      message: expect.stringContaining('open or short standard is not what it should be') as string,
    })
  })
})

const noReadings: TerminationReadings = {
  open: { re: 1, im: 0 },
  short: { re: -1, im: 0 },
  load: { re: 0, im: 0 },
}
const real = (open: number, short: number, load: number): TerminationReadings => ({
  open: { re: open, im: 0 },
  short: { re: short, im: 0 },
  load: { re: load, im: 0 },
})

describe('the limits', () => {
  it.each<[string, TerminationReadings, string]>([
    ['open and short that coincide', real(0.02, -0.029, 0), 'E_ILL_CONDITIONED'],
    ['a load that reads like the open', real(0.8, -0.8, 0.8), 'E_ILL_CONDITIONED'],
    ['a reflection above 1.05', real(1.06, -1, 0), 'E_ACTIVE'],
    ['an efficiency above 1.02', real(1.04, -1.04, 0), 'E_NOT_PHYSICAL'],
    ['a load that reflects everything', { ...real(0.5, -0.5, 0), load: { re: 0, im: 1 } }, 'E_NOT_PHYSICAL'],
    ['a reading that is no number', real(NaN, -1, 0), 'E_NUMBER'],
  ])('refuse %s', (_, readings, code) => {
    expect(threeTermination(readings, setup(7.1))).toMatchObject({ code })
  })

  it.each<[string, TerminationReadings, string[]]>([
    ['nothing for a lossless device', noReadings, []],
    ['W_CLAMPED for an efficiency just above 1', real(1.01, -1.01, 0), ['W_CLAMPED', 'W_GMAX_UNRESOLVED']],
    ['W_LOW_CONFIDENCE below 0.2', real(0.09, -0.09, 0), ['W_LOW_CONFIDENCE']],
    ['nothing more at 0.2', real(0.11, -0.11, 0), []],
  ])('warn of %s', (_, readings, wanted) => {
    expect(solved(readings).warnings.map((warning) => warning.code)).toEqual(wanted)
  })

  it('warn of an uncertainty above 0.03', () => {
    const coarse = valueOf(
      threeTermination(THREE_TERMINATIONS[0].readings, { ...setup(3.6), readingError: 0.04 }),
    )
    expect(coarse.uEfficiency).toBeGreaterThan(0.03)
    expect(coarse.warnings.map((warning) => warning.code)).toEqual(['W_UNCERTAIN'])
  })

  it('flag an efficiency that was cut at 1', () => {
    expect(solved(real(1.01, -1.01, 0))).toMatchObject({
      efficiency: 1,
      lossDb: 0,
      gMax: null,
      intrinsicLossDb: null,
    })
  })
})

describe('sensitivities', () => {
  it('are the derivatives of P', () => {
    const { readings } = THREE_TERMINATIONS[2]
    const found = valueOf(sensitivities(readings))
    const step = 1e-6
    for (const [name, derivative] of [
      ['open', found.dPdOpen],
      ['short', found.dPdShort],
      ['load', found.dPdLoad],
    ] as const) {
      const moved = (by: number) =>
        solved({ ...readings, [name]: { ...readings[name], re: readings[name].re + by } }).p
      expectClose((moved(step).re - moved(-step).re) / (2 * step), derivative.re)
      expectClose((moved(step).im - moved(-step).im) / (2 * step), derivative.im)
    }
    expectClose(found.s22Growth, 2.4 / 1.57721)
  })

  it('refuse open and short that coincide', () => {
    expect(sensitivities(real(0.5, 0.5, 0))).toMatchObject({ code: 'E_ILL_CONDITIONED' })
  })
})

describe('any three readings', () => {
  const part = fc.double({ min: -1.1, max: 1.1, noNaN: true })
  const complex = fc.record({ re: part, im: part })
  const readings = fc.record({ open: complex, short: complex, load: complex })

  it('give an efficiency of at most 1, flagged where it was cut, or a failure', () => {
    fc.assert(
      fc.property(readings, fc.double({ min: 0, max: 20, noNaN: true }), (readings, openStrayPf) => {
        const found = threeTermination(readings, { ...setup(14.2), openStrayPf })
        if (isFailure(found)) return
        expectNumbersReal({ ...found, swr: null })
        expect(found.efficiency).toBeGreaterThan(0)
        expect(found.efficiency).toBeLessThanOrEqual(1)
        if (found.gMax !== null) expect(found.gMax).toBeLessThanOrEqual(1)
        const other = efficiencyIntoLoad(found, { re: 1200, im: -300 }, LOAD_OHM)
        if (!isFailure(other)) expect(other.efficiency).toBeLessThanOrEqual(1)
      }),
      { numRuns: 2000 },
    )
  })

  it('throw nothing and give no NaN, whatever they are', () => {
    const any = fc.record({ re: fc.double(), im: fc.double() })
    fc.assert(
      fc.property(any, any, any, fc.double(), fc.double(), (open, short, load, a, b) => {
        const found = threeTermination({ open, short, load }, { frequencyHz: a, loadOhm: b, openStrayPf: a })
        expectNumbersReal(found, { infinity: true })
        expectNumbersReal(efficiencyIntoLoad({ s11: open, s22: short, p: load }, { re: a, im: b }, 2450))
      }),
    )
  })

  it('are known better with a better analyzer', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 4 }),
        fc.double({ min: 0.0005, max: 0.02, noNaN: true }),
        (at, error) => {
          const row = THREE_TERMINATIONS[at] ?? THREE_TERMINATIONS[0]
          const coarse = valueOf(threeTermination(row.readings, { ...setup(row.mhz), readingError: error }))
          const fine = valueOf(threeTermination(row.readings, { ...setup(row.mhz), readingError: error / 2 }))
          expect(fine.uEfficiency).toBeLessThan(coarse.uEfficiency)
          expect(fine.uLossDb).toBeLessThan(coarse.uLossDb)
        },
      ),
    )
  })
})
