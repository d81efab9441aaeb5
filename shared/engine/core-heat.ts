/**
 * Heat capacity of a core and the cross-check of heat against RF loss.
 * Ferrite figures: soft-ferrite manufacturers' general tables, from memory, verify (calculation sheet, 6).
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkNumber, failure, isFailure, type Outcome, type Warning } from './outcome.ts'
import { MAX_POWER_W } from './thermal.ts'

/** 700 to 800 J/(kg K). */
export const FERRITE_J_PER_KG_K = 750
/** 4.6 to 5.0 g/cm3. */
export const FERRITE_G_PER_CM3 = 4.8
export const COPPER_J_PER_KG_K = 385
/** Thermal diffusivity of ferrite, m2/s. */
export const FERRITE_M2_PER_S = 1.1e-6

/** Ratio of heat found to heat expected beyond which the two disagree; our choice. */
export const HEAT_RATIO_LOW = 0.6
export const HEAT_RATIO_HIGH = 1.6

export interface ToroidSize {
  /** mm, up to 1000; the hole smaller than the outside. */
  readonly outsideMm: number
  readonly insideMm: number
  readonly heightMm: number
}

/** Mass of a ferrite toroid from its size, kg, at 4.8 g/cm3. Weigh it instead where possible. `E_RANGE`. */
export function toroidMassKg(size: ToroidSize): Outcome<number> {
  const volume = toroidVolumeCm3(size)
  return isFailure(volume) ? volume : (volume * FERRITE_G_PER_CM3) / 1000
}

/** cm3. `E_RANGE`. */
export function toroidVolumeCm3({ outsideMm, insideMm, heightMm }: ToroidSize): Outcome<number> {
  const bad =
    checkPositive('outsideMm', outsideMm, 1000) ??
    checkNumber('insideMm', insideMm, 0, 1000) ??
    checkPositive('heightMm', heightMm, 1000)
  if (bad) return bad
  if (insideMm >= outsideMm)
    return failure('E_RANGE', 'insideMm must be smaller than outsideMm.', { field: 'insideMm' })
  return ((Math.PI / 4) * (outsideMm ** 2 - insideMm ** 2) * heightMm) / 1000
}

/** Time by which the surface follows the core, s: (half thickness)^2 / diffusivity. Up to 1000 mm. */
export function surfaceLagS(halfThicknessMm: number, diffusivityM2PerS = FERRITE_M2_PER_S): Outcome<number> {
  const bad =
    checkPositive('halfThicknessMm', halfThicknessMm, 1000) ??
    checkPositive('diffusivityM2PerS', diffusivityM2PerS, 1)
  return bad ?? finiteResult((halfThicknessMm / 1000) ** 2 / diffusivityM2PerS)
}

export interface HeatBalance {
  /** m c dT/dt, W. */
  readonly heatW: number
  /** P_in (1 - eta), W. */
  readonly rfLossW: number
  /** heatW over rfLossW; null when an efficiency of 1 leaves nothing to divide by. */
  readonly ratio: number | null
  readonly warnings: readonly Warning[]
}

/**
 * Heat by calorimetry against loss by RF. Slope at key-down, K/s: A/tau of the fit, or that of the first
 * minute. Mass and heat capacity alone are good to about 15 %. `E_RANGE`; `W_HEAT_RF_DISAGREE` outside
 * 0.6 to 1.6.
 */
export function heatBalance(test: {
  massKg: number
  heatCapacityJPerKgK?: number
  slopeKPerS: number
  inputW: number
  efficiency: number
}): Outcome<HeatBalance> {
  const { massKg, heatCapacityJPerKgK = FERRITE_J_PER_KG_K, slopeKPerS, inputW, efficiency } = test
  const bad =
    checkPositive('massKg', massKg, 1000) ??
    checkPositive('heatCapacityJPerKgK', heatCapacityJPerKgK, 100_000) ??
    checkPositive('slopeKPerS', slopeKPerS, 1e6) ??
    checkPositive('inputW', inputW, MAX_POWER_W) ??
    checkNumber('efficiency', efficiency, 0, 1)
  if (bad) return bad
  const heatW = massKg * heatCapacityJPerKgK * slopeKPerS
  const rfLossW = inputW * (1 - efficiency)
  const ratio = rfLossW > 0 ? finiteResult(heatW / rfLossW) : null
  if (isFailure(ratio)) return ratio
  return { heatW, rfLossW, ratio, warnings: disagreement(ratio) }
}

function disagreement(ratio: number | null): Warning[] {
  if (ratio !== null && ratio >= HEAT_RATIO_LOW && ratio <= HEAT_RATIO_HIGH) return []
  const message =
    ratio !== null && ratio < HEAT_RATIO_LOW
      ? 'Less heat than the RF loss: probe not on the core, mass too small, or the RF loss is overstated.'
      : 'More heat than the RF loss: the RF loss is understated, or windings and capacitor heat too.'
  return [{ code: 'W_HEAT_RF_DISAGREE', message }]
}
