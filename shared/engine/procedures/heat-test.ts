/**
 * Key-down heat test against the rule: one band and one power a test. It passes when the key was down for the
 * required minutes below the stop temperature and the SWR moved no more than the limit. A test at less than the
 * rule's watts that passes shows what the device can do at that power, which is what caps a band whose test failed.
 * Source: calculation sheet, section 6; the limits are the policy's.
 */
import { measureHeatTest, type HeatTestInput } from '../heat-test.ts'
import { failure, isFailure, type Outcome } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { Band } from '../vocabulary.ts'
import { expandedUncertainty, type Accuracy } from './accuracy.ts'
import { heatModel, type HeatFacts } from './heat-model.ts'
import { figure, findingOf, judgementOf, type Judgement } from './judgement.ts'

export interface HeatTestInputs {
  readonly band: Band
  /** Carrier at the device's input, W. */
  readonly powerW: number
  readonly ambientC: number
  /** Seconds since key-down. */
  readonly readings: readonly { readonly atS: number; readonly temperatureC: number }[]
  readonly keyUpAtS: number
  readonly stoppedAtLimit: boolean
  readonly swr?: { readonly start: number; readonly lowest: number; readonly highest: number } | undefined
}

export interface HeatTestLimits {
  readonly powerW: number
  readonly minutes: number
  readonly maxC: number
  readonly maxSwrChange?: number
}

interface Known {
  readonly thermometer: Accuracy | null
  readonly facts: HeatFacts
}

/** A hand on the key and an eye on the clock: this much short of the required time still counts. Our choice. */
const SHORT_BY_S = 5

/**
 * Errors of the heat log; `E_TOO_SHORT` when the key came up early with nothing against the device: that shows
 * neither that it passes nor that it fails.
 */
export function judgeHeatTest(
  inputs: HeatTestInputs,
  limits: HeatTestLimits,
  { thermometer, facts }: Known,
): Outcome<Judgement> {
  const { ambientC, powerW } = inputs
  const inForce = facts.efficiency?.[inputs.band]
  const measured = measureHeatTest(heatLogOf(inputs, { thermometer, facts }))
  if (isFailure(measured)) return measured
  const keyed = keyedFigures(inputs, limits)
  const uncertainty = expandedUncertainty(thermometer, keyed.peakC)
  const finding = stopFinding(keyed, { inputs, limits, uncertainty })
  if (finding === null)
    return failure(
      'E_TOO_SHORT',
      `The key was down for ${figure(keyed.minutes, 1)} min of ${figure(limits.minutes, 1)}: run the test again, ` +
        'or say that it was stopped at the limit.',
      { field: 'keyUpAtS' },
    )
  const { riseK, rateKPerMin } = measured.twoPoint
  const results = {
    peakC: measured.peakC,
    keyedPeakC: keyed.peakC,
    riseK,
    rateKPerMin,
    keyedMinutes: keyed.minutes,
    stoppedAtMinute: keyed.stoppedAtMinute,
    swrChange: keyed.swrChange,
    ...heatModel({
      measured,
      inForce,
      ambientC,
      maxC: limits.maxC,
      fullW: facts.ratedWatts ?? powerW,
    }),
  }
  return judgementOf(results, [finding], measured.warnings)
}

function heatLogOf(inputs: HeatTestInputs, { thermometer, facts }: Known): HeatTestInput {
  const { readings, ambientC, keyUpAtS, powerW } = inputs
  const efficiency = facts.efficiency?.[inputs.band]?.efficiency
  return {
    readings,
    ambientC,
    keyUpAtS,
    inputW: powerW,
    ...(efficiency !== undefined && { efficiency }),
    ...(facts.coreMassG !== undefined && { massKg: facts.coreMassG / 1000 }),
    ...(thermometer?.resolution !== undefined && { thermometerStepK: thermometer.resolution }),
  }
}

interface KeyedFigures {
  readonly peakC: number
  readonly minutes: number
  /** Minute of the stop at the limit temperature; null when it was not reached. */
  readonly stoppedAtMinute: number | null
  /** Largest departure from the SWR at key-down; null when nobody watched. */
  readonly swrChange: number | null
}

function keyedFigures({ readings, keyUpAtS, stoppedAtLimit, swr }: HeatTestInputs, { maxC }: HeatTestLimits) {
  const keyed = readings.filter((reading) => reading.atS <= keyUpAtS)
  const reached = keyed.find((reading) => reading.temperatureC >= maxC)
  const stopS = reached?.atS ?? (stoppedAtLimit ? keyUpAtS : null)
  return {
    peakC: Math.max(...keyed.map((reading) => reading.temperatureC)),
    minutes: keyUpAtS / 60,
    stoppedAtMinute: stopS === null ? null : stopS / 60,
    swrChange: swr ? Math.max(swr.highest - swr.start, swr.start - swr.lowest) : null,
  }
}

interface Judged {
  readonly inputs: HeatTestInputs
  readonly limits: HeatTestLimits
  readonly uncertainty: number | null
}

function stopFinding(keyed: KeyedFigures, judged: Judged): TestFinding | null {
  const { band, powerW } = judged.inputs
  const { minutes, maxC, maxSwrChange } = judged.limits
  const watts = `${figure(powerW, 1)} W`
  const heat = {
    band,
    powerW,
    measure: 'peakC',
    value: keyed.peakC,
    uncertainty: judged.uncertainty,
    limit: `below ${figure(maxC, 1)} °C for ${figure(minutes, 1)} min at ${watts}`,
  }
  if (keyed.stoppedAtMinute !== null) {
    const text = `reached ${figure(maxC, 1)} °C after ${figure(keyed.stoppedAtMinute, 1)} min at ${watts}`
    return findingOf({ ...heat, finding: 'fail', text })
  }
  if (maxSwrChange !== undefined && keyed.swrChange !== null && isOver(keyed.swrChange, maxSwrChange)) {
    return findingOf({
      ...heat,
      measure: 'swrChange',
      value: keyed.swrChange,
      uncertainty: null,
      finding: 'fail',
      limit: `SWR moves by ${figure(maxSwrChange, 2)} at most`,
      text: `SWR moved by ${figure(keyed.swrChange, 2)} at ${watts}`,
    })
  }
  if (judged.inputs.keyUpAtS < minutes * 60 - SHORT_BY_S) return null
  const near = judged.uncertainty !== null && maxC - keyed.peakC < judged.uncertainty
  const text = `${figure(keyed.peakC, 1)} °C after ${figure(keyed.minutes, 1)} min at ${watts}`
  return findingOf({ ...heat, finding: near ? 'marginal' : 'pass', text })
}

/** SWR is read to a tenth or a hundredth: a difference that is the limit but for binary fractions is at the limit. */
const isOver = (value: number, limit: number) => value - limit > 1e-9
