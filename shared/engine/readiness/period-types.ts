import type { PlainDate } from '../plain-date.ts'
import type { Availability, Band, FindingWord, Mode, Procedure, Verdict } from '../vocabulary.ts'
import type { EpochMs } from './types.ts'

/** What is said of a kit: the periods of its timeline, with reasons and what it can do, and the state of its checks. */

export type ReasonLevel = 'not-fit' | 'not-proven' | 'limit' | 'note'

/** What would lift a reason. */
export interface Action {
  readonly kind: 'test' | 'replace' | 'find' | 'repair' | 'count' | 'calibrate' | 'decide' | 'return' | 'buy'
  readonly text: string
  /** Attended minutes; null where nobody can say. */
  readonly minutes: number | null
}

/** One reason of a verdict, in plain words, with the way to its evidence. */
export interface Reason {
  readonly code: string
  readonly level: ReasonLevel
  readonly text: string
  readonly band: Band | null
  readonly positionId: string | null
  readonly itemId: string | null
  readonly testId: string | null
  readonly procedure: Procedure | null
  readonly action: Action | null
}

/** What the kit can do on one promised band. */
export interface BandCapability {
  readonly band: Band
  readonly state: 'proven' | 'limited' | 'not-proven' | 'out'
  /** Radio output allowed on this band, W; null when nothing says. */
  readonly watts: number | null
  /** Power that reaches the antenna, W. */
  readonly wattsAtAntenna: number | null
  /** Fraction of the radio's output that reaches the antenna, 0..1. */
  readonly fraction: number | null
  readonly lossDb: number | null
  /** The limit in a few words, empty when there is none. */
  readonly limit: string
  /** The oldest test that this band stands on. */
  readonly testId: string | null
  readonly testedOn: PlainDate | null
}

export interface Capability {
  readonly bands: readonly BandCapability[]
  readonly modes: readonly Mode[]
  /** Endurance, h; null when no battery counts. */
  readonly hours: number | null
  readonly usableAh: number | null
  /** Each factor of the hours, in order, as "96.3 % of 60 Ah". */
  readonly hoursFactors: readonly string[]
  /** What the hours hold for, on one line; empty without hours, absent in periods stored before it was kept. */
  readonly hoursConditions?: string
}

/** A half-open stretch of time [from, to) with one verdict; `to` null means without end. */
export interface Period {
  readonly from: EpochMs
  readonly to: EpochMs | null
  readonly verdict: Verdict
  readonly availability: Availability
  readonly reasons: readonly Reason[]
  readonly capability: Capability
  /** Day of the oldest vital evidence that the verdict stands on. */
  readonly oldestVitalOn: PlainDate | null
}

/** One required check of one subject at an instant: a row of the kit page and of every due list. */
export interface CheckState {
  readonly subjectId: string
  readonly positionId: string | null
  readonly procedure: Procedure
  readonly band: Band | null
  readonly ruleId: string | null
  readonly vital: boolean
  readonly state: 'current' | 'due-soon' | 'overdue' | 'never' | 'failed' | 'in-doubt'
  readonly finding: FindingWord | null
  readonly testId: string | null
  readonly testedOn: PlainDate | null
  readonly dueOn: PlainDate | null
  readonly because: string
}
