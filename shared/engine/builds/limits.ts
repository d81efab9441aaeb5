import { limitsOf } from '../policy/limits.ts'
import type { Moment } from '../readiness/moment.ts'
import { ruleFor } from '../readiness/rules-in-force.ts'
import type { Rule } from '../readiness/types.ts'
import type { Band, Category, Procedure } from '../vocabulary.ts'
import type { BuildMeasure } from './matching.ts'

/** A heat test's limit is a temperature; as a rise per watt it holds from this ambient on. Our choice. */
export const LIMIT_AMBIENT_C = 25

/** The policy's limit of a measure on a band today; null where no rule asks for it. */
export function limitOf(
  moment: Moment,
  { category, measure, band }: { category: Category; measure: BuildMeasure; band: Band },
): number | null {
  const rule = (procedure: Procedure): Rule | undefined => {
    const subject = { category, facts: {} }
    return (
      ruleFor(moment.policy, subject, procedure, moment.today, band) ??
      ruleFor(moment.policy, subject, procedure, moment.today)
    )
  }
  if (measure === 'lossDb') return lossLimit(rule('pair-loss') ?? rule('open-short-load'))
  if (measure === 'swr') return swrLimit(rule('antenna-sweep'))
  return heatLimit(rule('heat-test'))
}

function lossLimit(rule: Rule | undefined): number | null {
  if (!rule) return null
  const { minEfficiency } = limitsOf('pair-loss', rule)
  return minEfficiency > 0 ? -10 * Math.log10(minEfficiency) + 0 : null
}

const swrLimit = (rule: Rule | undefined) => (rule ? limitsOf('antenna-sweep', rule).maxSwr : null)

function heatLimit(rule: Rule | undefined): number | null {
  if (!rule) return null
  const { maxC, powerW } = limitsOf('heat-test', rule)
  return (maxC - LIMIT_AMBIENT_C) / powerW
}
