import type { AntennaSweepLimits } from '../procedures/antenna-sweep.ts'
import type { BatteryCapacityLimits } from '../procedures/battery-capacity.ts'
import type { FeedlineLossLimits } from '../procedures/feedline-loss.ts'
import type { HeatTestLimits } from '../procedures/heat-test.ts'
import type { PairLossLimits } from '../procedures/pair-loss.ts'
import type { RadioCheckLimits } from '../procedures/radio-check.ts'
import type { Procedure } from '../vocabulary.ts'
import { DEFAULT_POLICY } from './default-policy.ts'

/** The limits that a rule of each procedure carries; procedures that are not named carry none. */
export interface LimitsByProcedure {
  readonly 'heat-test': HeatTestLimits
  readonly 'pair-loss': PairLossLimits
  readonly 'open-short-load': PairLossLimits
  readonly 'antenna-sweep': AntennaSweepLimits
  readonly 'feedline-loss': FeedlineLossLimits
  readonly 'battery-capacity': BatteryCapacityLimits
  readonly 'radio-check': RadioCheckLimits
}

type Limited = keyof LimitsByProcedure

/**
 * The limits of a rule as its procedure knows them; without a rule, those of the policy that every group begins with,
 * so that a test of something that no rule asks for still gets a finding.
 */
export function limitsOf<P extends Limited>(
  procedure: P,
  rule: { readonly limits: Readonly<Record<string, unknown>> } | undefined,
): LimitsByProcedure[P] {
  const limits = rule?.limits ?? defaultLimits(procedure)
  // The contract checks the limits of every rule by its procedure when the policy is stored.
  return limits as unknown as LimitsByProcedure[P]
}

function defaultLimits(procedure: Procedure): Readonly<Record<string, unknown>> {
  // Both ways of measuring an efficiency are held to one limit.
  const named = procedure === 'open-short-load' ? 'pair-loss' : procedure
  const rule = DEFAULT_POLICY.rules.find((candidate) => candidate.procedure === named)
  if (!rule) throw new Error(`The first policy has no rule for ${procedure}.`)
  return rule.limits
}
