/**
 * Thermal resistance and what follows from it at other powers, ambients and duties. Temperatures in deg C,
 * resistance in K/W, powers in W at the device's input, efficiency and duty 0 to 1.
 * Source: lumped capacitance; calculation sheet, section 6.
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkNumber, failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'

export const MAX_POWER_W = 100_000
const MAX_RESISTANCE_K_PER_W = 1e6

export interface ThermalResistance {
  /** Null when an efficiency of 1 leaves no heat to explain the rise. */
  readonly resistanceKPerW: number | null
  /** Heat during the test, W. */
  readonly heatW: number
  readonly warnings: readonly Warning[]
}

/** `Rth = dTinf / (P_in (1 - eta))`, eta at the test frequency. `E_RANGE`; `W_HEAT_RF_DISAGREE`. */
export function thermalResistance(test: {
  steadyRiseK: number
  inputW: number
  efficiency: number
}): Outcome<ThermalResistance> {
  const bad =
    checkPositive('steadyRiseK', test.steadyRiseK, 1e6) ??
    checkPositive('inputW', test.inputW, MAX_POWER_W) ??
    checkNumber('efficiency', test.efficiency, 0, 1)
  if (bad) return bad
  const heatW = test.inputW * (1 - test.efficiency)
  const resistanceKPerW = heatW > 0 ? finiteResult(test.steadyRiseK / heatW) : null
  if (isFailure(resistanceKPerW)) return resistanceKPerW
  const message = 'It warmed although the efficiency of 1 leaves no heat: the RF loss is understated.'
  const warnings = resistanceKPerW === null ? [{ code: 'W_HEAT_RF_DISAGREE', message }] : []
  return { resistanceKPerW, heatW, warnings }
}

/** Where the device stands and how it is driven. */
export interface ThermalUse {
  /** -40 to 85 deg C. */
  readonly ambientC: number
  /** Above 0, to 1e6 K/W. */
  readonly resistanceKPerW: number
  /** While transmitting, 0 to 100,000 W. */
  readonly inputW: number
  readonly efficiency: number
}

/**
 * End temperature on average heat, `Tamb + Rth P (1 - eta) D`, D = emission duty x share of time
 * transmitting. Valid when a transmit-receive cycle is short against tau; else `cyclePeakTemperature`.
 */
export function steadyTemperature(use: ThermalUse & { duty: number }): Outcome<number> {
  const bad = checkUse(use) ?? checkNumber('duty', use.duty, 0, 1)
  if (bad) return bad
  return finiteResult(use.ambientC + use.resistanceKPerW * use.inputW * (1 - use.efficiency) * use.duty)
}

/**
 * The hottest moment of a long run of equal cycles, `onS` transmitting at the emission's duty then `offS`
 * receiving: the transient for cycles that are not short against tau. onS above 0, offS from 0, to 1e9 s.
 */
export function cyclePeakTemperature(
  use: ThermalUse & { emissionDuty: number; onS: number; offS: number; tauS: number },
): Outcome<number> {
  const { onS, offS, tauS } = use
  const bad =
    checkUse(use) ??
    checkNumber('emissionDuty', use.emissionDuty, 0, 1) ??
    checkPositive('onS', onS, 1e9) ??
    checkNumber('offS', offS, 0, 1e9) ??
    checkPositive('tauS', tauS, 1e9)
  if (bad) return bad
  const whileOnK = use.resistanceKPerW * use.inputW * (1 - use.efficiency) * use.emissionDuty
  // Of the way from ambient to the end temperature; tends to onS / (onS + offS) for short cycles.
  const share = Math.expm1(-onS / tauS) / Math.expm1(-(onS + offS) / tauS)
  return Number.isFinite(share) ? finiteResult(use.ambientC + whileOnK * share) : TOO_SHORT_A_CYCLE
}

/**
 * Largest power while transmitting that keeps the average at the limit, W:
 * `(Tlim - Tamb) / (Rth (1 - eta) D)`; 0 when ambient is at the limit. Efficiency below 1, duty above 0.
 * Average only: check the longest single transmission with `keyDownTime` too.
 */
export function maximumPower(
  use: Omit<ThermalUse, 'inputW'> & { limitC: number; duty: number },
): Outcome<number> {
  const bad =
    checkUse({ ...use, inputW: 0 }) ??
    checkNumber('limitC', use.limitC, -40, 1000) ??
    checkPositive('duty', use.duty, 1)
  if (bad) return bad
  if (use.efficiency === 1)
    return failure('E_RANGE', 'efficiency is 1: without heat no power is too much.', { field: 'efficiency' })
  const headroomK = Math.max(0, use.limitC - use.ambientC)
  return finiteResult(headroomK / (use.resistanceKPerW * (1 - use.efficiency) * use.duty))
}

const TOO_SHORT_A_CYCLE = failure('E_RANGE', 'The cycle is too short against tauS to compute.', {
  field: 'onS',
})

function checkUse(use: ThermalUse): Failure | undefined {
  return (
    checkNumber('ambientC', use.ambientC, -40, 85) ??
    checkPositive('resistanceKPerW', use.resistanceKPerW, MAX_RESISTANCE_K_PER_W) ??
    checkNumber('inputW', use.inputW, 0, MAX_POWER_W) ??
    checkNumber('efficiency', use.efficiency, 0, 1)
  )
}
