/** What a heat test says beyond pass and fail, with the readings of the calculation sheet, section 6. */
import { describe, expect, it } from 'vitest'
import { judgeHeatTest, type HeatTestInputs } from '#shared/engine/procedures/heat-test.ts'
import { valueOf } from '../../../support/value-of.ts'

const SET_A = [21.7, 31.8, 39.9, 46.7, 52.7, 57.8, 61.7, 64.8, 67.3, 69.8, 71.5, 72.5, 73.5, 74.7, 75.5, 76.5]

const run = (temperaturesC: readonly number[], stepS: number): HeatTestInputs => ({
  band: '20 m',
  powerW: 100,
  ambientC: 21.5,
  readings: temperaturesC.map((temperatureC, n) => ({ atS: n * stepS, temperatureC })),
  keyUpAtS: (temperaturesC.length - 1) * stepS,
  stoppedAtLimit: false,
})
const LIMITS = { powerW: 100, minutes: 10, maxC: 85 }
const FACTS = {
  efficiency: { '20 m': { efficiency: 0.83, testId: 'pair' } },
  coreMassG: 117.6,
  ratedWatts: 100,
} as const
const judged = (inputs: HeatTestInputs, facts: object, limits = LIMITS) =>
  valueOf(judgeHeatTest(inputs, limits, { thermometer: { resolution: 0.1 }, facts }))

describe('the model of a heat test', () => {
  it('keeps the fitted curve with its interval', () => {
    const { results } = judged(run(SET_A, 60), {})
    expect(results.fit).toMatchObject({ identifiable: true, start: 'ambient' })
    const { tauS, tauLowS, tauHighS } = results.fit as Record<string, number>
    expect(tauS).toBeCloseTo(308.243, 1)
    expect(tauLowS).toBeCloseTo(301.885, 0)
    expect(tauHighS).toBeCloseTo(314.781, 0)
    expect([results.resistance, results.balance, results.allowance]).toEqual([
      undefined,
      undefined,
      undefined,
    ])
  })

  it('gives the thermal resistance and checks heat against the loss test in force', () => {
    const { results } = judged(run(SET_A, 60), FACTS)
    expect((results.resistance as { kPerW: number }).kPerW).toBeCloseTo(3.41058, 3)
    expect((results.balance as { ratio: number }).ratio).toBeCloseTo(0.9759, 3)
    expect(results.efficiencyUsed).toEqual({ efficiency: 0.83, testId: 'pair' })
  })

  it('says in a sentence what each mode allows, beside the judged limit', () => {
    const { sentence, modes } = judged(run(SET_A, 60), FACTS).results.allowance as {
      sentence: string
      modes: { mode: string; withoutBreakW: number }[]
    }
    // (85 - 35) / (3.41058 x 0.17) = 86.2369 W (sheet, section 6).
    expect(modes[1]?.withoutBreakW).toBeCloseTo(86.2369, 1)
    expect(sentence).toMatch(
      /^On a day of 35 °C, to get no hotter than 85 °C: voice at 100 W without a break; digital at 86 W without a break, or full power for \d+\.\d min at a time\.$/,
    )
  })

  it('says that a log is too short rather than guess', () => {
    const { results } = judged(run([23, 24.1, 25.4, 26.2, 27.6, 28.4, 29.7], 10), FACTS, {
      ...LIMITS,
      minutes: 1,
    })
    expect(results.fit).toMatchObject({ identifiable: false })
    expect((results.fit as { says: string }).says).toMatch(/^This log is too short to say where/)
    expect([results.resistance, results.allowance]).toEqual([undefined, undefined])
  })

  it('calls it a disagreement when the core does not get the heat that RF loses', () => {
    const { warnings } = judged(run(SET_A, 60), { ...FACTS, coreMassG: 30 })
    expect(warnings.map(({ code }) => code)).toContain('W_HEAT_RF_DISAGREE')
  })
})
