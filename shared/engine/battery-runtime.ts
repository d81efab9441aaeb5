/**
 * How long a battery carries a load profile. Lead-acid by Peukert (1897) with the equivalent current of the
 * profile, never its mean, which flatters; lithium by the mean current.
 * Source: Peukert, common practice; equivalent current derived in the calculation sheet, section 10.
 */
import { checkBatteryShare, presentAh, type BatteryShare } from './battery-energy.ts'
import { checkPositive, finiteResult } from './check-range.ts'
import { equivalentCurrentA, meanCurrentA, type LoadShare } from './load-profile.ts'
import { checkNumber, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'

export interface Runtime {
  readonly hours: number
  /** The current the hours follow from: the mean, or the equivalent one of lead-acid. A. */
  readonly currentA: number
  readonly warnings: readonly Warning[]
}

/** Peukert exponent of sealed lead-acid; 1.1 to 1.3 are seen. */
export const DEFAULT_PEUKERT = 1.15
/** Hour rate of a lead-acid label that names none. */
export const DEFAULT_HOUR_RATE_H = 20

export interface PeukertRating {
  /** Hour rate of the rating, above 0 to 1000 h. */
  readonly hourRateH?: number
  /** 1 to 1.5. */
  readonly k?: number
}

/** `H (C / (I H))^k`, h, of a full battery. Capacity above 0 to 100,000 Ah, current above 0 to 10,000 A. */
export function peukertHours(
  battery: PeukertRating & { ratedAh: number; currentA: number },
): Outcome<number> {
  const { ratedAh, currentA, hourRateH = DEFAULT_HOUR_RATE_H, k = DEFAULT_PEUKERT } = battery
  const bad =
    checkPositive('ratedAh', ratedAh, 100_000) ??
    checkPositive('currentA', currentA, 10_000) ??
    checkRating({ hourRateH, k })
  return bad ?? finiteResult(hourRateH * (ratedAh / (currentA * hourRateH)) ** k)
}

/**
 * Lead-acid on a profile: `DoD H (C' / (I_eq H))^k`, C' = C fm fT inside the power, the depth outside it. Below
 * the rated current C'/H no bonus: `DoD C' / I_eq`. `E_SHARES`, `E_RANGE`; `W_HIGH_RATE` above a current of C'.
 */
export function leadAcidRuntime(
  battery: BatteryShare & PeukertRating,
  profile: readonly LoadShare[],
): Outcome<Runtime> {
  const { depth, hourRateH = DEFAULT_HOUR_RATE_H, k = DEFAULT_PEUKERT } = battery
  const bad = checkBatteryShare(battery) ?? checkRating({ hourRateH, k })
  if (bad) return bad
  const currentA = equivalentCurrentA(profile, k)
  if (isFailure(currentA)) return currentA
  const capacityAh = presentAh(battery)
  const slow = currentA <= capacityAh / hourRateH
  const fullH = slow ? capacityAh / currentA : hourRateH * (capacityAh / (currentA * hourRateH)) ** k
  const hours = finiteResult(depth * fullH)
  if (isFailure(hours)) return hours
  const warnings = currentA > capacityAh ? [highRate(currentA, capacityAh)] : []
  return { hours, currentA, warnings }
}

/**
 * Lithium (and nickel) on a profile: `C fm DoD fT / mean current`. `W_OVER_CURRENT` when any current exceeds
 * the pack's rated continuous one, at which it cuts off. `E_SHARES`, `E_RANGE`.
 */
export function lithiumRuntime(
  battery: BatteryShare & { continuousA?: number },
  profile: readonly LoadShare[],
): Outcome<Runtime> {
  const { continuousA } = battery
  const bad =
    checkBatteryShare(battery) ??
    (continuousA === undefined ? undefined : checkPositive('continuousA', continuousA, 10_000))
  if (bad) return bad
  const currentA = meanCurrentA(profile)
  if (isFailure(currentA)) return currentA
  const hours = finiteResult((battery.depth * presentAh(battery)) / currentA)
  if (isFailure(hours)) return hours
  const mostA = profile.reduce((most, load) => Math.max(most, load.currentA), 0)
  const warnings = mostA > (continuousA ?? Infinity) ? [overCurrent(mostA, continuousA ?? 0)] : []
  return { hours, currentA, warnings }
}

function checkRating({ hourRateH, k }: Required<PeukertRating>): Failure | undefined {
  return checkPositive('hourRateH', hourRateH, 1000) ?? checkNumber('k', k, 1, 1.5)
}

function highRate(currentA: number, capacityAh: number): Warning {
  const message = `${currentA.toPrecision(3)} A from ${capacityAh.toPrecision(3)} Ah empties it within the hour.`
  return { code: 'W_HIGH_RATE', message: `${message} The estimate is poor there.` }
}

function overCurrent(mostA: number, continuousA: number): Warning {
  const message = `${mostA} A exceeds the pack's continuous ${continuousA} A: it may cut off at once.`
  return { code: 'W_OVER_CURRENT', message }
}
