/**
 * Measured capacity as a fraction of the rated one, as measured and referred to 25 deg C; the second is judged, since
 * a cold room must not fail a sound battery. A voltage is never evidence of capacity. Source: calculation sheet,
 * section 10; the 80 % rule is IEEE 1188-2005 and 450-2002 clause 8, written for stationary batteries.
 */
import { failure, isFailure, type Outcome, type Warning } from '../outcome.ts'
import { temperatureFactor } from '../readiness/temperature-factor.ts'
import type { Chemistry } from '../vocabulary.ts'
import { expandedUncertainty, type Accuracy } from './accuracy.ts'
import {
  figure,
  findingOf,
  judgeAtLeast,
  judgementOf,
  percent,
  shareText,
  type Judgement,
} from './judgement.ts'

export interface BatteryCapacityInputs {
  /** Ah taken out down to the cut-off; or else current times hours. */
  readonly measuredAh?: number | undefined
  readonly currentA?: number | undefined
  readonly hours?: number | undefined
  readonly cutOffV: number
  readonly temperatureC: number
  readonly restingV?: number | undefined
}

export interface BatteryCapacityLimits {
  readonly minCapacityFraction: number
}

export interface BatteryFacts {
  readonly ratedAh?: number
  readonly chemistry?: Chemistry
}

interface Known {
  readonly limits: BatteryCapacityLimits
  readonly facts: BatteryFacts
  readonly tester: Accuracy | null
}

/** Lead-acid is rated at 20 h; drawn faster than in this time, it shows less and must not be compared. Our choice. */
const FAST_LEAD_ACID_H = 5

/** `E_MISSING` without a rated capacity or a measured one, `E_RANGE` when too cold to say. */
export function judgeBatteryCapacity(inputs: BatteryCapacityInputs, known: Known): Outcome<Judgement> {
  const { ratedAh, chemistry } = known.facts
  if (ratedAh === undefined)
    return failure('E_MISSING', "Enter the battery's rated capacity on its page first.", { field: 'ratedAh' })
  const measuredAh = ampereHours(inputs)
  if (isFailure(measuredAh)) return measuredAh
  const factor = capacityFactor(chemistry, inputs.temperatureC)
  if (isFailure(factor)) return factor
  const referredAh = measuredAh / factor
  const fraction = referredAh / ratedAh
  const { minCapacityFraction } = known.limits
  const ah = expandedUncertainty(known.tester, measuredAh)
  const uncertainty = ah === null ? null : ah / factor / ratedAh
  const finding = findingOf({
    measure: 'capacityFraction',
    value: fraction,
    uncertainty,
    finding: judgeAtLeast(fraction, minCapacityFraction, uncertainty),
    limit: `${percent(minCapacityFraction)} of ${figure(ratedAh, 1)} Ah at 25 °C`,
    text: capacityText(shareText(fraction, minCapacityFraction, 1), {
      measuredAh,
      temperatureC: inputs.temperatureC,
      factor,
    }),
  })
  const results = { measuredAh, referredAh, fraction, measuredFraction: measuredAh / ratedAh, factor }
  return judgementOf(results, [finding], fastDischarge(measuredAh, inputs, chemistry))
}

/** Only where a table says how temperature acts; else the figure stands as measured. */
function capacityFactor(chemistry: Chemistry | undefined, temperatureC: number): Outcome<number> {
  if (chemistry === undefined || chemistry === 'nimh') return 1
  const factor = temperatureFactor(chemistry, temperatureC)
  if (!isFailure(factor)) return factor
  const message = `${figure(temperatureC, 1)} °C is too cold to say: test nearer to 25 °C.`
  return failure('E_RANGE', message, { field: 'temperatureC' })
}

function ampereHours({ measuredAh, currentA, hours }: BatteryCapacityInputs): Outcome<number> {
  if (measuredAh !== undefined) return measuredAh
  if (currentA !== undefined && hours !== undefined) return currentA * hours
  const message = 'Enter the ampere-hours taken out, or the current and how long it ran.'
  return failure('E_MISSING', `A voltage says nothing about capacity. ${message}`, { field: 'measuredAh' })
}

function capacityText(
  held: string,
  { measuredAh, temperatureC, factor }: { measuredAh: number; temperatureC: number; factor: number },
): string {
  const measured = `${figure(measuredAh, 1)} Ah at ${figure(temperatureC, 0)} °C`
  const share = `${held} of its rating`
  return factor === 1 ? `${share}: ${measured}` : `${share} referred to 25 °C: ${measured}`
}

function fastDischarge(
  measuredAh: number,
  inputs: BatteryCapacityInputs,
  chemistry: Chemistry | undefined,
): Warning[] {
  const isLeadAcid = chemistry === 'agm' || chemistry === 'gel' || chemistry === 'flooded'
  const hours = inputs.hours ?? (inputs.currentA === undefined ? undefined : measuredAh / inputs.currentA)
  if (!isLeadAcid || hours === undefined || hours >= FAST_LEAD_ACID_H) return []
  const message =
    `Drawn in ${figure(hours, 1)} h: a lead-acid battery shows less at such a current than over 20 h. ` +
    'Compare it only with tests at the same current.'
  return [{ code: 'W_HIGH_RATE', message }]
}
