/**
 * Copper conductors by American wire gauge. Source: ASTM B258 (2018); copper 0.017241 ohm mm2/m and 0.00393/K
 * at 20 deg C, IEC 60028. NBS Handbook 100 gives 3.2772 mohm/m for AWG 10 (from memory, verify; agrees).
 */
import { checkNumber, failure, isFailure, type Outcome } from './outcome.ts'

export const COPPER_OHM_MM2_PER_M = 0.017241
export const COPPER_PER_K = 0.00393
/** Stranded wire of the same gauge has this much more resistance. */
export const STRANDED_FACTOR = 1.02

/** Number of a gauge as written: '12', '0' or '1/0', '2/0' (-1), '3/0', '4/0' (-3). `E_AWG`. */
export function awgNumber(text: string): Outcome<number> {
  const match = typeof text === 'string' ? /^\s*(?:([1-4])\/0|(-?\d{1,2}))\s*$/.exec(text) : null
  if (!match) return awgFailure()
  const gauge = match[1] === undefined ? Number(match[2]) : 1 - Number(match[1])
  return isGauge(gauge) ? gauge + 0 : awgFailure()
}

/** `0.127 mm x 92^((36 - n) / 39)`, mm; n a whole number from -3 (4/0) to 40. `E_AWG`. */
export function awgDiameterMm(gauge: number): Outcome<number> {
  return isGauge(gauge) ? 0.127 * 92 ** ((36 - gauge) / 39) : awgFailure()
}

/** Solid cross-section, mm2. `E_AWG`. */
export function awgAreaMm2(gauge: number): Outcome<number> {
  const diameter = awgDiameterMm(gauge)
  return isFailure(diameter) ? diameter : (Math.PI / 4) * diameter ** 2
}

/** Resistance of one solid conductor, ohm per m; temperature of the copper -40 to 105 deg C. `E_AWG`, `E_RANGE`. */
export function awgOhmPerM(gauge: number, temperatureC = 20): Outcome<number> {
  const bad = checkNumber('temperatureC', temperatureC, -40, 105)
  if (bad) return bad
  const area = awgAreaMm2(gauge)
  if (isFailure(area)) return area
  return (COPPER_OHM_MM2_PER_M * (1 + COPPER_PER_K * (temperatureC - 20))) / area
}

function isGauge(gauge: unknown): boolean {
  return Number.isInteger(gauge) && (gauge as number) >= -3 && (gauge as number) <= 40
}

function awgFailure() {
  const message = 'The gauge must be a whole AWG number from 4/0 (-3) to 40.'
  return failure('E_AWG', message, { field: 'gauge' })
}
