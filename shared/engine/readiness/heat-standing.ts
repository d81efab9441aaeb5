import type { Band } from '../vocabulary.ts'
import { doubtAbout, openRecall, type Doubt } from './doubt.ts'
import type { Moment } from './moment.ts'
import { bandsNamed } from './rules-in-force.ts'
import {
  candidates,
  dueOf,
  hasPassed,
  lateRaisedCheck,
  openRaisedChecks,
  type Candidate,
} from './standing.ts'
import type { RaisedCheck, Rule } from './types.ts'

/** What the heat tests of a transformer say about one band. */
export type HeatStanding =
  /** The band has no heat test of its own and the policy asks for none: efficiency speaks for it. */
  | { readonly state: 'not-asked' }
  | { readonly state: 'never' }
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
  /** `by` is null where an event asked for a first test. */
  | { readonly state: 'lapsed'; readonly by: Candidate | null; readonly raised: RaisedCheck | null }
  /** `by` is null where a recall came before any test. */
  | { readonly state: 'in-doubt'; readonly by: Candidate | null; readonly doubt: Doubt }

const HEAT = ['heat-test'] as const

interface HeatAsked {
  readonly subjectId: string
  readonly procedures: typeof HEAT
  readonly rule: Rule | undefined
  readonly band: Band
}

/**
 * A failure at a power closes that power and all above it for older passes; of the passes left, the highest in date is
 * what the band stands on. A rule that names bands asks for a heat test on each of them; a rule that names none asks
 * for one of the transformer, and a band without one of its own is judged by efficiency.
 */
export function heatStanding(
  moment: Moment,
  subjectId: string,
  rule: Rule | undefined,
  band: Band,
): HeatStanding {
  const asked: HeatAsked = { subjectId, procedures: HEAT, rule, band }
  const { passes, failed, doubted } = sort(moment, asked)
  const late = lateRaisedCheck(moment, asked)
  const [best] = passes.filter(({ test }) => !late && !hasPassed(moment, dueOf(test, rule)))
  if (best) return standsOn(moment, asked, best, failed)
  const without = withoutOwnTest(moment, asked)
  if (!failed && without.state === 'not-asked') return without
  if (doubted) return doubted
  if (passes[0]) return { state: 'lapsed', by: passes[0], raised: late ?? null }
  return failed ? { state: 'out', failed } : without
}

interface Sorted {
  /** Not in doubt and below every newer failure; highest power first, newest first at one power. */
  readonly passes: readonly Candidate[]
  /** The failure at the lowest power among those that are newer than the passes. */
  readonly failed: Candidate | null
  readonly doubted: Doubted | null
}

interface Doubted {
  readonly state: 'in-doubt'
  readonly by: Candidate
  readonly doubt: Doubt
}

function sort(moment: Moment, asked: HeatAsked): Sorted {
  const passes: Candidate[] = []
  let failed: Candidate | null = null
  let doubted: Doubted | null = null
  for (const candidate of candidates(moment, asked)) {
    const doubt = doubtAbout(moment, candidate.test, asked.band)
    const fails = candidate.finding.finding === 'fail'
    if (doubt) {
      // A pass in doubt hides no failure that is sure, and a failure in doubt softens none.
      if (!failed || (!fails && powerOf(candidate) < powerOf(failed)))
        doubted ??= { state: 'in-doubt', by: candidate, doubt }
      // What is older than a doubted failure cannot be relied on either.
      if (fails) break
    } else if (fails) {
      if (!isRefuted(candidate, passes) && (!failed || powerOf(candidate) < powerOf(failed)))
        failed = candidate
    } else if (!failed || powerOf(candidate) < powerOf(failed)) passes.push(candidate)
  }
  passes.sort((a, b) => powerOf(b) - powerOf(a) || b.test.performedAt - a.test.performedAt)
  const hides = doubted && failed && powerOf(doubted.by) >= powerOf(failed)
  return { passes, failed, doubted: hides ? null : doubted }
}

/** Passed since at the same power or more: the failure is answered. */
function isRefuted(failure: Candidate, newer: readonly Candidate[]): boolean {
  return newer.some((pass) => powerOf(pass) >= powerOf(failure))
}

function powerOf({ finding }: Candidate): number {
  return finding.powerW ?? 0
}

function standsOn(moment: Moment, asked: HeatAsked, by: Candidate, failed: Candidate | null): HeatStanding {
  const askedW = askedPower(asked.rule)
  const powerW = by.finding.powerW ?? askedW
  if (failed) return { state: 'capped', capW: powerW, by, failed }
  if (powerW >= askedW) return { state: 'good', by }
  // Passed at less than the rule's power: better than no test where one is asked for, and never worse.
  const without = withoutOwnTest(moment, asked)
  return without.state === 'not-asked' ? without : { state: 'capped', capW: powerW, by, failed }
}

function askedPower(rule: Rule | undefined): number {
  return typeof rule?.limits.powerW === 'number' ? rule.limits.powerW : 0
}

/** What a band is without a full heat test of its own. */
function withoutOwnTest(moment: Moment, { subjectId, rule, band }: HeatAsked): HeatStanding {
  const recall = openRecall(moment, subjectId, 'heat-test', band)
  if (recall) return { state: 'in-doubt', by: null, doubt: { kind: 'recall', check: recall } }
  const raised = openRaisedChecks(moment, subjectId, band).find(
    (check) => check.band === band && check.procedure === 'heat-test' && hasPassed(moment, check.dueOn),
  )
  if (raised) return { state: 'lapsed', by: null, raised }
  if (!rule) return { state: 'not-asked' }
  const named = bandsNamed(rule)
  if (named) return { state: named.includes(band) ? 'never' : 'not-asked' }
  const elsewhere = candidates(moment, { subjectId, procedures: HEAT, band: null })
  const by = elsewhere.find(({ finding }) => (finding.powerW ?? Infinity) >= askedPower(rule))
  if (!by) return { state: 'never' }
  const lapsed = hasPassed(moment, dueOf(by.test, rule))
  return lapsed ? { state: 'lapsed', by, raised: null } : { state: 'not-asked' }
}
