/**
 * Voltage at a feed point and across a capacitor: is the insulation, spacing and rating enough? PEP decides
 * voltage, average power decides heat. Source: circuit theory; calculation sheet, section 12.
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkNumber, isFailure, type Outcome, type Warning } from './outcome.ts'

export interface AcVoltage {
  readonly rmsV: number
  readonly peakV: number
}

/** Keep this much of a capacitor's rated peak in hand; our choice. Its DC rating is not its RF rating. */
export const CAPACITOR_PEAK_MARGIN = 2

const MAX_POWER_W = 100_000

/**
 * Across a load of R + jX ohm carrying P watts (PEP): `sqrt(P (R^2 + X^2) / R)`, not `sqrt(P |Z|)`.
 * P 0 to 100,000 W; R 0.1 to 1e6 ohm (towards 0 the voltage has no bound); X -1e6 to 1e6 ohm. `E_RANGE`.
 */
export function feedPointVoltage(load: {
  powerW: number
  resistanceOhm: number
  reactanceOhm?: number
}): Outcome<AcVoltage> {
  const { powerW, resistanceOhm: r, reactanceOhm: x = 0 } = load
  const bad =
    checkNumber('powerW', powerW, 0, MAX_POWER_W) ??
    checkNumber('resistanceOhm', r, 0.1, 1e6) ??
    checkNumber('reactanceOhm', x, -1e6, 1e6)
  return bad ?? voltageOf(Math.sqrt((powerW * (r * r + x * x)) / r))
}

/** The highest voltage anywhere on a mismatched line, `sqrt(P Z0 s)`; SWR 1 to 1e6, line 1 to 1000 ohm. */
export function worstLineVoltage(line: {
  powerW: number
  swr: number
  lineOhm?: number
}): Outcome<AcVoltage> {
  const { powerW, swr, lineOhm = 50 } = line
  const bad =
    checkNumber('powerW', powerW, 0, MAX_POWER_W) ??
    checkNumber('swr', swr, 1, 1e6) ??
    checkNumber('lineOhm', lineOhm, 1, 1000)
  return bad ?? voltageOf(Math.sqrt(powerW * lineOhm * swr))
}

export interface CapacitorStress extends AcVoltage {
  readonly rmsA: number
  /** Rating to look for: twice the peak (our choice), V. */
  readonly wantedPeakV: number
  /** `V^2 2 pi f C tan delta`, W; null without a loss factor. */
  readonly dissipationW: number | null
  /** `W_CAPACITOR_RATING` when the rated peak at RF leaves less than that. */
  readonly warnings: readonly Warning[]
}

/**
 * Capacitor across a line of Z ohm (50 unless given) carrying P watts. C above 0 to 1e6 pF, f above 0 to
 * 100,000 MHz, tan delta 0 to 1, rated peak at that frequency above 0 to 1e6 V. `E_RANGE`.
 */
export function capacitorStress(part: {
  powerW: number
  capacitancePf: number
  frequencyMhz: number
  lineOhm?: number
  lossFactor?: number
  ratedPeakV?: number
}): Outcome<CapacitorStress> {
  const { powerW, capacitancePf, frequencyMhz, lineOhm = 50, lossFactor, ratedPeakV } = part
  const bad =
    checkPositive('capacitancePf', capacitancePf, 1e6) ??
    checkPositive('frequencyMhz', frequencyMhz, 100_000) ??
    (lossFactor === undefined ? undefined : checkNumber('lossFactor', lossFactor, 0, 1)) ??
    (ratedPeakV === undefined ? undefined : checkPositive('ratedPeakV', ratedPeakV, 1e6))
  if (bad) return bad
  const voltage = feedPointVoltage({ powerW, resistanceOhm: lineOhm })
  if (isFailure(voltage)) return voltage
  const siemens = 2 * Math.PI * frequencyMhz * 1e6 * capacitancePf * 1e-12
  const rmsA = finiteResult(voltage.rmsV * siemens)
  if (isFailure(rmsA)) return rmsA
  const dissipationW = lossFactor === undefined ? null : voltage.rmsV * rmsA * lossFactor
  const wantedPeakV = CAPACITOR_PEAK_MARGIN * voltage.peakV
  const warnings = ratingWarnings(wantedPeakV, ratedPeakV)
  return { ...voltage, rmsA, wantedPeakV, dissipationW, warnings }
}

function ratingWarnings(wantedPeakV: number, ratedPeakV = Infinity): Warning[] {
  if (ratedPeakV >= wantedPeakV) return []
  const message = `A rating of ${ratedPeakV} V leaves less than twice in hand: ${Math.ceil(wantedPeakV)} V is wanted.`
  return [{ code: 'W_CAPACITOR_RATING', message }]
}

function voltageOf(rmsV: number): AcVoltage {
  return { rmsV, peakV: rmsV * Math.SQRT2 }
}
