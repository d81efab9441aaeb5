import { addMonths, type PlainDate } from '../plain-date.ts'
import type { Category, Procedure } from '../vocabulary.ts'
import type { EpochMs, ItemFacts, KitState, Policy, Rule } from './types.ts'

/** The policy in force at an instant; before the first takes effect, the first. Undefined only when there is none. */
export function policyAt(state: Pick<KitState, 'policies'>, at: EpochMs): Policy | undefined {
  return state.policies.findLast((policy) => policy.effectiveFrom <= at) ?? state.policies[0]
}

/** What a rule is asked about: an item's category and facts, or a kit, which has neither. */
export interface RuleSubject {
  readonly category: Category | 'kit'
  readonly facts: ItemFacts
}

/** The rules of a policy that mean this subject on this local day. */
export function rulesFor(policy: Policy | undefined, subject: RuleSubject, today: PlainDate): Rule[] {
  return (policy?.rules ?? []).filter(
    (rule) => rule.category === subject.category && appliesTo(rule, subject, today),
  )
}

export function ruleFor(
  policy: Policy | undefined,
  subject: RuleSubject,
  procedure: Procedure,
  today: PlainDate,
): Rule | undefined {
  return rulesFor(policy, subject, today).find((rule) => rule.procedure === procedure)
}

/** All conditions hold. An item of unknown age counts as old: the stricter rule is the honest one. */
function appliesTo(rule: Rule, { facts }: RuleSubject, today: PlainDate): boolean {
  const { chemistry, minAgeYears } = rule.applies as { chemistry?: string; minAgeYears?: number }
  if (chemistry !== undefined && chemistry !== facts.chemistry) return false
  if (minAgeYears === undefined || facts.acquiredOn === undefined) return true
  return ageReachedOn(facts.acquiredOn, minAgeYears) <= today
}

/** The day from which an item has this age. */
export function ageReachedOn(acquiredOn: PlainDate, years: number): PlainDate {
  return addMonths(acquiredOn, Math.round(years * 12))
}
