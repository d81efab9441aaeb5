import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fitHeatLog, type HeatCurveFit, type HeatFit } from '#shared/engine/heat-fit.ts'
import type { HeatLog } from '#shared/engine/heat-log.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { BOXBOD, logOf, MISRA1A, SET_A, SET_B, SET_C, SET_D } from '../../support/heat-sets.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

const codes = (fit: unknown) => (fit as HeatFit).warnings.map((warning) => warning.code)

describe('fitHeatLog', () => {
  // Calculation sheet, section 6.
  it('gives set A a time constant and an end temperature', () => {
    const fit = fitHeatLog(SET_A) as HeatCurveFit
    expect(fit).toMatchObject({
      identifiable: true,
      start: 'ambient',
      readings: 16,
      spanS: 900,
      warnings: [],
    })
    expectClose(fit.steadyRiseK, 57.9798)
    expectClose(fit.tauLowS, 301.885)
    expectClose(fit.tauHighS, 314.781)
    expectClose(fit.initialSlopeKPerS, 0.188098)
  })

  it('gives set C, begun warm, a rise above ambient', () => {
    const fit = fitHeatLog(SET_C) as HeatCurveFit
    expect(fit).toMatchObject({ identifiable: true, start: 'warm' })
    expectClose(fit.steadyRiseK, 28.0333 + 39.1611 - 21.5)
    expectClose(fit.tauS, 404.884)
  })

  it('withholds tau and end temperature from set B: the interval is wider than tau', () => {
    const fit = fitHeatLog(SET_B)
    expect(fit).toMatchObject({ identifiable: false, because: ['interval-too-wide'] })
    expect(fit).not.toHaveProperty('tauS')
    expect(fit).not.toHaveProperty('steadyRiseK')
  })

  it('gives set D its slope only: a straight line fits as well', () => {
    const fit = fitHeatLog(SET_D)
    expect(fit).toMatchObject({ identifiable: false, because: ['straight-line-fits', 'no-upper-end'] })
    // The larger of the line through ambient, 0.111099, and 6.7 K over 60 s.
    expectClose((fit as { slopeKPerS: number }).slopeKPerS, 6.7 / 60)
  })

  // NIST Statistical Reference Datasets.
  it('marks Misra1a as extrapolated and refuses BoxBOD', () => {
    const misra = fitHeatLog(MISRA1A)
    expectClose((misra as HeatCurveFit).tauS, 1817.66)
    expect(codes(misra)).toEqual(['W_EXTRAPOLATED'])
    expect(fitHeatLog(BOXBOD)).toMatchObject({ identifiable: false, because: ['interval-too-wide'] })
  })

  // Two minutes of full carrier: common practice, no source.
  it('claims no end temperature from two points', () => {
    const fit = fitHeatLog(logOf(24.4, 120, [(76 - 32) / 1.8, (115 - 32) / 1.8]))
    expect(fit).toMatchObject({ identifiable: false, because: ['too-few-readings'] })
    expectClose((fit as { slopeKPerS: number }).slopeKPerS, 21.6667 / 120, 1e-2)
    for (const key of ['tauS', 'steadyRiseK', 'steadyRiseHighK', 'riseK']) expect(fit).not.toHaveProperty(key)
  })

  it('wants three readings more than unknowns', () => {
    const curve = (count: number) => Array.from({ length: count }, (_, i) => 20 - 50 * Math.expm1(-i / 2))
    expect(fitHeatLog(logOf(20, 60, curve(4)))).toMatchObject({ because: ['too-few-readings'] })
    expect(fitHeatLog(logOf(20, 60, curve(5)))).toMatchObject({ identifiable: true })
    expect(fitHeatLog({ ...logOf(20, 60, curve(5)), start: 'warm' })).toMatchObject({
      because: ['too-few-readings'],
    })
    expect(fitHeatLog({ ...logOf(20, 60, curve(6)), start: 'warm' })).toMatchObject({ identifiable: true })
  })

  it('refuses a log that falls, stays level or stays below ambient', () => {
    for (const temperatures of [
      [40, 38, 36, 35, 34, 33],
      [20, 20, 20, 20, 20, 20],
      [18.5, 18.6, 18.7, 18.8, 18.9, 19],
    ])
      expect(fitHeatLog(logOf(20, 60, temperatures))).toMatchObject({ code: 'E_NO_RISE', field: 'readings' })
    expect(fitHeatLog(logOf(-5e-323, 60, [0, 0, 0]))).toMatchObject({ code: 'E_NO_RISE' })
  })

  it('does not judge the slope on 30 s', () => {
    expect(codes(fitHeatLog(logOf(20, 10, [20, 22, 24, 26])))).toEqual(['W_SURFACE_LAG'])
    expect(codes(fitHeatLog(logOf(20, 10, [20, 22, 24, 26, 28])))).toEqual([])
  })

  it('fits the keyed readings alone', () => {
    const cooling = [60, 45, 38].map((temperatureC, i) => ({ atS: 960 + 60 * i, temperatureC }))
    const log: HeatLog = { ...SET_A, readings: [...SET_A.readings, ...cooling], keyUpAtS: 900 }
    expect(fitHeatLog(log)).toEqual(fitHeatLog(SET_A))
  })

  it('keeps every interval around its estimate', () => {
    const curves = fc.record({
      ambientC: fc.double({ min: -20, max: 40, noNaN: true }),
      riseK: fc.double({ min: 5, max: 90, noNaN: true }),
      tauS: fc.double({ min: 60, max: 2000, noNaN: true }),
      warmK: fc.constantFrom(0, 10),
      noise: fc.array(fc.double({ min: -0.3, max: 0.3, noNaN: true }), { minLength: 8, maxLength: 20 }),
    })
    fc.assert(
      fc.property(curves, ({ ambientC, riseK, tauS, warmK, noise }) => {
        const curve = noise.map((n, i) => ambientC + warmK - riseK * Math.expm1((-i * 60) / tauS) + n)
        const fit = fitHeatLog({ ...logOf(ambientC, 60, curve), thermometerStepK: 0.1 })
        if (isFailure(fit) || !fit.identifiable) return
        expect(fit.tauLowS).toBeLessThanOrEqual(fit.tauS)
        expect(fit.tauHighS).toBeGreaterThanOrEqual(fit.tauS)
        expect(fit.steadyRiseLowK).toBeLessThanOrEqual(fit.steadyRiseK)
        expect(fit.steadyRiseHighK).toBeGreaterThanOrEqual(fit.steadyRiseK)
        expectNumbersReal(fit)
      }),
    )
  })

  it('answers any readings without throwing, NaN or Infinity', () => {
    const number = fc.oneof(fc.double(), fc.double({ min: -60, max: 320, noNaN: true }), fc.integer())
    const readings = fc.array(fc.record({ atS: number, temperatureC: number }), { maxLength: 12 })
    const ordered = readings.map((rows) => rows.map((row, i) => ({ ...row, atS: i * 7 })))
    const step = fc.option(number, { nil: undefined })
    fc.assert(
      fc.property(fc.oneof(readings, ordered), number, step, (rows, ambientC, thermometerStepK) => {
        const log = {
          readings: rows,
          ambientC,
          ...(thermometerStepK === undefined ? {} : { thermometerStepK }),
        }
        expectNumbersReal(fitHeatLog(log))
      }),
      { numRuns: 300 },
    )
    fc.assert(
      fc.property(fc.anything(), fc.anything(), (rows, ambientC) => {
        expectNumbersReal(fitHeatLog({ readings: rows, ambientC } as HeatLog))
      }),
    )
  })
})
