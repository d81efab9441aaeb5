import { addDays, addMonths, type PlainDate } from '../plain-date.ts'
import { voiceOnlyMonths } from './modes.ts'
import type { Dossier } from './moment.ts'
import { ageReachedOn } from './rules-in-force.ts'
import type { EpochMs, Evidence, KitState, Rule } from './types.ts'

/**
 * The instants after `from` at which something may change by itself: a check falls due, a raised check runs out, an
 * item reaches an age that a rule names, a decision begins or ends, a policy takes effect. Rising, each once.
 */
export function eventTimes(dossier: Dossier, from: EpochMs): EpochMs[] {
  const { state } = dossier
  const times = new Set<EpochMs>()
  const add = (at: EpochMs | null) => {
    if (at !== null && at > from) times.add(at)
  }
  for (const day of dueDays(state)) add(dossier.passedAt(day))
  for (const { raisedAt, dueOn } of state.raisedChecks) {
    add(raisedAt)
    add(dossier.passedAt(dueOn))
  }
  // A rule about age holds from the birthday itself, which begins when the day before has passed.
  for (const day of birthdays(state)) add(dossier.passedAt(addDays(day, -1)))
  for (const { from: begins, until } of state.decisions) {
    add(begins)
    add(until)
  }
  for (const { effectiveFrom } of state.policies) add(effectiveFrom)
  for (const { recordedAt } of state.evidence) add(recordedAt)
  return [...times].sort((a, b) => a - b)
}

/** Every day on which a test may run out under any version of the policy. */
function dueDays(state: KitState): Set<PlainDate> {
  const rules = groupRules(state)
  const days = new Set<PlainDate>()
  for (const test of state.evidence) {
    for (const months of monthsOf(test, rules)) days.add(addMonths(test.performedOn, months))
  }
  return days
}

function monthsOf(test: Evidence, rules: ReadonlyMap<string, ReadonlySet<number>>): Iterable<number> {
  return rules.get(test.procedure) ?? []
}

function groupRules(state: KitState): Map<string, Set<number>> {
  const months = new Map<string, Set<number>>()
  const add = (rule: Rule, value: number | null) => {
    if (value === null) return
    // Either way of measuring efficiency is judged by the rule of the one that the policy names.
    const twins = EFFICIENCY.includes(rule.procedure) ? EFFICIENCY : [rule.procedure]
    for (const procedure of twins)
      months.set(procedure, (months.get(procedure) ?? new Set<number>()).add(value))
  }
  for (const rule of state.policies.flatMap((policy) => policy.rules)) {
    add(rule, rule.intervalMonths)
    add(rule, voiceOnlyMonths(rule))
  }
  return months
}

const EFFICIENCY: readonly string[] = ['pair-loss', 'open-short-load']

function birthdays(state: KitState): PlainDate[] {
  const ages = new Set(
    state.policies
      .flatMap(({ rules }) => rules.map(({ applies }) => applies.minAgeYears))
      .filter((age) => age !== undefined),
  )
  return state.items.flatMap(({ facts: { acquiredOn } }) =>
    acquiredOn === undefined ? [] : [...ages].map((age) => ageReachedOn(acquiredOn, Number(age))),
  )
}
