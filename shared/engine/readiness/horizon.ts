import type { Verdict } from '../vocabulary.ts'
import type { Reason } from './period-types.ts'
import type { EpochMs } from './types.ts'

/** What the horizon needs of a period. */
export interface VerdictPeriod {
  readonly from: EpochMs
  readonly to: EpochMs | null
  readonly verdict: Verdict
  readonly reasons: readonly Pick<Reason, 'text'>[]
}

/** `verdict` holds until `until`, when `cause` changes it; the last step has neither. */
export interface HorizonStep {
  readonly until: EpochMs | null
  readonly verdict: Verdict
  readonly cause: string
}

/** The changes of the verdict: neighbouring periods with one verdict are one step, whatever their reasons. */
export function horizonOf(periods: readonly VerdictPeriod[]): HorizonStep[] {
  return periods.flatMap((period, index) => {
    const next = periods[index + 1]
    if (!next) return [{ until: period.to, verdict: period.verdict, cause: '' }]
    if (next.verdict === period.verdict) return []
    return [{ until: period.to, verdict: period.verdict, cause: causeOfChange(period, next) }]
  })
}

/** Why one period gives way to the next: the first reason that is new, else the first that has gone. */
export function causeOfChange(before: VerdictPeriod, after: VerdictPeriod): string {
  const known = new Set(before.reasons.map(({ text }) => text))
  const added = after.reasons.find(({ text }) => !known.has(text))
  if (added) return added.text
  const kept = new Set(after.reasons.map(({ text }) => text))
  const gone = before.reasons.find(({ text }) => !kept.has(text))
  return gone ? `no longer: ${gone.text}` : ''
}

/** When the verdict of the first period changes; null when it never does. */
export function holdsUntil(periods: readonly VerdictPeriod[]): EpochMs | null {
  return horizonOf(periods)[0]?.until ?? null
}
