import { describe, expect, it } from 'vitest'
import { heatCurve } from '#shared/engine/heat-curve.ts'
import { fitHeatLog, type HeatCurveFit } from '#shared/engine/heat-fit.ts'
import { isFailure, type Outcome } from '#shared/engine/outcome.ts'
import { SET_A, SET_B, SET_C, SET_D } from '../../support/heat-sets.ts'

type Points = NonNullable<Exclude<ReturnType<typeof heatCurve>, { code: string }>>

function pointsOf(curve: Outcome<unknown>): Points {
  if (isFailure(curve) || curve === null) throw new Error('No curve.')
  return curve as Points
}

describe('heatCurve', () => {
  // Calculation sheet, section 6, sets A and C: T = T0 + A (1 - exp(-t/tau)).
  it.each([
    ['A', SET_A, { startC: 21.5, riseK: 57.9798, tauS: 308.243 }],
    ['C', SET_C, { startC: 28.0333, riseK: 39.1611, tauS: 404.884 }],
  ] as const)(
    'follows the fit of set %s, from key-down to the end asked for',
    (_, log, { startC, riseK, tauS }) => {
      const points = pointsOf(heatCurve(log, 1800))
      expect([points[0]!.atS, points.at(-1)!.atS]).toEqual([0, 1800])
      for (const { atS, bestC } of points)
        expect(bestC).toBeCloseTo(startC + riseK * (1 - Math.exp(-atS / tauS)), 2)
    },
  )

  it('holds every point inside its interval, which grows beyond the log', () => {
    const points = pointsOf(heatCurve(SET_A, 3600))
    for (const { bestC, lowC, highC } of points) {
      expect(lowC).toBeLessThanOrEqual(bestC)
      expect(highC).toBeGreaterThanOrEqual(bestC)
    }
    const width = (index: number) => points[index]!.highC - points[index]!.lowC
    expect(width(48)).toBeGreaterThan(width(12))
  })

  it('ends in the interval that the fit gives for the end temperature', () => {
    const fit = fitHeatLog(SET_A) as HeatCurveFit
    const last = pointsOf(heatCurve(SET_A, 100_000)).at(-1)!
    expect(last.lowC).toBeCloseTo(21.5 + fit.steadyRiseLowK, 6)
    expect(last.highC).toBeCloseTo(21.5 + fit.steadyRiseHighK, 6)
  })

  it('is none where the log does not carry one', () => {
    expect(heatCurve(SET_B, 600)).toBeNull()
    expect(heatCurve(SET_D, 600)).toBeNull()
  })

  it('refuses an end that is no time, and what is no log', () => {
    expect(heatCurve(SET_A, 0)).toMatchObject({ code: 'E_RANGE', field: 'untilS' })
    expect(heatCurve(SET_A, NaN)).toMatchObject({ code: 'E_NUMBER' })
    expect(heatCurve({ readings: [], ambientC: 20 }, 600)).toMatchObject({ code: 'E_TOO_FEW' })
  })
})
