/**
 * Usable energy of a battery and its share that counts. Depths are our choice; the 80 % rule is IEEE 1188-2005
 * and IEEE 450-2002 clause 8, written for stationary batteries, applied to kits by our choice.
 * Source: calculation sheet, section 10.
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkNumber, type Failure, type Outcome } from './outcome.ts'
import type { Chemistry } from './vocabulary.ts'

/** Share of the capacity that may be taken; lithium-ion and nickel packs as lithium iron phosphate. Our choice. */
export const DEFAULT_DEPTHS: Readonly<Record<Chemistry, number>> = {
  lifepo4: 0.8,
  'lithium-ion': 0.8,
  nimh: 0.8,
  agm: 0.5,
  gel: 0.5,
  flooded: 0.5,
}

/** A new battery may measure above its rating; the sum counts no more than this. */
export const MOST_CAPACITY_FRACTION = 1.1

/** Measured as a fraction of rated, 0 to 1.3. */
export interface BatteryShare {
  /** Above 0, to 100,000 Ah, at its hour rate and 25 deg C. */
  readonly ratedAh: number
  readonly capacityFraction: number
  /** Share that may be taken, above 0 to 1. */
  readonly depth: number
  /** Share there is at the temperature, above 0 to 1, see `readiness/temperature-factor.ts`. */
  readonly temperatureFactor: number
}

/** `E_MISSING`, `E_NUMBER`, `E_RANGE` of the four. */
export function checkBatteryShare(battery: BatteryShare): Failure | undefined {
  return (
    checkPositive('ratedAh', battery.ratedAh, 100_000) ??
    checkNumber('capacityFraction', battery.capacityFraction, 0, 1.3) ??
    checkPositive('depth', battery.depth, 1) ??
    checkPositive('temperatureFactor', battery.temperatureFactor, 1)
  )
}

/** Rated x measured fraction (at most 1.1) x temperature, Ah, before depth. The share must be checked. */
export function presentAh({ ratedAh, capacityFraction, temperatureFactor }: BatteryShare): number {
  return ratedAh * Math.min(capacityFraction, MOST_CAPACITY_FRACTION) * temperatureFactor
}

/** `Vnom x Ah x fm x DoD x fT`, Wh; nominal voltage above 0, to 1000 V. `E_RANGE`. */
export function usableEnergyWh(battery: BatteryShare & { nominalV: number }): Outcome<number> {
  const bad = checkPositive('nominalV', battery.nominalV, 1000) ?? checkBatteryShare(battery)
  return bad ?? battery.nominalV * presentAh(battery) * battery.depth
}

/** Hours at a constant mean power: energy 0 to 1e9 Wh, power above 0 to 1e6 W. `E_RANGE`. */
export function runtimeAtPowerH(energyWh: number, meanW: number): Outcome<number> {
  const bad = checkNumber('energyWh', energyWh, 0, 1e9) ?? checkPositive('meanW', meanW, 1e6)
  return bad ?? finiteResult(energyWh / meanW)
}

export type CapacityAdvice = 'REPLACE' | 'TEST_YEARLY' | 'OK'

/**
 * Below 80 % of rated: replace; from 80 % and below 90 %: test yearly. 80.0 % exactly is not yet below.
 * Fraction 0 to 1.3, referred to 25 deg C. `E_RANGE`.
 */
export function capacityAdvice(capacityFraction: number): Outcome<CapacityAdvice> {
  const bad = checkNumber('capacityFraction', capacityFraction, 0, 1.3)
  if (bad) return bad
  // A quotient such as 15.2 / 19 may fall short of 0.8 in its last binary digit.
  const isBelow = (limit: number) => capacityFraction < limit - 1e-12
  if (isBelow(0.8)) return 'REPLACE'
  return isBelow(0.9) ? 'TEST_YEARLY' : 'OK'
}

/** Lithium must not be charged below freezing; others may. Common practice, no source; the maker's word wins. */
export function mayCharge(chemistry: Chemistry, temperatureC: number): boolean {
  const isLithium = chemistry === 'lifepo4' || chemistry === 'lithium-ion'
  return !isLithium || temperatureC >= 0
}
