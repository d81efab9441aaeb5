import { describe, expect, it } from 'vitest'
import { acceptanceTests } from '#shared/engine/builds/acceptance.ts'
import { dossierOf, momentOf } from '#shared/engine/readiness/moment.ts'
import type { KitState, Rule } from '#shared/engine/readiness/types.ts'

const rule = (fields: Partial<Rule>): Rule => ({
  id: 'r',
  category: 'transformer',
  procedure: 'heat-test',
  intervalMonths: 12,
  warningDays: 30,
  vital: true,
  applies: {},
  limits: { powerW: 50, minutes: 10, maxC: 85 },
  ...fields,
})

function momentWith(rules: readonly Rule[]) {
  const state: KitState = {
    kit: { id: 'k', designation: '', availability: 'available', availabilityReason: '', sealMatches: true },
    promise: { bands: [], modes: [], watts: null, hours: null },
    positions: [],
    items: [],
    evidence: [],
    instruments: [],
    raisedChecks: [],
    decisions: [],
    policies: [{ id: 'p', name: 'P', effectiveFrom: 0, rules, settings: {} }],
    zone: 'UTC',
  }
  return momentOf(dossierOf(state), Date.parse('2026-06-01T12:00:00Z'))
}

describe('the acceptance of a new unit', () => {
  it('asks for loss and heat on every band promised, the highest too, by the rules in force', () => {
    const rules = [
      rule({ applies: { bands: ['40 m'] } }),
      rule({ procedure: 'pair-loss', limits: { minEfficiency: 0.85 } }),
    ]
    const asked = acceptanceTests(momentWith(rules), { category: 'transformer', bands: ['10 m', '40 m'] })
    expect(asked).toEqual([
      { band: '40 m', procedure: 'pair-loss', asks: '85 % passed on, at least' },
      { band: '40 m', procedure: 'heat-test', asks: '50 W for 10 min, below 85 °C' },
      { band: '10 m', procedure: 'pair-loss', asks: '85 % passed on, at least' },
      { band: '10 m', procedure: 'heat-test', asks: '50 W for 10 min, below 85 °C' },
    ])
  })

  it('asks by the rule of its own that a band has', () => {
    const rules = [
      rule({}),
      rule({ applies: { bands: ['10 m'] }, limits: { powerW: 20, minutes: 5, maxC: 70 } }),
    ]
    const asked = acceptanceTests(momentWith(rules), { category: 'transformer', bands: ['40 m', '10 m'] })
    expect(asked.filter(({ procedure }) => procedure === 'heat-test').map(({ asks }) => asks)).toEqual([
      '50 W for 10 min, below 85 °C',
      '20 W for 5 min, below 70 °C',
    ])
  })

  it('asks an antenna for a sweep, and by the first policy where no rule does', () => {
    expect(acceptanceTests(momentWith([]), { category: 'antenna', bands: ['20 m'] })).toEqual([
      { band: '20 m', procedure: 'antenna-sweep', asks: 'SWR 2.5 at most at the working points' },
    ])
  })
})
