import { failure, type Outcome } from './outcome.ts'

/** A kind of coaxial cable, as new. */
export interface Cable {
  /** Stable word for stored tests: `rg-58`. */
  readonly key: string
  readonly name: string
  /** Conductor part (skin effect), dB per 100 ft and root MHz. */
  readonly k1: number
  /** Dielectric part, dB per 100 ft and MHz. */
  readonly k2: number
  /** Typical velocity factor, lowest and highest. */
  readonly velocityFactor: readonly [number, number]
  /** Its centre conductor is thin or copper-clad steel, so that the law reads low below 10 MHz. */
  readonly isThin: boolean
}

/**
 * Coefficients from two points of "Feedline Characteristics" (ARRL General Class License Manual, corrected
 * Table 6-1; confirmed), solved exactly. RG-316: least squares on ARRL Handbook figures (from memory,
 * verify). Nominal new cable: age and water only add.
 */
export const CABLES: readonly Cable[] = [
  { key: 'rg-174', name: 'RG-174', k1: 0.8257, k2: 0.001249, velocityFactor: [0.66, 0.66], isThin: true },
  { key: 'rg-316', name: 'RG-316', k1: 0.82682, k2: 0.002639, velocityFactor: [0.695, 0.695], isThin: true },
  { key: 'rg-58', name: 'RG-58', k1: 0.44389, k2: 0.001289, velocityFactor: [0.66, 0.66], isThin: false },
  { key: 'rg-8x', name: 'RG-8X', k1: 0.34812, k2: 0.001777, velocityFactor: [0.78, 0.82], isThin: false },
  { key: 'rg-213', name: 'RG-213', k1: 0.18958, k2: 0.001388, velocityFactor: [0.66, 0.66], isThin: false },
  {
    key: 'foam-10-mm',
    name: '10 mm low-loss foam',
    k1: 0.12022,
    k2: 0.000717,
    velocityFactor: [0.84, 0.85],
    isThin: false,
  },
]

/** The cable of a key, or `E_CABLE`. */
export function findCable(key: string): Outcome<Cable> {
  const known = CABLES.map((cable) => cable.name).join(', ')
  return (
    CABLES.find((cable) => cable.key === key) ??
    failure('E_CABLE', `The cable is not in the table: choose one of ${known}.`, { field: 'cable' })
  )
}
