import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  swrOfSweep,
  sweepOfSwr,
  type ReflectionPoint,
  type ReflectionSweep,
} from '#shared/engine/reflection-sweep.ts'
import { sweepDrift, type DriftBand, type SweepDrift } from '#shared/engine/sweep-drift.ts'
import type { SwrSample } from '#shared/engine/swr-sweep.ts'
import { BASELINE, NEW_SWEEP, seriesAntenna } from '../../support/series-antenna.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { readVectors } from '../../support/vectors.ts'

const FORTY = { lowHz: 7e6, highHz: 7.3e6 }

interface Summary {
  samples: number
  lowestSwr: number
  lowestAtMhz: number
  worstSwr: number
  worstAtMhz: number
}
interface Vector {
  baseline: [number, number, number][]
  next: [number, number, number][]
  lowestShiftMhz: number
  lowestSwrChange: number
  bands: {
    lowMhz: number
    highMhz: number
    before: Summary
    now: Summary
    largestSwrChange: number
    rmsMagnitudeChange: number
  }[]
}

const sweepOf = (points: [number, number, number][]): ReflectionSweep => ({
  referenceOhm: 50,
  points: points.map(([f, re, im]) => ({ frequencyHz: Math.round(f * 1e6), gamma: { re, im } })),
})

describe('sweepDrift', () => {
  // Calculation sheet, section 7 (scikit-rf).
  it('of the two sweeps of the sheet', () => {
    const drift = sweepDrift(BASELINE, NEW_SWEEP, [FORTY]) as SweepDrift<DriftBand>
    expect(drift.lowestShiftHz).toBe(-50_000)
    expectClose(drift.lowestSwrChange, -0.0556927)
    expectClose(drift.bands[0]?.largestSwrChange, 0.429772)
    expectClose(drift.bands[0]?.rmsMagnitudeChange, 0.100789)
    expect(drift.warnings).toEqual([])
  })

  // Calculation sheet, section 7: SWR at 6.80, 7.10 and 7.50 MHz.
  it.each([
    ['baseline', BASELINE, 2.53904, 1.12815, 2.83738],
    ['new', NEW_SWEEP, 1.9489, 1.22814, 3.457],
  ])('starts from the SWR of the %s sweep', (_, sweep, low, middle, high) => {
    const samples = swrOfSweep(sweep) as SwrSample[]
    expectClose(samples[0]?.swr, low)
    expectClose(samples[6]?.swr, middle)
    expectClose(samples[14]?.swr, high)
  })

  it.each(readVectors<Vector[]>('sweep-drift').map((vector, number) => ({ number, ...vector })))(
    'agrees with scikit-rf on pair $number, on different grids',
    (vector) => {
      const bands = vector.bands.map(({ lowMhz, highMhz }) => ({
        lowHz: lowMhz * 1e6,
        highHz: highMhz * 1e6,
      }))
      const drift = sweepDrift(sweepOf(vector.baseline), sweepOf(vector.next), bands) as SweepDrift<DriftBand>
      expectClose(drift.lowestShiftHz / 1e6, vector.lowestShiftMhz)
      expectClose(drift.lowestSwrChange, vector.lowestSwrChange)
      vector.bands.forEach((expected, i) => {
        const band = drift.bands[i]
        for (const when of ['before', 'now'] as const) {
          expect(band?.[when]).toMatchObject({ coverage: 'full', samples: expected[when].samples })
          expectClose(band?.[when].figures?.lowestSwr, expected[when].lowestSwr)
          expectClose((band?.[when].figures?.lowestAtHz ?? 0) / 1e6, expected[when].lowestAtMhz)
          expectClose(band?.[when].figures?.worstSwr, expected[when].worstSwr)
          expectClose((band?.[when].figures?.worstAtHz ?? 0) / 1e6, expected[when].worstAtMhz)
        }
        expectClose(band?.largestSwrChange, expected.largestSwrChange)
        expectClose(band?.rmsMagnitudeChange, expected.rmsMagnitudeChange)
      })
    },
  )

  it('is nothing against itself', () => {
    expect(sweepDrift(BASELINE, BASELINE, [FORTY])).toMatchObject({
      lowestShiftHz: 0,
      lowestSwrChange: 0,
      bands: [{ largestSwrChange: 0, rmsMagnitudeChange: 0 }],
      warnings: [],
    })
  })

  it('hardly sees a feedline of another length', () => {
    const turned = BASELINE.points.map(({ frequencyHz, gamma }): ReflectionPoint => {
      const [c, s] = [Math.cos(frequencyHz * 1e-7), Math.sin(frequencyHz * 1e-7)]
      return { frequencyHz, gamma: { re: gamma.re * c - gamma.im * s, im: gamma.re * s + gamma.im * c } }
    })
    const drift = sweepDrift(BASELINE, { referenceOhm: 50, points: turned }, [FORTY]) as SweepDrift<DriftBand>
    expectClose(drift.bands[0]?.rmsMagnitudeChange, 0)
  })

  it('refuses other references and sweeps that do not overlap', () => {
    expect(sweepDrift(BASELINE, { ...NEW_SWEEP, referenceOhm: 75 }, [])).toMatchObject({
      code: 'E_REFERENCE',
    })
    const far = NEW_SWEEP.points.map((point) => ({ ...point, frequencyHz: point.frequencyHz * 2 }))
    expect(sweepDrift(BASELINE, { referenceOhm: 50, points: far }, [])).toMatchObject({ code: 'E_GRID' })
    expect(sweepDrift(BASELINE, { referenceOhm: 50, points: [] }, [])).toMatchObject({ code: 'E_TOO_FEW' })
  })

  it('refuses a reflection beyond 1.05 with its row', () => {
    const points = BASELINE.points.with(3, { frequencyHz: 6.95e6, gamma: { re: 1.06, im: 0 } })
    expect(sweepDrift(BASELINE, { referenceOhm: 50, points }, [])).toMatchObject({
      code: 'E_ACTIVE',
      line: 4,
    })
  })
})

describe('W_LINE_LOSS', () => {
  const bands = [
    { lowHz: 6.8e6, highHz: 7.0e6 },
    { lowHz: 7.3e6, highHz: 7.5e6 },
  ]
  const lossier = (low: number, high: number): ReflectionSweep => ({
    referenceOhm: 50,
    points: BASELINE.points.map(({ frequencyHz, gamma }) => {
      const factor = frequencyHz > 7.15e6 ? high : low
      return { frequencyHz, gamma: { re: gamma.re * factor, im: gamma.im * factor } }
    }),
  })
  const codes = (next: ReflectionSweep, on = bands) =>
    (sweepDrift(BASELINE, next, on) as SweepDrift<DriftBand>).warnings.map((warning) => warning.code)

  it('is raised when every band is better and the top band most', () => {
    expect(codes(lossier(0.9, 0.7))).toEqual(['W_LINE_LOSS'])
    expect(codes(lossier(0.9, 0.7), bands.toReversed())).toEqual(['W_LINE_LOSS'])
  })

  it('is not raised when a lower band improved more, one did not improve, or there is one band', () => {
    expect(codes(lossier(0.7, 0.95))).toEqual([])
    expect(codes(lossier(1, 0.7))).toEqual([])
    expect(codes(lossier(0.9, 0.7), bands.slice(0, 1))).toEqual([])
  })
})

describe('sweepOfSwr', () => {
  it('gives hand-entered SWR back', () => {
    const samples = swrOfSweep(BASELINE) as SwrSample[]
    const again = swrOfSweep(sweepOfSwr(samples) as ReflectionSweep) as SwrSample[]
    again.forEach((sample, i) => expectClose(sample.swr, samples[i]?.swr ?? 0))
  })

  it('takes a total reflection', () => {
    const samples = [2, Infinity].map((swr, i) => ({ frequencyHz: 7e6 + i, swr }))
    expect(swrOfSweep(sweepOfSwr(samples) as ReflectionSweep)).toMatchObject([{}, { swr: Infinity }])
  })
})

describe('drift figures', () => {
  it('answer any sweep without throwing or NaN', () => {
    const part = fc.oneof(fc.double({ min: -1, max: 1 }), fc.double())
    const gammas = fc.array(fc.record({ re: part, im: part }), { maxLength: 15 })
    const sweeps = gammas.map((list) => ({
      referenceOhm: 50,
      points: list.map((gamma, i) => ({ frequencyHz: 6.8e6 + i * 5e4, gamma })),
    }))
    const any = fc.oneof(sweeps, fc.anything() as fc.Arbitrary<ReflectionSweep>)
    fc.assert(
      fc.property(any, any, (a, b) => {
        expectNumbersReal(sweepDrift(a, b, [FORTY]), { infinity: true })
        expectNumbersReal(sweepDrift(seriesAntenna(40, 9, 7), b, [FORTY]), { infinity: true })
      }),
      { numRuns: 300 },
    )
  })
})
