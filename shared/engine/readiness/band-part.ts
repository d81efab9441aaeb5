import type { Band, Procedure } from '../vocabulary.ts'
import { reasonForStanding } from './check-reason.ts'
import type { Standing } from './standing.ts'
import type { BandCapability, Reason } from './period-types.ts'
import type { Evidence, ReadinessItem, Rule } from './types.ts'

/** What one part of the transmit chain says about one band. */
export interface BandPart {
  readonly state: BandCapability['state']
  /** Highest radio output that the part allows, W. */
  readonly capW: number
  /** Loss that the part adds, dB; null where nobody knows. */
  readonly lossDb: number | null
  readonly tests: readonly Evidence[]
  /** Each with the level that it has where no promised band is left; `bands` lowers it where some are. */
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
  return [...parts].sort(
    (a, b) => STATES.indexOf(a.state) - STATES.indexOf(b.state) || capDifference(a, b),
  )[0]
}

function capDifference(a: BandPart, b: BandPart): number {
  return a.capW === b.capW ? 0 : b.capW - a.capW
}

/** A part that the kit can go without takes no band out: whatever is wrong with it is a limit. */
export function asSupporting(part: BandPart): BandPart {
  return {
    ...part,
    state: part.state === 'proven' ? 'proven' : 'limited',
    reasons: part.reasons.map((reason) => ({ ...reason, level: 'limit' })),
  }
}

/** True where an item covers a band, or does not say which bands it covers. */
export function covers(bands: readonly Band[] | undefined, band: Band): boolean {
  return bands === undefined || bands.length === 0 || bands.includes(band)
}

interface Check {
  readonly item: ReadinessItem
  readonly rule: Rule | undefined
  readonly procedure: Procedure
  /** Null: the reason speaks of the item as a whole. */
  readonly band: Band | null
}

/** The part that a check makes which did not fail: clear when it is good or nobody asks for it, else not proven. */
export function standingPart({ item, rule, procedure, band }: Check, standing: Standing): BandPart {
  const tests = standing.test ? [standing.test] : []
  if (standing.state === 'good' || !rule) return { ...CLEAR, tests }
  const subject = { name: item.designation, itemId: item.id, positionId: item.positionId }
  const level = rule.vital ? 'not-proven' : 'limit'
  const reason = reasonForStanding(subject, { procedure, band, level }, standing)
  const state = rule.vital ? 'not-proven' : 'limited'
  return { ...CLEAR, state, tests, reasons: reason ? [reason] : [] }
}
