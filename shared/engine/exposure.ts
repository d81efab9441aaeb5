/**
 * A screening distance at which the average power density meets the limit of the United States. Not a
 * statement of compliance. Source: FCC OET Bulletin 65, Edition 97-01, August 1997, section 2 (power density
 * and the factor 2.56; confirmed); calculation sheet, section 11.
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkExposureFrequency, exposureLimit, type ExposureTier } from './exposure-limits.ts'
import { checkNumber, failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'

/** Field 1.6 times that of free space over reflecting ground. */
export const GROUND_REFLECTION = 2.56
export const FREE_SPACE = 1
/** Below this a distance is not shown: the method does not cover it. m. */
export const SMALLEST_SHOWN_M = 0.2

export const EXPOSURE_CAUTION =
  'This is a far-field estimate for the direction the antenna radiates best. Close to a wire, a loop or the ' +
  'high-voltage end of an end-fed antenna the real fields can be stronger or weaker than shown, and this method ' +
  'does not cover them. It uses United States limits; your country may set others. The licensed operator of the ' +
  'station decides, and must keep people clear of the antenna while transmitting. Nobody touches the antenna or ' +
  "the transformer's output terminal while it is keyed."

export interface Radiator {
  /** Averaged over the tier's window, at the antenna, 0 to 100,000 W. */
  readonly averageW: number
  /** Gain over an isotropic antenna, -50 to 60 dBi. */
  readonly gainDbi: number
  /** 0.3 to 100,000 MHz. */
  readonly frequencyMhz: number
  /** 2.56 with ground reflection (default), 1 in free space; 1 to 10. */
  readonly reflectionFactor?: number
}

/** `F P G / (4 pi R^2) / 10`, mW/cm2; distance above 0 to 1e7 m. `E_RANGE`. */
export function powerDensity(radiator: Radiator, distanceM: number): Outcome<number> {
  const bad = checkRadiator(radiator) ?? checkPositive('distanceM', distanceM, 1e7)
  return bad ?? finiteResult(eirpFactorW(radiator) / (4 * Math.PI * distanceM ** 2) / 10)
}

export interface ExposureDistance {
  /** `sqrt(F P G / (4 pi 10 S))`; 0 without power. m. */
  readonly distanceM: number
  /** False below 0.2 m: say "0.2 m or less: not covered by this method". */
  readonly covered: boolean
  readonly limitMWPerCm2: number
  /** `W_NEAR_FIELD` within wavelength/(2 pi) or half the antenna's length. */
  readonly warnings: readonly Warning[]
}

/** Smallest distance at the limit of a tier; antenna length above 0 to 100,000 m if known. `E_RANGE`. */
export function exposureDistance(
  radiator: Radiator & { antennaLengthM?: number },
  tier: ExposureTier,
): Outcome<ExposureDistance> {
  const { antennaLengthM, frequencyMhz } = radiator
  const bad =
    checkRadiator(radiator) ??
    (antennaLengthM === undefined ? undefined : checkPositive('antennaLengthM', antennaLengthM, 100_000))
  if (bad) return bad
  const limit = exposureLimit(tier, frequencyMhz)
  if (isFailure(limit)) return limit
  const limitMWPerCm2 = limit.mWPerCm2
  const distanceM = Math.sqrt(eirpFactorW(radiator) / (4 * Math.PI * 10 * limitMWPerCm2))
  const nearM = Math.max(nearFieldM(frequencyMhz), (antennaLengthM ?? 0) / 2)
  const warnings = distanceM < nearM ? [nearFieldWarning(nearM)] : []
  return { distanceM, covered: distanceM >= SMALLEST_SHOWN_M, limitMWPerCm2, warnings }
}

/**
 * Several transmitters at one place: the sum of S over its limit, which must stay under 1.
 * Each at its own distance. `E_TOO_FEW` for none, `E_RANGE` with the row.
 */
export function exposureShare(
  sources: readonly { readonly radiator: Radiator; readonly distanceM: number }[],
  tier: ExposureTier,
): Outcome<number> {
  if (!Array.isArray(sources) || sources.length === 0)
    return failure('E_TOO_FEW', 'Enter at least one transmitter.', { field: 'sources' })
  let sum = 0
  for (const [row, source] of sources.entries()) {
    const density = powerDensity(source?.radiator, source?.distanceM)
    if (isFailure(density)) return { ...density, line: row + 1 }
    const limit = exposureLimit(tier, source.radiator.frequencyMhz)
    if (isFailure(limit)) return { ...limit, line: row + 1 }
    sum += density / limit.mWPerCm2
  }
  return finiteResult(sum)
}

/** wavelength/(2 pi), m; 47.7/f, with 300 m MHz: rounded to the safe side. The frequency must be checked. */
export function nearFieldM(frequencyMhz: number): number {
  return 300 / frequencyMhz / (2 * Math.PI)
}

function checkRadiator(radiator: Radiator): Failure | undefined {
  return (
    checkNumber('averageW', radiator?.averageW, 0, 100_000) ??
    checkNumber('gainDbi', radiator.gainDbi, -50, 60) ??
    checkNumber('reflectionFactor', radiator.reflectionFactor ?? GROUND_REFLECTION, 1, 10) ??
    checkExposureFrequency(radiator.frequencyMhz)
  )
}

/** Reflection x power x gain as a number, W. */
function eirpFactorW({ averageW, gainDbi, reflectionFactor = GROUND_REFLECTION }: Radiator): number {
  return reflectionFactor * averageW * 10 ** (gainDbi / 10)
}

function nearFieldWarning(nearM: number): Warning {
  const message = `Within ${nearM.toPrecision(2)} m of this antenna the far-field estimate does not hold.`
  return { code: 'W_NEAR_FIELD', message }
}
