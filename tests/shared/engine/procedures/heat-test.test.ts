import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { judgeHeatTest, type HeatTestInputs } from '#shared/engine/procedures/heat-test.ts'
import { valueOf } from '../../../support/value-of.ts'

const LIMITS = { powerW: 50, minutes: 10, maxC: 85, maxSwrChange: 0.2 }
const NOTHING_KNOWN = { thermometer: null, facts: {} }

function run(endC: number, fields: Partial<HeatTestInputs> = {}): HeatTestInputs {
  const minutes = [0, 1, 2, 3, 5, 8, 10]
  return {
    band: '10 m',
    powerW: 50,
    ambientC: 22,
    readings: minutes.map((minute) => ({ atS: minute * 60, temperatureC: 22 + ((endC - 22) * minute) / 10 })),
    keyUpAtS: 600,
    stoppedAtLimit: false,
    ...fields,
  }
}

const judge = (inputs: HeatTestInputs, thermometer = {}) =>
  valueOf(judgeHeatTest(inputs, LIMITS, { thermometer, facts: {} }))

describe('a heat test', () => {
  it('passes below the stop temperature for the whole time', () => {
    const { finding, findings, results } = judge(run(84.9))
    expect(finding).toBe('pass')
    expect(findings).toEqual([
      {
        band: '10 m',
        powerW: 50,
        measure: 'peakC',
        value: 84.9,
        uncertainty: null,
        positionId: null,
        finding: 'pass',
        limit: 'below 85 °C for 10 min at 50 W',
        text: '84.9 °C after 10 min at 50 W',
      },
    ])
    expect(results).toMatchObject({ riseK: expect.closeTo(62.9, 6), rateKPerMin: expect.closeTo(6.29, 6) })
    expect(results).not.toHaveProperty('tauS')
  })

  it('fails at the stop temperature, with the minute of the first reading there', () => {
    const inputs = run(60, {
      readings: [
        { atS: 0, temperatureC: 22 },
        { atS: 480, temperatureC: 84 },
        { atS: 492, temperatureC: 85 },
        { atS: 792, temperatureC: 70 },
      ],
      keyUpAtS: 492,
      stoppedAtLimit: true,
    })
    expect(judge(inputs).findings[0]).toMatchObject({
      finding: 'fail',
      value: 85,
      text: 'reached 85 °C after 8.2 min at 50 W',
    })
  })

  it('takes the moment of key-up for the stop when no reading caught it', () => {
    const inputs = run(40, { keyUpAtS: 480, stoppedAtLimit: true })
    expect(judge(inputs).results).toMatchObject({ stoppedAtMinute: 8 })
    expect(judge(inputs).finding).toBe('fail')
  })

  it('does not count a peak that came after key-up', () => {
    const late = [...run(80).readings, { atS: 660, temperatureC: 86 }]
    const judged = judge(run(80, { readings: late }))
    expect(judged.finding).toBe('pass')
    expect(judged.results).toMatchObject({ peakC: 86, keyedPeakC: 80 })
  })

  it('fails when the SWR moved by more than the limit, however cool', () => {
    const at = judge(run(40, { swr: { start: 1.2, lowest: 1.2, highest: 1.4 } }))
    expect(at.finding).toBe('pass')
    const over = judge(run(40, { swr: { start: 1.5, lowest: 1.29, highest: 1.5 } }))
    expect(over.findings[0]).toMatchObject({
      finding: 'fail',
      measure: 'swrChange',
      band: '10 m',
      powerW: 50,
    })
  })

  it('counts a failure before its time, and refuses a run that shows nothing', () => {
    const short = run(40, { keyUpAtS: 300, readings: run(40).readings.filter(({ atS }) => atS <= 300) })
    expect(judge({ ...short, swr: { start: 1.2, lowest: 1.2, highest: 2 } }).finding).toBe('fail')
    const refused = judgeHeatTest(short, LIMITS, NOTHING_KNOWN)
    expect(isFailure(refused) && refused).toMatchObject({ code: 'E_TOO_SHORT', field: 'keyUpAtS' })
  })

  it('forgives five seconds of a hand on the key', () => {
    expect(judge(run(40, { keyUpAtS: 595, readings: run(40).readings.slice(0, -1) })).finding).toBe('pass')
    expect(isFailure(judgeHeatTest(run(40, { keyUpAtS: 594 }), LIMITS, NOTHING_KNOWN))).toBe(true)
  })

  it('shows at a lower power what the device can do there', () => {
    expect(judge(run(52, { powerW: 20 })).findings[0]).toMatchObject({ finding: 'pass', powerW: 20 })
  })

  it('is marginal where the limit lies within the uncertainty of the thermometer', () => {
    expect(judge(run(84), { accuracyAbsolute: 2 }).finding).toBe('marginal')
    expect(judge(run(82), { accuracyAbsolute: 2 }).finding).toBe('pass')
  })

  it('answers the fault of a log that cannot be read', () => {
    const backwards = run(40, {
      readings: [
        { atS: 60, temperatureC: 22 },
        { atS: 60, temperatureC: 23 },
      ],
    })
    expect(judgeHeatTest(backwards, LIMITS, NOTHING_KNOWN)).toMatchObject({ code: 'E_TIME_ORDER', line: 2 })
  })
})
