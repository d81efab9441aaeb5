import { describe, expect, it } from 'vitest'
import { checksAt } from '#shared/engine/readiness/checks.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { Procedure } from '#shared/engine/vocabulary.ts'
import { DEFAULT_POLICY } from '#shared/engine/policy/default-policy.ts'
import { capacity, heatTest, radioCheck, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withItem, withoutTests, withTests } from './support/kits.ts'
import { calibration, count } from './support/more-evidence.ts'
import { DEMO_1 } from './support/policy.ts'
import { HF, SOON, TESTED_ON, VHF } from './support/sample-kits.ts'

function checkOf(kit: KitState, subjectId: string, procedure: Procedure, when = at(SOON)): CheckState {
  const found = checksAt(kit, when).filter(
    (check) => check.subjectId === subjectId && check.procedure === procedure,
  )
  expect(found).toHaveLength(1)
  return found[0]!
}

describe('the checks of a kit', () => {
  it('list each subject and procedure once, the kit first, then by the load plan', () => {
    expect(checksAt(HF, at(SOON)).map(({ subjectId, procedure }) => `${subjectId} ${procedure}`)).toEqual([
      'K-90 count',
      'RAD-90 radio-check',
      'XFM-90 heat-test',
      'XFM-90 pair-loss',
      'ANT-90 antenna-sweep',
      'FDL-90 feedline-loss',
      'BAT-901 battery-capacity',
      'BAT-902 battery-capacity',
    ])
  })

  it('carry the test, its day and the day on which it is due', () => {
    expect(checkOf(HF, 'ANT-90', 'antenna-sweep')).toMatchObject({
      state: 'current',
      vital: true,
      testedOn: TESTED_ON,
      dueOn: '2027-06-01',
      finding: 'pass',
      positionId: 'wire',
      band: null,
      because: '',
    })
  })
})

describe('the state of a check', () => {
  const sweepAt = (when: string) => checkOf(HF, 'ANT-90', 'antenna-sweep', at(when)).state

  it('is due soon from thirty days before its day, overdue from the midnight after it', () => {
    expect(sweepAt('2027-05-01 23:59')).toBe('current')
    expect(sweepAt('2027-05-02')).toBe('due-soon')
    expect(sweepAt('2027-06-01 23:59')).toBe('due-soon')
    expect(sweepAt('2027-06-02')).toBe('overdue')
  })

  it('is never where nothing was tested', () => {
    const kit = withoutTests(HF, ({ subjectId }) => subjectId === 'ANT-90')
    expect(checkOf(kit, 'ANT-90', 'antenna-sweep')).toMatchObject({
      state: 'never',
      testId: null,
      dueOn: null,
    })
  })

  it('is failed, with the band and what was found', () => {
    const kit = withTests(HF, sweep('ANT-90', { '40 m': 3 }, '2026-06-10'))
    expect(checkOf(kit, 'ANT-90', 'antenna-sweep')).toMatchObject({
      state: 'failed',
      band: '40 m',
      finding: 'fail',
      because: 'SWR 3',
    })
  })

  it('is overdue once the day of a failed test has passed', () => {
    const kit = retested(VHF, capacity('BAT-92', 70, TESTED_ON))
    expect(checkOf(kit, 'BAT-92', 'battery-capacity', at('2027-06-01 12:00')).state).toBe('failed')
    expect(checkOf(kit, 'BAT-92', 'battery-capacity', at('2027-06-02')).state).toBe('overdue')
  })

  it('is in doubt where the instrument had lapsed', () => {
    const kit = {
      ...withTests(
        retested(VHF, radioCheck('RAD-92', { '2 m': 50 }, { on: '2026-06-05', with: 'WTM-1' }, 50)),
        calibration('WTM-1', '2025-01-01'),
      ),
      instruments: [{ id: 'WTM-1', designation: 'WTM-1', category: 'wattmeter' as const }],
    }
    expect(checkOf(kit, 'RAD-92', 'radio-check')).toMatchObject({ state: 'in-doubt', testedOn: '2026-06-05' })
  })

  it('is failed on the band that a heat test capped, and overdue when the pass under it lapses', () => {
    const base = withoutTests(HF, ({ id }) => id.startsWith('XFM-90 heat-test 10 m'))
    const kit = withTests(
      base,
      heatTest('XFM-90', '10 m', '2026-06-02', { stoppedAtMin: 8 }),
      heatTest('XFM-90', '10 m', '2026-06-03', { powerW: 20 }),
    )
    expect(checkOf(kit, 'XFM-90', 'heat-test')).toMatchObject({
      state: 'failed',
      band: '10 m',
      dueOn: '2027-06-03',
      because: 'reached 85 °C after 8 min',
    })
    expect(checkOf(kit, 'XFM-90', 'heat-test', at('2027-06-04')).state).toBe('overdue')
  })

  it('is never for a band that the rule names and nobody tried', () => {
    const kit = withoutTests(HF, ({ id }) => id.startsWith('XFM-90 heat-test 10 m'))
    expect(checkOf(kit, 'XFM-90', 'heat-test')).toMatchObject({ state: 'never', band: '10 m' })
  })

  it('takes the earliest day where the bands of one check differ', () => {
    const kit = withTests(HF, sweep('ANT-90', { '40 m': 1.5 }, '2026-06-10'))
    expect(checkOf(kit, 'ANT-90', 'antenna-sweep').dueOn).toBe('2027-06-01')
  })

  it('stays current for the count of a kit on issue', () => {
    const kit = {
      ...retested(HF, count(HF, '2026-03-10')),
      kit: { ...HF.kit, availability: 'assigned' as const, assignedAt: at('2026-09-01') },
    }
    expect(checkOf(kit, 'K-90', 'count', at('2026-10-01')).state).toBe('current')
  })
})

describe('a check that an event asked for', () => {
  const raised: KitState = {
    ...HF,
    raisedChecks: [
      {
        id: 'drop',
        subjectId: 'XFM-90',
        procedure: 'heat-test',
        band: null,
        reason: 'dropped',
        doubtsEarlier: false,
        raisedAt: at('2026-06-05'),
        dueOn: '2026-06-30',
      },
    ],
  }

  it('is due soon from the event, whatever the calendar says', () => {
    expect(checkOf(HF, 'XFM-90', 'heat-test').state).toBe('current')
    expect(checkOf(raised, 'XFM-90', 'heat-test')).toMatchObject({
      state: 'due-soon',
      dueOn: '2026-06-30',
      because: 'dropped',
    })
  })

  it('is overdue the midnight after its day', () => {
    expect(checkOf(raised, 'XFM-90', 'heat-test', at('2026-06-30 23:59')).state).toBe('due-soon')
    expect(checkOf(raised, 'XFM-90', 'heat-test', at('2026-07-01')).state).toBe('overdue')
  })

  it('wants every band that the rule names', () => {
    const one = withTests(raised, heatTest('XFM-90', '10 m', '2026-06-08'))
    expect(checkOf(one, 'XFM-90', 'heat-test').state).toBe('due-soon')
    const all = withTests(
      one,
      heatTest('XFM-90', '20 m', '2026-06-08'),
      heatTest('XFM-90', '40 m', '2026-06-08'),
    )
    expect(checkOf(all, 'XFM-90', 'heat-test').state).toBe('current')
  })
})

describe('two rules for one procedure', () => {
  const rules = DEFAULT_POLICY.rules.map((rule, index) => ({ ...rule, id: `rule ${index}` }))
  const aged = (acquiredOn: string) => {
    const facts = { chemistry: 'agm', ratedAh: 35, acquiredOn }
    return { ...withItem(VHF, 'BAT-92', { facts }), policies: [{ ...DEMO_1, rules }] }
  }

  it('ask once, by the stricter one that applies', () => {
    expect(checkOf(aged('2025-01-01'), 'BAT-92', 'battery-capacity').dueOn).toBe('2027-06-01')
    expect(checkOf(aged('2020-01-01'), 'BAT-92', 'battery-capacity').dueOn).toBe('2026-12-01')
    expect(checkOf(aged('2023-06-15'), 'BAT-92', 'battery-capacity').dueOn).toBe('2026-12-01')
    expect(checkOf(aged('2023-06-16'), 'BAT-92', 'battery-capacity').dueOn).toBe('2027-06-01')
  })

  it('let the one that names the chemistry go before a general one', () => {
    const general = {
      ...rules[0]!,
      id: 'general',
      category: 'battery' as const,
      procedure: 'battery-capacity' as const,
      applies: {},
      intervalMonths: 1,
    }
    const kit = { ...VHF, policies: [{ ...DEMO_1, rules: [general, ...rules] }] }
    expect(checkOf(kit, 'BAT-92', 'battery-capacity').dueOn).toBe('2027-06-01')
  })
})
