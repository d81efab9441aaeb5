import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { HeatLog } from '#shared/engine/heat-log.ts'
import { projectHeat } from '#shared/engine/heat-projection.ts'
import { logOf, SET_A, SET_D } from '../../support/heat-sets.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'

const upTo = (log: HeatLog, count: number): HeatLog => ({ ...log, readings: log.readings.slice(0, count) })

describe('projectHeat', () => {
  it('waits for two readings, and for a rise', () => {
    expect(projectHeat(upTo(SET_A, 0), 85)).toEqual({ state: 'waiting' })
    expect(projectHeat(upTo(SET_A, 1), 85)).toEqual({ state: 'waiting' })
    expect(projectHeat(logOf(20, 10, [20, 20]), 85)).toEqual({ state: 'no-rise' })
  })

  it('says at once when a reading meets the limit', () => {
    expect(projectHeat(logOf(20, 10, [85]), 85)).toEqual({ state: 'at-limit' })
    expect(projectHeat(logOf(20, 10, [20, 84.9]), 85)).toMatchObject({ state: 'slope' })
  })

  it('names the soonest time to the limit while only the slope is known', () => {
    const projection = projectHeat(SET_D, 85) as { soonestS: number }
    expect(projection).toMatchObject({ state: 'slope', fit: { identifiable: false } })
    expectClose(projection.soonestS, (85 - 29.7) / (6.7 / 60))
  })

  it('projects the end of set A with its range, below a limit it never meets', () => {
    const projection = projectHeat(SET_A, 85) as { endC: number; endLowC: number; endHighC: number }
    expect(projection).toMatchObject({ state: 'curve', toLimitS: null, soonestS: null, latestS: null })
    expectClose(projection.endC, 21.5 + 57.9798)
    expect(projection.endHighC - projection.endLowC).toBeGreaterThan(0.5)
    expect(projection.endHighC - projection.endLowC).toBeLessThan(1.5)
  })

  it('projects the time to a limit', () => {
    // 20 C + 60 K (1 - exp(-t/300)) meets 75 C at 745.47 s; the tenth reading is at 540 s.
    const temperatures = Array.from({ length: 10 }, (_, i) => 20 - 60 * Math.expm1(-i / 5))
    const projection = projectHeat({ ...logOf(20, 60, temperatures), thermometerStepK: 0.1 }, 75)
    if (!('state' in projection) || projection.state !== 'curve') return expect.fail('no curve')
    expectClose(projection.toLimitS, 205.47)
    expect(projection.soonestS).toBeLessThan(205)
    expect(projection.latestS).toBeGreaterThan(206)
  })

  it('keeps the estimate within its range', () => {
    const noise = fc.array(fc.double({ min: -0.2, max: 0.2, noNaN: true }), { minLength: 8, maxLength: 16 })
    const limit = fc.double({ min: 30, max: 120, noNaN: true })
    fc.assert(
      fc.property(noise, limit, (noises, limitC) => {
        const log = logOf(
          20,
          60,
          noises.map((n, i) => 20 - 60 * Math.expm1(-i / 5) + n),
        )
        const projection = projectHeat(log, limitC)
        expectNumbersReal(projection)
        if (!('state' in projection) || projection.state !== 'curve') return
        expect(projection.endLowC).toBeLessThanOrEqual(projection.endC)
        expect(projection.endHighC).toBeGreaterThanOrEqual(projection.endC)
        const [soonest, to, latest] = [projection.soonestS, projection.toLimitS, projection.latestS]
        expect(soonest ?? Infinity).toBeLessThanOrEqual(to ?? Infinity)
        expect(latest ?? Infinity).toBeGreaterThanOrEqual(to ?? Infinity)
      }),
    )
  })

  it('passes on the failures of a log that cannot be read', () => {
    expect(projectHeat(logOf(20, 60, [20, 400]), 85)).toMatchObject({ code: 'E_RANGE', line: 2 })
    expect(projectHeat(SET_A, Number.NaN)).toMatchObject({ code: 'E_NUMBER', field: 'limitC' })
  })
})
