/**
 * Maximum permissible exposure in the United States, plane-wave equivalent.
 * Source: 47 CFR 1.1310(e)(1) Table 1 (confirmed). The tiers are not a factor of five apart between 1.34 and
 * 3 MHz. A boundary frequency belongs to the higher row; the rows agree there within 0.3 %.
 */
import { checkNumber, failure, type Outcome } from './outcome.ts'

export type ExposureTier = 'controlled' | 'general'

/** Averaging time of each tier, minutes. */
export const AVERAGING_MINUTES: Readonly<Record<ExposureTier, number>> = { controlled: 6, general: 30 }

export const LOWEST_EXPOSURE_MHZ = 0.3
export const HIGHEST_EXPOSURE_MHZ = 100_000

export interface ExposureLimit {
  /** Power density, mW/cm2 (1 mW/cm2 = 10 W/m2). */
  readonly mWPerCm2: number
  /** Field limits, defined up to 300 MHz. */
  readonly electricVPerM: number | null
  readonly magneticAPerM: number | null
}

interface Row {
  readonly fromMhz: number
  readonly density: (fMhz: number) => number
  readonly electric?: (fMhz: number) => number
  readonly magnetic?: (fMhz: number) => number
}

const always = (value: number) => () => value

/** Rising; the last row that begins at or below the frequency holds. */
const ROWS: Readonly<Record<ExposureTier, readonly Row[]>> = {
  controlled: [
    { fromMhz: 0.3, density: always(100), electric: always(614), magnetic: always(1.63) },
    { fromMhz: 3, density: (f) => 900 / f ** 2, electric: (f) => 1842 / f, magnetic: (f) => 4.89 / f },
    { fromMhz: 30, density: always(1), electric: always(61.4), magnetic: always(0.163) },
    { fromMhz: 300, density: (f) => f / 300 },
    { fromMhz: 1500, density: always(5) },
  ],
  general: [
    { fromMhz: 0.3, density: always(100), electric: always(614), magnetic: always(1.63) },
    { fromMhz: 1.34, density: (f) => 180 / f ** 2, electric: (f) => 824 / f, magnetic: (f) => 2.19 / f },
    { fromMhz: 30, density: always(0.2), electric: always(27.5), magnetic: always(0.073) },
    { fromMhz: 300, density: (f) => f / 1500 },
    { fromMhz: 1500, density: always(1) },
  ],
}

/** Limit of a tier at 0.3 to 100,000 MHz. `E_RANGE`. */
export function exposureLimit(tier: ExposureTier, frequencyMhz: number): Outcome<ExposureLimit> {
  const bad = checkExposureFrequency(frequencyMhz)
  if (bad) return bad
  if (!Object.hasOwn(ROWS, tier))
    return failure('E_RANGE', 'tier must be controlled or general.', { field: 'tier' })
  const row = ROWS[tier].findLast(({ fromMhz }) => frequencyMhz >= fromMhz) as Row
  return {
    mWPerCm2: row.density(frequencyMhz),
    electricVPerM: row.electric?.(frequencyMhz) ?? null,
    magneticAPerM: row.magnetic?.(frequencyMhz) ?? null,
  }
}

export function checkExposureFrequency(frequencyMhz: number) {
  return checkNumber('frequencyMhz', frequencyMhz, LOWEST_EXPOSURE_MHZ, HIGHEST_EXPOSURE_MHZ)
}
