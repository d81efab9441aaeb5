import { describe, expect, it } from 'vitest'
import { checkHeatLog, keyedReadings, startsAtAmbient, twoPointRise } from '#shared/engine/heat-log.ts'
import { kelvinFromFahrenheitDifference } from '#shared/engine/units.ts'
import { logOf, SET_A } from '../../support/heat-sets.ts'
import { expectClose } from '../../support/sheet-close.ts'

describe('twoPointRise', () => {
  // Calculation sheet, section 6, set A.
  it('reports the rise and its rate per minute', () => {
    const rise = twoPointRise(SET_A) as { riseK: number; rateKPerMin: number }
    expectClose(rise.riseK, 54.8)
    expectClose(rise.rateKPerMin, 3.65333)
    expect(rise).toMatchObject({ fromS: 0, toS: 900 })
  })

  // Two minutes of full carrier, 76 F to 115 F and 76 F to 91 F: common practice, no source.
  it.each([
    [115, 21.67],
    [91, 8.33],
  ])('reads 76 F to %i F as a rise of %f K', (endF, riseK) => {
    const log = logOf(24, 120, [(76 - 32) / 1.8, (endF - 32) / 1.8])
    expectClose((twoPointRise(log) as { riseK: number }).riseK, riseK, 5e-4)
    expectClose(kelvinFromFahrenheitDifference(endF - 76), riseK, 5e-4)
  })

  it('reports a fall as it was read', () => {
    expect(twoPointRise(logOf(20, 60, [30, 27]))).toMatchObject({ riseK: -3, rateKPerMin: -3 })
  })

  it('leaves the cooling readings out', () => {
    const log = { ...logOf(20, 60, [20, 40, 35]), keyUpAtS: 60 }
    expect(twoPointRise(log)).toMatchObject({ riseK: 20, toS: 60 })
    expect(keyedReadings(log)).toHaveLength(2)
  })
})

describe('checkHeatLog', () => {
  it('wants two readings while keyed', () => {
    expect(checkHeatLog(logOf(20, 60, [20]))).toMatchObject({ code: 'E_TOO_FEW' })
    expect(checkHeatLog(logOf(20, 60, []))).toMatchObject({ code: 'E_TOO_FEW' })
    expect(checkHeatLog({ ...logOf(20, 60, [20, 30, 40]), keyUpAtS: 59 })).toMatchObject({
      code: 'E_TOO_FEW',
    })
    expect(checkHeatLog({ ...logOf(20, 60, [20, 30, 40]), keyUpAtS: 60 })).toBeUndefined()
  })

  it('names the row whose time does not increase', () => {
    const readings = [0, 60, 60].map((atS) => ({ atS, temperatureC: 20 }))
    expect(checkHeatLog({ ambientC: 20, readings })).toMatchObject({ code: 'E_TIME_ORDER', line: 3 })
  })

  it('names the row whose temperature is out of range or no number', () => {
    expect(checkHeatLog(logOf(20, 60, [-40, 300]))).toBeUndefined()
    expect(checkHeatLog(logOf(20, 60, [20, 300.1]))).toMatchObject({ code: 'E_RANGE', line: 2 })
    expect(checkHeatLog(logOf(20, 60, [-40.1, 20]))).toMatchObject({ code: 'E_RANGE', line: 1 })
    expect(checkHeatLog(logOf(20, 60, [20, Number.NaN]))).toMatchObject({ code: 'E_NUMBER', line: 2 })
    expect(checkHeatLog(logOf(Infinity, 60, [20, 30]))).toMatchObject({ code: 'E_NUMBER', field: 'ambientC' })
  })

  it('takes a log for a cold start up to 2 K from ambient, unless it is told', () => {
    expect(startsAtAmbient(logOf(20, 60, [22, 30]))).toBe(true)
    expect(startsAtAmbient(logOf(20, 60, [22.1, 30]))).toBe(false)
    expect(startsAtAmbient(logOf(20, 60, [17.9, 30]))).toBe(false)
    expect(startsAtAmbient({ ...logOf(20, 60, [40, 50]), start: 'ambient' })).toBe(true)
  })
})
