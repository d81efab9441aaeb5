import { eventTimes } from './event-times.ts'
import { dossierOf, momentOf } from './moment.ts'
import { judgementAt, type Judgement } from './period-at.ts'
import type { Period } from './period-types.ts'
import type { EpochMs, KitState } from './types.ts'

/**
 * Of the rules by which a kit is judged. Raised by every change that gives the same state another verdict, other hours
 * or other words: stored periods are then worked out anew (`rejudge-groups`).
 */
export const READINESS_VERSION = 1

/**
 * Readiness of one kit from an instant on, if nobody does anything: half-open periods that follow each other without
 * gap or overlap, the first from `from`, the last without end, no two neighbours alike. Without new evidence a verdict
 * changes only at known moments, so the kit is judged at each of them and nowhere else.
 */
export function kitTimeline(state: KitState, from: EpochMs): Period[] {
  const dossier = dossierOf(state)
  const steps: { from: EpochMs; judgement: Judgement; digest: string }[] = []
  for (const at of [from, ...eventTimes(dossier, from)]) {
    const judgement = judgementAt(momentOf(dossier, at))
    const digest = JSON.stringify(judgement)
    if (steps.at(-1)?.digest !== digest) steps.push({ from: at, judgement, digest })
  }
  return steps.map(({ from: begins, judgement }, index) => ({
    from: begins,
    to: steps[index + 1]?.from ?? null,
    ...judgement,
  }))
}
