import { describe, expect, it } from 'vitest'
import { ruleOfTest } from '#server/services/evidence/rule-of-test.ts'
import type { Policy, Rule } from '#shared/engine/readiness/types.ts'
import type { Procedure } from '#shared/engine/vocabulary.ts'

const rule = (id: string, procedure: Procedure, applies: Rule['applies'] = {}): Rule => ({
  id,
  category: 'transformer',
  procedure,
  intervalMonths: 12,
  warningDays: 30,
  vital: true,
  applies,
  limits: {},
})

const policyOf = (...rules: Rule[]): Policy => ({ id: 'p', name: 'P', effectiveFrom: 0, rules, settings: {} })
const subject = { category: 'transformer', facts: {} } as const
const on = '2026-06-01'

describe('the rule that a test is judged by', () => {
  it('is that of the band of a heat test, else that of the others', () => {
    const policy = policyOf(
      rule('low', 'heat-test', { bands: ['40 m'] }),
      rule('high', 'heat-test', { bands: ['10 m'] }),
    )
    const of = (band: '10 m' | '20 m' | '40 m') =>
      ruleOfTest(policy, { subject, procedure: 'heat-test', on, band })?.id
    expect([of('40 m'), of('10 m')]).toEqual(['low', 'high'])
    expect(of('20 m')).toBeDefined()
  })

  it('is one for both ways of measuring an efficiency, whichever the policy names', () => {
    const pair = policyOf(rule('pair', 'pair-loss'))
    expect(ruleOfTest(pair, { subject, procedure: 'open-short-load', on })?.id).toBe('pair')
    const sweep = policyOf(rule('sweep', 'open-short-load'))
    expect(ruleOfTest(sweep, { subject, procedure: 'pair-loss', on })?.id).toBe('sweep')
    const both = policyOf(rule('pair', 'pair-loss'), rule('sweep', 'open-short-load'))
    expect(ruleOfTest(both, { subject, procedure: 'open-short-load', on })?.id).toBe('sweep')
  })

  it('is none where the policy asks for nothing of the kind', () => {
    expect(ruleOfTest(policyOf(), { subject, procedure: 'heat-test', on, band: '10 m' })).toBeUndefined()
    expect(
      ruleOfTest(policyOf(rule('pair', 'pair-loss')), { subject, procedure: 'heat-test', on }),
    ).toBeUndefined()
  })
})
