import { DEFAULT_DEPTHS, presentAh, type BatteryShare } from '../battery-energy.ts'
import { DEFAULT_PEUKERT } from '../battery-runtime.ts'
import { isFailure } from '../outcome.ts'
import type { Chemistry } from '../vocabulary.ts'
import type { PlainDate } from '../plain-date.ts'
import { batteryText } from './endurance-words.ts'
import { temperatureFactor } from './temperature-factor.ts'
import type { PolicySettings, ReadinessItem } from './types.ts'

/** A battery whose capacity test stands. */
export interface CountedBattery {
  readonly name: string
  /** Continuous current that it is rated for, A; null: not on record. */
  readonly maxA: number | null
  readonly share: BatteryShare
  /** Peukert exponent; 1 for all but lead-acid. */
  readonly k: number
  /** Ah at its rated current. */
  readonly usableAh: number
  readonly factor: string
}

export const DEFAULT_ENDURANCE_C = 20
/** A share above this is a slip of the meter; the sum counts less of it anyway. */
const MOST_MEASURED = 1.3
const LEAD_ACID: readonly Chemistry[] = ['agm', 'gel', 'flooded']

/** Undefined where its rated capacity is not on record, or where no table says what is left in such cold. */
export function countBattery(
  { designation, facts }: ReadinessItem,
  measured: { readonly fraction: number; readonly on: PlainDate },
  settings: PolicySettings,
): CountedBattery | undefined {
  const { ratedAh } = facts
  // An unknown chemistry counts as lead-acid: the smaller promise is the honest one.
  const chemistry = (facts.chemistry ?? 'agm') as Chemistry
  const atC = settings.enduranceC ?? DEFAULT_ENDURANCE_C
  const cold = coldFactor(chemistry, atC, settings)
  if (!ratedAh || cold === undefined) return undefined
  const depth = settings.usableFraction?.[chemistry] ?? DEFAULT_DEPTHS[chemistry] ?? DEFAULT_DEPTHS.agm
  const capacityFraction = Math.min(measured.fraction, MOST_MEASURED)
  const share = { ratedAh, capacityFraction, depth, temperatureFactor: cold }
  const k = LEAD_ACID.includes(chemistry) ? (settings.peukert ?? DEFAULT_PEUKERT) : 1
  const factor = batteryText(designation, share, { atC, testedOn: measured.on })
  return { name: designation, maxA: facts.maxA ?? null, share, k, usableAh: depth * presentAh(share), factor }
}

function coldFactor(chemistry: Chemistry, atC: number, settings: PolicySettings): number | undefined {
  if (settings.temperatureFactor !== undefined) return settings.temperatureFactor
  if (chemistry === 'nimh') return 1
  const factor = temperatureFactor(chemistry, atC)
  return isFailure(factor) ? undefined : factor
}
