import type { Policy, Rule } from '#shared/engine/readiness/types.ts'
import { at } from './instants.ts'

type RulePart = Pick<Rule, 'category' | 'procedure'> & Partial<Rule>

export function aRule(part: RulePart): Rule {
  return {
    id: `${part.category} ${part.procedure} ${JSON.stringify(part.applies ?? {})}`,
    intervalMonths: 12,
    warningDays: 30,
    vital: true,
    applies: {},
    limits: {},
    ...part,
  }
}

const CALIBRATED = ['analyzer', 'wattmeter', 'thermometer', 'battery-tester', 'multimeter'] as const

/** Section 4 of the demo scenario. */
export const DEMO_RULES: readonly Rule[] = [
  aRule({
    category: 'transformer',
    procedure: 'heat-test',
    applies: { bands: ['40 m', '20 m', '10 m'] },
    limits: { powerW: 50, minutes: 10, maxC: 85, maxSwrChange: 0.2 },
  }),
  aRule({ category: 'transformer', procedure: 'pair-loss', limits: { minEfficiency: 0.8 } }),
  aRule({ category: 'antenna', procedure: 'antenna-sweep', limits: { maxSwr: 2.5 } }),
  aRule({ category: 'feedline', procedure: 'feedline-loss', limits: { maxRiseDb: 0.8 } }),
  aRule({ category: 'radio', procedure: 'radio-check', limits: { minPowerFraction: 0.8 } }),
  aRule({
    category: 'battery',
    procedure: 'battery-capacity',
    applies: { chemistry: 'lifepo4' },
    limits: { minCapacityFraction: 0.8 },
  }),
  aRule({
    category: 'battery',
    procedure: 'battery-capacity',
    applies: { chemistry: 'agm' },
    intervalMonths: 6,
    limits: { minCapacityFraction: 0.8 },
  }),
  aRule({ category: 'kit', procedure: 'count', intervalMonths: 6 }),
  aRule({
    category: 'computer',
    procedure: 'boot-and-update',
    intervalMonths: 1,
    warningDays: 7,
    vital: false,
    limits: { voiceOnlyAfterMonths: 3 },
  }),
  ...CALIBRATED.map((category) => aRule({ category, procedure: 'calibration' })),
]

/** The demo judges at 20 °C and draws lithium to 10 %, lead-acid to half. */
export const DEMO_1: Policy = {
  id: 'DEMO-1',
  name: 'DEMO-1',
  effectiveFrom: at('2025-09-01'),
  rules: DEMO_RULES,
  settings: { usableFraction: { lifepo4: 0.9, agm: 0.5 }, enduranceC: 20, temperatureFactor: 1, peukert: 1 },
}

/** The demo policy with the rules of one procedure changed. */
export function demoPolicy(procedure: Rule['procedure'], change: Partial<Rule>, part: Partial<Policy> = {}) {
  const rules = DEMO_RULES.map((rule) => (rule.procedure === procedure ? { ...rule, ...change } : rule))
  return { ...DEMO_1, rules, ...part }
}
