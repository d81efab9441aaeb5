/**
 * Exemption from routine evaluation of a single source: from the paperwork, not from the limit.
 * Source: 47 CFR 1.1307(b)(3)(i)(C) Table 1 (confirmed by quotation); 97.13(c). The old blanket exemption of
 * low-power and portable amateur stations ended 3 May 2021, transition to 3 May 2023.
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { nearFieldM } from './exposure.ts'
import { checkExposureFrequency } from './exposure-limits.ts'
import { checkNumber, isFailure, type Outcome } from './outcome.ts'

/** EIRP over ERP: the gain of a half-wave dipole, as a number. */
export const EIRP_OVER_ERP = 1.64

export interface ExposureExemption {
  /** ERP up to which the source is exempt at this distance, W. */
  readonly exemptErpW: number
  /** wavelength/(2 pi): nearer than this nothing is exempt. m. */
  readonly nearestM: number
  readonly distanceCounts: boolean
  readonly exempt: boolean
}

/** ERP 0 to 1e8 W, distance above 0 to 1e6 m, 0.3 to 100,000 MHz. `E_RANGE`. */
export function exposureExemption(source: {
  erpW: number
  distanceM: number
  frequencyMhz: number
}): Outcome<ExposureExemption> {
  const { erpW, distanceM, frequencyMhz } = source
  const bad =
    checkNumber('erpW', erpW, 0, 1e8) ??
    checkPositive('distanceM', distanceM, 1e6) ??
    checkExposureFrequency(frequencyMhz)
  if (bad) return bad
  const exemptErpW = finiteResult(wattsPerM2(frequencyMhz) * distanceM ** 2)
  if (isFailure(exemptErpW)) return exemptErpW
  const nearestM = nearFieldM(frequencyMhz)
  const distanceCounts = distanceM >= nearestM
  return { exemptErpW, nearestM, distanceCounts, exempt: distanceCounts && erpW <= exemptErpW }
}

/** ERP from average power at the antenna (0 to 100,000 W) and gain (-50 to 60 dBi), W. `E_RANGE`. */
export function erpOf(averageW: number, gainDbi: number): Outcome<number> {
  const bad = checkNumber('averageW', averageW, 0, 100_000) ?? checkNumber('gainDbi', gainDbi, -50, 60)
  return bad ?? (averageW * 10 ** (gainDbi / 10)) / EIRP_OVER_ERP
}

function wattsPerM2(f: number): number {
  if (f >= 1500) return 19.2
  if (f >= 300) return 0.0128 * f
  if (f >= 30) return 3.83
  if (f >= 1.34) return 3450 / f ** 2
  return 1920
}
