import type { KitReadiness } from '#shared/contracts/kit-readiness.ts'
import { horizonOf } from '#shared/engine/readiness/horizon.ts'
import type { ReasonLevel } from '#shared/engine/readiness/period-types.ts'
import type { Stretch } from './horizon.ts'

export type KitReason = KitReadiness['period']['reasons'][number]
export type KitFix = KitReadiness['fixes'][number]
export type KitTest = KitReadiness['tests'][number]
export type KitPosition = KitReadiness['positions'][number]
export type KitCheck = KitReadiness['kitChecks'][number]

/** The verdict changes of a kit's stored periods. */
export function stretchesOf(timeline: KitReadiness['timeline']): Stretch[] {
  const periods = timeline.map(({ from, to, verdict, reasons }) => ({
    from: Date.parse(from),
    to: to === null ? null : Date.parse(to),
    verdict,
    reasons,
  }))
  return horizonOf(periods).map(({ until, verdict, cause }) => ({
    until: until === null ? null : new Date(until).toISOString(),
    verdict,
    cause,
  }))
}

const WEIGHT: Readonly<Record<ReasonLevel, number>> = { 'not-fit': 0, 'not-proven': 1, limit: 2, note: 3 }

/** Reasons with the heaviest first, otherwise in the order given. */
export function heaviestFirst(reasons: readonly KitReason[]): KitReason[] {
  return [...reasons].sort((a, b) => WEIGHT[a.level] - WEIGHT[b.level])
}

/** Attended time as people say it: `15 min`, `2 h`, `1 h 30 min`. */
export function minutesText(minutes: number): string {
  const whole = Math.round(minutes)
  const [hours, rest] = [Math.floor(whole / 60), whole % 60]
  return [hours > 0 && `${hours}\u00a0h`, (rest > 0 || hours === 0) && `${rest}\u00a0min`]
    .filter(Boolean)
    .join(' ')
}

/** Smallest first; what nobody can put a time to comes last. */
export function smallestFirst(fixes: readonly KitFix[]): KitFix[] {
  return [...fixes].sort((a, b) => (a.action.minutes ?? Infinity) - (b.action.minutes ?? Infinity))
}
