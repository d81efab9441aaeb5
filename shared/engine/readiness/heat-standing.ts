import type { Band } from '../vocabulary.ts'
import { doubtAbout, type Doubt } from './doubt.ts'
import type { Moment } from './moment.ts'
import { candidates, openRaisedChecks, dueOf, type Candidate } from './standing.ts'
import type { Rule } from './types.ts'

/** What the heat tests of a transformer say about one band. */
export type HeatStanding =
  | { readonly state: 'untested' }
  /** Passed at the rule's power: the kind's promise stands. */
  | { readonly state: 'good'; readonly by: Candidate }
  /** `capW`: the highest power that passed the same method; `failed`: the failure that set the limit, if any. */
  | {
      readonly state: 'capped'
      readonly capW: number
      readonly by: Candidate
      readonly failed: Candidate | null
    }
  | { readonly state: 'out'; readonly failed: Candidate }
  | { readonly state: 'lapsed'; readonly by: Candidate }
  | { readonly state: 'in-doubt'; readonly by: Candidate; readonly doubt: Doubt }

const HEAT = ['heat-test'] as const

/**
 * Walks the tests from the newest back. A failure at a power closes that power and all above it for older passes; the
 * first pass below every failure met so far is what the band stands on.
 */
export function heatStanding(
  moment: Moment,
  subjectId: string,
  rule: Rule | undefined,
  band: Band,
): HeatStanding {
  let failed: Candidate | null = null
  let doubted: HeatStanding | undefined
  for (const candidate of candidates(moment, { subjectId, procedures: HEAT, band })) {
    const doubt = doubtAbout(moment, candidate.test, band)
    if (doubt) {
      doubted ??= { state: 'in-doubt', by: candidate, doubt }
      if (candidate.finding.finding === 'fail') return doubted
      continue
    }
    const powerW = candidate.finding.powerW ?? 0
    if (candidate.finding.finding === 'fail') {
      if (!failed || powerW < (failed.finding.powerW ?? 0)) failed = candidate
      continue
    }
    if (failed && powerW >= (failed.finding.powerW ?? 0)) continue
    return passed(moment, { subjectId, rule, band }, candidate, failed)
  }
  if (failed) return { state: 'out', failed }
  return doubted ?? { state: 'untested' }
}

function passed(
  moment: Moment,
  { subjectId, rule, band }: { subjectId: string; rule: Rule | undefined; band: Band },
  by: Candidate,
  failed: Candidate | null,
): HeatStanding {
  const dueOn = dueOf(by.test, rule)
  const late = openRaisedChecks(moment, subjectId).some(
    (check) =>
      check.procedure === 'heat-test' &&
      (check.band === null || check.band === band) &&
      moment.passedAt(check.dueOn) <= moment.at,
  )
  if (late || (dueOn !== null && moment.passedAt(dueOn) <= moment.at)) return { state: 'lapsed', by }
  const asked = Number(rule?.limits.powerW ?? 0)
  const powerW = by.finding.powerW ?? asked
  if (!failed && powerW >= asked) return { state: 'good', by }
  return { state: 'capped', capW: powerW, by, failed }
}
