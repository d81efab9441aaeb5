/**
 * Output power by band at the highest setting that was tried, against a fraction of that setting; receiving is part
 * of the check. Source: the policy's limit; common practice, no source.
 */
import type { Outcome } from '../outcome.ts'
import type { TestFinding } from '../readiness/types.ts'
import type { Band } from '../vocabulary.ts'
import { expandedUncertainty, type Accuracy } from './accuracy.ts'
import { byBand } from './by-band.ts'
import { figure, findingOf, judgeAtLeast, judgementOf, percent, type Judgement } from './judgement.ts'
import { currentsOf, type CurrentInputs } from './radio-currents.ts'

export interface RadioReading {
  readonly band: Band
  readonly settingW: number
  readonly measuredW: number
  readonly currentA?: number | undefined
}

export interface RadioCheckInputs extends CurrentInputs {
  readonly readings: readonly RadioReading[]
  readonly receives: boolean
}

export interface RadioCheckLimits {
  readonly minPowerFraction: number
}

export function judgeRadioCheck(
  inputs: RadioCheckInputs,
  { minPowerFraction }: RadioCheckLimits,
  wattmeter: Accuracy | null,
): Outcome<Judgement> {
  const { readings, receives } = inputs
  const highest = byBand(readings).map(([, list]) => list.reduce((a, b) => (b.settingW > a.settingW ? b : a)))
  const findings = highest.map((reading) => powerFinding(reading, minPowerFraction, wattmeter))
  const deaf = findingOf({
    finding: 'fail',
    measure: 'receives',
    limit: 'receives',
    text: 'does not receive',
  })
  return judgementOf(
    { highest, receives, currents: currentsOf(inputs) },
    receives ? findings : [...findings, deaf],
  )
}

function powerFinding(
  { band, settingW, measuredW }: RadioReading,
  minFraction: number,
  meter: Accuracy | null,
): TestFinding {
  const uncertainty = expandedUncertainty(meter, measuredW)
  const minW = settingW * minFraction
  return findingOf({
    band,
    powerW: settingW,
    measure: 'watts',
    value: measuredW,
    uncertainty,
    finding: judgeAtLeast(measuredW, minW, uncertainty),
    limit: `${figure(minW, 1)} W: ${percent(minFraction)} of ${figure(settingW, 1)} W`,
    text: `${figure(measuredW, 1)} W of ${figure(settingW, 1)} W`,
  })
}
