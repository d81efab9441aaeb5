import { describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { KitState, Policy } from '#shared/engine/readiness/types.ts'
import { bandOf, periodAt, verdictAt } from './support/answers.ts'
import { at } from './support/instants.ts'
import { retested, withItem } from './support/kits.ts'
import { capacity } from './support/evidence.ts'
import { aRule, DEMO_1, DEMO_RULES, demoPolicy } from './support/policy.ts'
import { HF, SOON, TESTED_ON, VHF } from './support/sample-kits.ts'

const EFFECTIVE = at('2026-10-01')
const second = (policy: Policy): Policy => ({
  ...policy,
  id: 'DEMO-2',
  name: 'DEMO-2',
  effectiveFrom: EFFECTIVE,
})
const under = (kit: KitState, policy: Policy): KitState => ({ ...kit, policies: [DEMO_1, second(policy)] })

describe('a new version of the policy', () => {
  const shorter = under(HF, demoPolicy('antenna-sweep', { intervalMonths: 3 }))

  it('takes effect at its instant and not before', () => {
    expect(verdictAt(shorter, EFFECTIVE - 1)).toBe('proven')
    expect(verdictAt(shorter, EFFECTIVE)).toBe('not-proven')
    expect(kitTimeline(shorter, at(SOON)).map(({ from }) => from)).toContain(EFFECTIVE)
  })

  it('does not reach back: what lapsed under the old one stays lapsed until it takes effect', () => {
    const longer = under(HF, demoPolicy('count', { intervalMonths: 24 }))
    // Counted on 1 June: lapsed since 2 December, had the new version not come in October.
    expect(verdictAt(longer, at('2026-12-02'))).toBe('proven')
    expect(verdictAt({ ...HF, policies: [DEMO_1] }, at('2026-12-02'))).toBe('not-proven')
  })

  it('can turn a vital check into an advisory one', () => {
    const advisory = under(HF, demoPolicy('count', { vital: false }))
    expect(verdictAt(advisory, at('2026-12-02'))).toBe('proven-with-limits')
  })

  it('can drop a check', () => {
    const rules = DEMO_RULES.filter(({ procedure }) => procedure !== 'count')
    expect(verdictAt(under(HF, { ...DEMO_1, rules }), at('2026-12-02'))).toBe('proven')
  })

  it('leaves findings as they were judged on their day', () => {
    const strict = under(HF, demoPolicy('pair-loss', { limits: { minEfficiency: 0.99 } }))
    expect(verdictAt(strict, EFFECTIVE)).toBe('proven')
  })

  it('is not asked before the first one takes effect', () => {
    const early = { ...DEMO_1, effectiveFrom: at('2026-09-01') }
    expect(verdictAt({ ...HF, policies: [early] }, at(SOON))).toBe('proven')
  })
})

describe('the conditions of a rule', () => {
  const agm = (acquiredOn: string) => {
    const facts = { chemistry: 'agm', ratedAh: 120, acquiredOn }
    const kit = withItem(VHF, 'BAT-92', { facts })
    return retested(kit, capacity('BAT-92', 95, TESTED_ON))
  }
  const rules = [
    ...DEMO_RULES.filter(({ procedure }) => procedure !== 'battery-capacity'),
    aRule({
      category: 'battery',
      procedure: 'battery-capacity',
      applies: { chemistry: 'agm', minAgeYears: 3 },
      intervalMonths: 4,
    }),
  ]
  const aging = (acquiredOn: string) => ({ ...agm(acquiredOn), policies: [{ ...DEMO_1, rules }] })

  it('ask by chemistry: lead-acid twice a year, lithium once', () => {
    expect(verdictAt(agm('2020-01-01'), at('2026-12-02'))).toBe('not-proven')
    const reasons = (kit: KitState) => periodAt(kit, at('2026-12-02')).reasons.map(({ itemId }) => itemId)
    expect(reasons(agm('2020-01-01'))).toContain('BAT-92')
    expect(reasons(VHF)).not.toContain('BAT-92')
  })

  it('ask from the day on which the item has the age', () => {
    const threeOn = aging('2023-11-05')
    expect(verdictAt(threeOn, at('2026-11-05') - 1)).toBe('proven')
    expect(verdictAt(threeOn, at('2026-11-05'))).toBe('not-proven')
    expect(kitTimeline(threeOn, at(SOON)).map(({ from }) => from)).toContain(at('2026-11-05'))
  })

  it('ask of bands that are named, once the rule names them', () => {
    const all = demoPolicy('heat-test', { applies: { bands: ['40 m', '20 m', '15 m', '10 m'] } })
    const period = periodAt({ ...HF, policies: [all] }, at(SOON))
    expect(bandOf(period, '15 m').state).toBe('not-proven')
  })
})

describe('without a policy', () => {
  it('nothing is asked for beyond what is there', () => {
    expect(verdictAt({ ...HF, policies: [] }, at(SOON))).toBe('proven')
  })
})
