import { describe, expect, it } from 'vitest'
import { riseData } from '#shared/engine/heat-fit.ts'
import type { HeatLog } from '#shared/engine/heat-log.ts'
import { fitRise, type RiseFit } from '#shared/engine/rise-fit.ts'
import { riseModel } from '#shared/engine/rise-model.ts'
import { crossingOf, crossingRange, endRange, profileCurves } from '#shared/engine/rise-profile.ts'
import { BOXBOD, MISRA1A, SET_A, SET_B, SET_C, SET_D } from '../../support/heat-sets.ts'
import { expectClose } from '../../support/sheet-close.ts'
import { readVectors } from '../../support/vectors.ts'

const FIGURES = ['startC', 'riseK', 'tauS', 'sse', 'riseSeK', 'tauSeS', 'criticalF'] as const
type Figure =
  | (typeof FIGURES)[number]
  | 'tauLowS'
  | 'tauHighS'
  | 'endLowC'
  | 'endHighC'
  | 'limitC'
  | 'meetsS'
  | 'soonestS'
interface Vector {
  timesS: number[]
  temperaturesC: number[]
  fixedStartC: number | null
  fit: Record<Figure, number> & { latestS: number | null }
}
const vectors = readVectors<{ fits: Vector[] }>('heat-fit')

const fitOf = (log: HeatLog) => fitRise(riseData(log), 0) as RiseFit

/** Calculation sheet, section 6: relative 1e-3 on parameters, 1e-2 on interval ends. */
const SHEET = [
  {
    ...{ set: 'A', log: SET_A, n: 16, p: 2, t0: 21.5, a: 57.9798, tau: 308.243, seA: 0.21657, seTau: 3.0176 },
    ...{ rmse: 0.2641, low: 301.885, high: 314.781, f: 19655.5, critical: 4.6001, slope: 0.1881 },
  },
  {
    ...{ set: 'B', log: SET_B, n: 11, p: 2, t0: 21.5, a: 58.5662, tau: 317.437, seA: 10.119, seTau: 65.943 },
    ...{ rmse: 0.41793, low: 214.348, high: 590.988, f: 24.8513, critical: 5.1174, slope: 0.1845 },
  },
  {
    ...{
      set: 'C',
      log: SET_C,
      n: 13,
      p: 3,
      t0: 28.0333,
      a: 39.1611,
      tau: 404.884,
      seA: 0.21457,
      seTau: 6.3448,
    },
    ...{ rmse: 0.21012, low: 391.062, high: 419.515, f: 5013.29, critical: 4.9646, slope: 0.096722 },
  },
]

describe('fitRise', () => {
  it.each(SHEET)(
    'fits set $set',
    ({ log, n, p, t0, a, tau, seA, seTau, rmse, low, high, f, critical, slope }) => {
      const fit = fitOf(log)
      expect([log.readings.length, fit.unknowns, fit.degrees]).toEqual([n, p, n - p])
      expectClose(fit.startC, t0)
      expectClose(fit.riseK, a)
      expectClose(fit.tauS, tau)
      expectClose(fit.riseSeK, seA)
      expectClose(fit.tauSeS, seTau)
      expectClose(fit.rmseK, rmse)
      expectClose(fit.tauLowS, low)
      expectClose(fit.tauHighS, high)
      expectClose(fit.lineF, f)
      expectClose(fit.criticalF, critical)
      expectClose(fit.riseK / fit.tauS, slope, 3e-4)
    },
  )

  it('finds no upper end of tau in the straight set D', () => {
    const fit = fitOf(SET_D)
    expectClose(fit.lineF, 0.1597, 3e-4)
    expectClose(fit.criticalF, 6.6079)
    expectClose(fit.tauLowS, 153, 1e-2)
    expect(fit.tauHighS).toBe(Infinity)
    expectClose(riseModel(riseData(SET_D)).line.slopeKPerS, 0.111099)
  })

  // NIST Statistical Reference Datasets, certified values.
  it('meets the certified values of NIST Misra1a', () => {
    const fit = fitOf(MISRA1A)
    expectClose(fit.riseK, 238.94212918, 1e-7)
    expectClose(1 / fit.tauS, 5.5015643181e-4, 1e-7)
    expectClose(fit.tauS, 1817.66)
    expectClose(fit.riseSeK, 2.7070075, 1e-6)
    expectClose(fit.sse, 0.12455138894, 1e-9)
  })

  it('meets the certified values of NIST BoxBOD', () => {
    const fit = fitOf(BOXBOD)
    expectClose(fit.riseK, 213.80940889, 1e-7)
    expectClose(fit.riseSeK, 12.354515, 1e-6)
    expectClose(1 / fit.tauS, 0.54723748542, 1e-7)
    expectClose(fit.sse, 1168.0088766, 1e-9)
    expectClose(fit.tauLowS, 0.9319)
    expectClose(fit.tauHighS, 3.3048)
  })

  it.each(vectors.fits.map((vector, number) => ({ number, ...vector })))(
    'agrees with scipy on log $number',
    ({ timesS, temperaturesC, fixedStartC, fit: expected }) => {
      const data = { timesS, temperaturesC, ...(fixedStartC === null ? {} : { fixedStartC }) }
      const fit = fitRise(data, 0) as RiseFit
      for (const key of FIGURES) expectClose(fit[key], expected[key], 1e-5)
      expectClose(fit.tauLowS, expected.tauLowS, 1e-5)
      expectClose(fit.tauHighS, expected.tauHighS, 1e-5)
      const end = endRange(profileCurves(data, fit), fit)
      expectClose(end.lowC - fit.startC, expected.endLowC - expected.startC, 2e-4)
      expectClose(end.highC - fit.startC, expected.endHighC - expected.startC, 2e-4)
      const at = { limitC: expected.limitC, fromS: timesS.at(-1) ?? 0 }
      expectClose(crossingOf(fit, at), expected.meetsS, 1e-5)
      const range = crossingRange(profileCurves(data, fit), fit, at)
      expectClose(range.soonestS, expected.soonestS, 1e-3)
      if (expected.latestS === null) expect(range.latestS).toBe(Infinity)
      else expectClose(range.latestS, expected.latestS, 1e-3)
    },
  )

  it('widens the variance to that of the thermometer step, and keeps an interval without noise', () => {
    const coarse = fitRise(riseData(SET_A), 2) as RiseFit
    expectClose(coarse.variance, 4 / 12)
    expect(coarse.tauHighS).toBeGreaterThan(fitOf(SET_A).tauHighS)
    const timesS = [0, 100, 200, 300, 400, 500]
    const temperaturesC = timesS.map((t) => 20 + 40 * -Math.expm1(-t / 250))
    const exact = fitRise({ timesS, temperaturesC, fixedStartC: 20 }, 0) as RiseFit
    expectClose(exact.tauS, 250, 1e-6)
    expect(exact.tauLowS).toBeLessThanOrEqual(exact.tauS)
    expect(exact.tauHighS).toBeGreaterThanOrEqual(exact.tauS)
  })

  it('needs more readings than unknowns', () => {
    expect(fitRise({ timesS: [0, 60], temperaturesC: [20, 30], fixedStartC: 20 }, 0)).toBeUndefined()
    expect(fitRise({ timesS: [0, 60, 120], temperaturesC: [20, 30, 35] }, 0)).toBeUndefined()
  })
})
