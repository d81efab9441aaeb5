import { checkPositive } from '../check-range.ts'
import { checkNumber, type Failure, type Outcome } from '../outcome.ts'

/**
 * How a transformer is wound: `tapped`, one wire with a tap for the low side; `bifilar`, the low side a wire of its
 * own that lies twisted with the first turns of the other; `separate`, two windings apart.
 */
export const CONSTRUCTIONS = ['tapped', 'bifilar', 'separate'] as const

export type Construction = (typeof CONSTRUCTIONS)[number]

export interface Winding {
  readonly construction: Construction
  /** Passes through the core, 0.5 to 1000. */
  readonly primaryTurns: number
  /** In a tapped or bifilar one all turns from ground to the high end, the first ones included. */
  readonly secondaryTurns: number
  /** Once round the core or the stack, above 0 to 1000 mm. */
  readonly meanTurnMm: number
  /** Left at each end of each wire, and at each side of a tap, 0 to 2000 mm. */
  readonly tailMm: number
}

export interface WireToCut {
  readonly wire: 'whole' | 'primary' | 'secondary'
  readonly turns: number
  readonly tails: number
  readonly lengthMm: number
}

/**
 * Wires to cut: turns times the mean length of a turn, plus the tails. The loop twisted into a tap takes two tails
 * more. `E_RANGE`, `E_NUMBER`, `E_MISSING`. Source: geometry.
 */
export function wiresToCut(winding: Winding): Outcome<readonly WireToCut[]> {
  const bad = checkWinding(winding)
  if (bad) return bad
  const { construction, primaryTurns, secondaryTurns, meanTurnMm, tailMm } = winding
  const cut = (wire: WireToCut['wire'], turns: number, tails: number): WireToCut => ({
    wire,
    turns,
    tails,
    lengthMm: turns * meanTurnMm + tails * tailMm,
  })
  return construction === 'tapped'
    ? [cut('whole', secondaryTurns, 4)]
    : [cut('primary', primaryTurns, 2), cut('secondary', secondaryTurns, 2)]
}

function checkWinding({ primaryTurns, secondaryTurns, meanTurnMm, tailMm }: Winding): Failure | undefined {
  return (
    checkNumber('primaryTurns', primaryTurns, 0.5, 1000) ??
    checkNumber('secondaryTurns', secondaryTurns, 0.5, 1000) ??
    checkPositive('meanTurnMm', meanTurnMm, 1000) ??
    checkNumber('tailMm', tailMm, 0, 2000)
  )
}
