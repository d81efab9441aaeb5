import { DEFAULT_DEPTHS, presentAh, type BatteryShare } from '../battery-energy.ts'
import { DEFAULT_PEUKERT, leadAcidRuntime } from '../battery-runtime.ts'
import { isFailure } from '../outcome.ts'
import type { Chemistry } from '../vocabulary.ts'
import { batteryText } from './sentences.ts'
import { temperatureFactor } from './temperature-factor.ts'
import type { PolicySettings, ReadinessItem } from './types.ts'

/** A battery whose capacity test stands. */
export interface CountedBattery {
  readonly share: BatteryShare
  /** Peukert exponent; 1 for all but lead-acid. */
  readonly k: number
  /** Ah at its rated current. */
  readonly usableAh: number
  readonly factor: string
}

const DEFAULT_ENDURANCE_C = 20
/** A share above this is a slip of the meter; the sum counts less of it anyway. */
const MOST_MEASURED = 1.3
const LEAD_ACID: readonly Chemistry[] = ['agm', 'gel', 'flooded']

/** Undefined where its rated capacity is not on record, or where no table says what is left in such cold. */
export function countBattery(
  { designation, facts }: ReadinessItem,
  capacityFraction: number,
  settings: PolicySettings,
): CountedBattery | undefined {
  const { ratedAh } = facts
  // An unknown chemistry counts as lead-acid: the smaller promise is the honest one.
  const chemistry = (facts.chemistry ?? 'agm') as Chemistry
  const atC = settings.enduranceC ?? DEFAULT_ENDURANCE_C
  const cold = coldFactor(chemistry, atC, settings)
  if (!ratedAh || cold === undefined) return undefined
  const depth = settings.usableFraction?.[chemistry] ?? DEFAULT_DEPTHS[chemistry] ?? DEFAULT_DEPTHS.agm
  const measured = Math.min(capacityFraction, MOST_MEASURED)
  const share = { ratedAh, capacityFraction: measured, depth, temperatureFactor: cold }
  const k = LEAD_ACID.includes(chemistry) ? (settings.peukert ?? DEFAULT_PEUKERT) : 1
  return { share, k, usableAh: depth * presentAh(share), factor: batteryText(designation, share, atC) }
}

function coldFactor(chemistry: Chemistry, atC: number, settings: PolicySettings): number | undefined {
  if (settings.temperatureFactor !== undefined) return settings.temperatureFactor
  if (chemistry === 'nimh') return 1
  const factor = temperatureFactor(chemistry, atC)
  return isFailure(factor) ? undefined : factor
}

/** Hours at a mean load, A. Batteries side by side share the load as their capacities; lead-acid pays for its speed. */
export function hoursAt(batteries: readonly CountedBattery[], loadA: number): number {
  const bankAh = batteries.reduce((sum, { share }) => sum + presentAh(share), 0)
  const givenAh = batteries.map((battery) => {
    if (battery.k === 1 || battery.usableAh === 0) return battery.usableAh
    const currentA = (loadA * presentAh(battery.share)) / bankAh
    const runtime = leadAcidRuntime({ ...battery.share, k: battery.k }, [{ share: 1, currentA }])
    return isFailure(runtime) ? 0 : runtime.hours * currentA
  })
  return givenAh.reduce((sum, ah) => sum + ah, 0) / loadA
}
