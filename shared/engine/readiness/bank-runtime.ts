import { presentAh } from '../battery-energy.ts'
import { leadAcidRuntime } from '../battery-runtime.ts'
import { equivalentCurrentA, meanCurrentA, type LoadShare } from '../load-profile.ts'
import { isFailure } from '../outcome.ts'
import type { CountedBattery } from './counted-battery.ts'
import { equivalentText, HIGH_RATE, overCurrentText } from './endurance-words.ts'

/** How long batteries side by side carry a load, and what is to be said of it. */
export interface BankRuntime {
  readonly hours: number
  /** What lead-acid makes of the load, a sentence each. */
  readonly factors: readonly string[]
}

/**
 * Batteries side by side share the load as their capacities. Lithium gives what it holds; lead-acid pays for its speed
 * by the equivalent current of the profile, never by its mean (calculation sheet, section 10).
 */
export function bankRuntime(
  batteries: readonly CountedBattery[],
  profile: readonly LoadShare[],
): BankRuntime {
  const meanA = meanCurrentA(profile)
  if (isFailure(meanA)) return { hours: 0, factors: [] }
  const bankAh = batteries.reduce((sum, { share }) => sum + presentAh(share), 0)
  const factors = new Set<string>()
  const givenAh = batteries.map((battery) => {
    if (battery.k === 1 || battery.usableAh === 0) return battery.usableAh
    const part = presentAh(battery.share) / bankAh
    const own = profile.map(({ share, currentA }) => ({ share, currentA: currentA * part }))
    const runtime = leadAcidRuntime({ ...battery.share, k: battery.k }, own)
    if (isFailure(runtime)) return 0
    factors.add(equivalentOf(profile, battery.k))
    if (runtime.warnings.length > 0) factors.add(HIGH_RATE)
    return runtime.hours * meanA * part
  })
  return { hours: givenAh.reduce((sum, ah) => sum + ah, 0) / meanA, factors: [...factors] }
}

function equivalentOf(profile: readonly LoadShare[], exponent: number): string {
  const currentA = equivalentCurrentA(profile, exponent)
  return isFailure(currentA) ? '' : equivalentText(currentA, exponent)
}

/** A pack cuts off above the current it is rated for; undefined: it does not, or a rating is not on record. */
export function cutOffText(
  batteries: readonly CountedBattery[],
  profile: readonly LoadShare[],
): string | undefined {
  const ratings = batteries.flatMap(({ maxA }) => maxA ?? [])
  if (ratings.length === 0 || ratings.length < batteries.length) return undefined
  const carriesA = ratings.reduce((sum, amps) => sum + amps, 0)
  const drawnA = profile.reduce((most, { currentA }) => Math.max(most, currentA), 0)
  return drawnA > carriesA
    ? overCurrentText(
        batteries.map(({ name }) => name),
        drawnA,
        carriesA,
      )
    : undefined
}
