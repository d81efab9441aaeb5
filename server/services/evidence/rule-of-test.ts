import type { PlainDate } from '#shared/engine/plain-date.ts'
import { ruleFor, type RuleSubject } from '#shared/engine/readiness/rules-in-force.ts'
import type { Policy, Rule } from '#shared/engine/readiness/types.ts'
import type { Band, Procedure } from '#shared/engine/vocabulary.ts'

interface Asked {
  readonly subject: RuleSubject
  readonly procedure: Procedure
  readonly on: PlainDate
  /** Of a heat test, which is about one band; a band that no rule names is tested the way that the others are. */
  readonly band?: Band | null
}

/** Both ways of measuring an efficiency are held to one limit, whichever of them the policy names. */
const ALSO: Partial<Record<Procedure, Procedure>> = {
  'open-short-load': 'pair-loss',
  'pair-loss': 'open-short-load',
}

/** The rule that a test is judged by; the form of a test and the test itself ask here, so that they agree. */
export function ruleOfTest(policy: Policy, { subject, procedure, on, band = null }: Asked): Rule | undefined {
  const other = ALSO[procedure]
  return (
    (band === null ? undefined : ruleFor(policy, subject, procedure, on, band)) ??
    ruleFor(policy, subject, procedure, on) ??
    (other && ruleFor(policy, subject, other, on))
  )
}
