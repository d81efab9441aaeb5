import { addMonths, type PlainDate } from '../plain-date.ts'
import type { Band, Category, Procedure } from '../vocabulary.ts'
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

/** Every rule of a policy that means this subject on this local day; several may mean one procedure. */
export function rulesFor(policy: Policy | undefined, subject: RuleSubject, today: PlainDate): Rule[] {
  return (policy?.rules ?? []).filter(
    (rule) => rule.category === subject.category && appliesTo(rule, subject, today),
  )
}

/**
 * The rule that asks this procedure of a subject, on a band where one is given. Of several the one that names more of
 * the subject (its chemistry, the band) goes before a general one, then the stricter: age only ever adds strictness.
 */
export function ruleFor(
  policy: Policy | undefined,
  subject: RuleSubject,
  procedure: Procedure,
  today: PlainDate,
  band: Band | null = null,
): Rule | undefined {
  let best: Rule | undefined
  for (const rule of policy?.rules ?? []) {
    if (rule.procedure !== procedure || rule.category !== subject.category) continue
    if (!asksOnBand(rule, band) || !appliesTo(rule, subject, today)) continue
    if (!best || precedes(rule, best)) best = rule
  }
  return best
}

/** The bands that a rule names; null: it asks without naming any. */
export function bandsNamed(rule: Rule): readonly Band[] | null {
  return Array.isArray(rule.applies.bands) ? (rule.applies.bands as readonly Band[]) : null
}

function asksOnBand(rule: Rule, band: Band | null): boolean {
  return band === null || (bandsNamed(rule)?.includes(band) ?? true)
}

function precedes(rule: Rule, other: Rule): boolean {
  const named = conditionsNamed(rule) - conditionsNamed(other)
  if (named !== 0) return named > 0
  const [months, others] = [rule.intervalMonths ?? Infinity, other.intervalMonths ?? Infinity]
  return months === others ? rule.vital && !other.vital : months < others
}

function conditionsNamed({ applies }: Rule): number {
  return Number(applies.chemistry !== undefined) + Number(applies.bands !== undefined)
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
