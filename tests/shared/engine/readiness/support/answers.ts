import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { BandCapability, Period, Reason } from '#shared/engine/readiness/period-types.ts'
import type { EpochMs, KitState } from '#shared/engine/readiness/types.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { D0 } from './instants.ts'

/** What the timeline says at its very start. */
export function periodAt(state: KitState, when: EpochMs = D0): Period {
  const [first] = kitTimeline(state, when)
  if (!first) throw new Error('A timeline has at least one period')
  return first
}

export const verdictAt = (state: KitState, when: EpochMs = D0) => periodAt(state, when).verdict

export function bandOf(period: Period, band: Band): BandCapability {
  const found = period.capability.bands.find((one) => one.band === band)
  if (!found) throw new Error(`${band} is not promised`)
  return found
}

/** Reasons that lower the verdict; notes do not. */
export const lowering = ({ reasons }: Period): Reason[] => reasons.filter(({ level }) => level !== 'note')

export const textsOf = (reasons: readonly Reason[]) => reasons.map(({ text }) => text)

/** The instants at which a kit's verdict changes, with what it changes to. */
export function verdictChanges(state: KitState, from: EpochMs): { at: EpochMs; verdict: string }[] {
  return kitTimeline(state, from).flatMap(({ from: start, verdict }, index, all) =>
    index > 0 && all[index - 1]?.verdict === verdict ? [] : [{ at: start, verdict }],
  )
}
