import type { Reason } from './period-types.ts'
import type { ReadinessItem } from './types.ts'

type Parts = Pick<Reason, 'code' | 'level' | 'text'> & Partial<Reason>

/** A reason with only what it needs said; the rest is null. */
export function reasonOf(parts: Parts): Reason {
  return {
    band: null,
    positionId: null,
    itemId: null,
    testId: null,
    procedure: null,
    action: null,
    ...parts,
  }
}

export function reasonAbout(item: ReadinessItem, parts: Parts): Reason {
  return reasonOf({ itemId: item.id, positionId: item.positionId, ...parts })
}

const LEVELS = ['not-fit', 'not-proven', 'limit', 'note'] as const

/** Heaviest first; equal ones keep the order in which the kit was judged. Says each thing once, at its heaviest. */
export function sortReasons(reasons: readonly Reason[]): Reason[] {
  const seen = new Set<string>()
  return reasons
    .map((reason, place) => ({ reason, place }))
    .sort((a, b) => LEVELS.indexOf(a.reason.level) - LEVELS.indexOf(b.reason.level) || a.place - b.place)
    .map(({ reason }) => reason)
    .filter(({ text }) => !seen.has(text) && seen.add(text))
}
