import type { PlainDate } from '../plain-date.ts'
import type { KitState } from '../readiness/types.ts'
import type { Verdict } from '../vocabulary.ts'
import type { WhatIfStep } from './steps.ts'

/** A station as advice sees it. */
export interface AdviceKit {
  readonly state: KitState
  /** The day on which it should be back or usable again, where somebody said so. */
  readonly expectedReturnOn: PlainDate | null
}

/** One thing that somebody does, with its attended minutes. */
export interface Work {
  /** "Swap XFM-13 into K-18". */
  readonly text: string
  readonly minutes: number
  readonly steps: readonly WhatIfStep[]
  /** Items and kits that no other plan may use at the same time. */
  readonly uses: readonly string[]
}

export interface KitChange {
  readonly kitId: string
  readonly designation: string
  readonly before: Verdict
  readonly after: Verdict
  /** It was on issue or out of service, and can go then. */
  readonly returns: boolean
}

/** Works that belong together, and what they yield. */
export interface Plan {
  readonly kitId: string
  readonly works: readonly Work[]
  readonly minutes: number
  readonly uses: readonly string[]
  readonly changes: readonly KitChange[]
  /** Kits that were opened and not counted after it. */
  readonly countAfter: readonly string[]
  /** Kits that become deployable, proven, and that come back, by verdict. */
  readonly deployable: number
  readonly proven: number
  readonly returned: number
}

/** Recall of a loan (demo scenario, section 7). */
export const RECALL_MINUTES = 10
