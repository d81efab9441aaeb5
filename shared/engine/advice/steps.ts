import type { Band, Procedure } from '../vocabulary.ts'

/** What could be done, one thing at a time; a later step finds what the earlier ones left. */
export type WhatIfStep =
  /** A loose item, or one of another kit, goes into a position. */
  | { readonly kind: 'move'; readonly itemId: string; readonly kitId: string; readonly positionId: string }
  | { readonly kind: 'take-out'; readonly itemId: string }
  /** An item that was missing or away is there again. */
  | { readonly kind: 'find'; readonly itemId: string }
  /** A test passes now; `band` null: on every band. */
  | {
      readonly kind: 'pass'
      readonly subjectId: string
      readonly procedure: Procedure
      readonly band: Band | null
    }
  /** The kit is counted as its record then has it, and sealed. */
  | { readonly kind: 'count'; readonly kitId: string }
  /** The kit is available again. */
  | { readonly kind: 'back'; readonly kitId: string }
  /** A part that is good enough is bought for a position; it has no test yet. See `boughtId`. */
  | { readonly kind: 'buy'; readonly kitId: string; readonly positionId: string }
  /** A test is not made, whatever the kit's verdict is without it; a risk may be accepted for that, with an end. */
  | {
      readonly kind: 'skip'
      readonly kitId: string
      readonly subjectId: string
      readonly procedure: Procedure
      readonly band: Band | null
      readonly accept: AcceptedRisk | null
    }

export interface AcceptedRisk {
  readonly reason: string
  /** ISO 8601. */
  readonly untilAt: string
  /** Who takes it. */
  readonly by: string
}

/** The id under which later steps name what a `buy` brought. */
export function boughtId(kitId: string, positionId: string): string {
  return `bought:${kitId}:${positionId}`
}
