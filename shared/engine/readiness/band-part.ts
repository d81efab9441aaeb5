import type { Band } from '../vocabulary.ts'
import type { BandCapability, Evidence, Reason } from './types.ts'

/** What one part of the transmit chain says about one band. */
export interface BandPart {
  readonly state: BandCapability['state']
  /** Highest radio output that the part allows, W. */
  readonly capW: number
  /** Loss that the part adds, dB; null where nobody knows. */
  readonly lossDb: number | null
  readonly tests: readonly Evidence[]
  /** Reasons with the level that fits a band that fails alone; `bands` raises it where nothing is left. */
  readonly reasons: readonly Reason[]
}

export const CLEAR: BandPart = { state: 'proven', capW: Infinity, lossDb: 0, tests: [], reasons: [] }

const STATES = ['proven', 'limited', 'not-proven', 'out'] as const

/** The parts one after the other: the worst state, the lowest cap, the sum of the losses. */
export function joinParts(parts: readonly BandPart[]): BandPart {
  return parts.reduce(
    (whole, part) => ({
      state: STATES.indexOf(part.state) > STATES.indexOf(whole.state) ? part.state : whole.state,
      capW: Math.min(whole.capW, part.capW),
      lossDb: whole.lossDb === null || part.lossDb === null ? null : whole.lossDb + part.lossDb,
      tests: [...whole.tests, ...part.tests],
      reasons: [...whole.reasons, ...part.reasons],
    }),
    CLEAR,
  )
}

/** Of several parts that could each do the work (two antennas), the one that says most. */
export function bestPart(parts: readonly BandPart[]): BandPart | undefined {
  return [...parts].sort((a, b) => STATES.indexOf(a.state) - STATES.indexOf(b.state) || b.capW - a.capW)[0]
}

/** True where an item covers a band, or does not say which bands it covers. */
export function covers(bands: readonly Band[] | undefined, band: Band): boolean {
  return bands === undefined || bands.length === 0 || bands.includes(band)
}
