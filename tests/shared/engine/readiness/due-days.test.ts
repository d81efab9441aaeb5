import { describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Evidence, KitState } from '#shared/engine/readiness/types.ts'
import type { Verdict } from '#shared/engine/vocabulary.ts'
import { lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { capacity, efficiency, feedlineLoss, heatTest, radioCheck, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withTests } from './support/kits.ts'
import { boot, calibration, count } from './support/more-evidence.ts'
import { BATCH_EFFICIENCY, HF_LINE_DB } from './support/demo/things.ts'
import { BENCH, DIGITAL, HF } from './support/sample-kits.ts'

/** A day on which only the check under test was performed; everything else is of 1 June 2026. */
const EARLY = '2026-03-10'
const hfWatts = { '40 m': 100, '20 m': 100, '15 m': 100, '10 m': 100 }
const goodSwr = { '40 m': 1.4, '20 m': 1.5, '15 m': 1.7, '10 m': 1.6 }

type Case = [
  name: string,
  kit: KitState,
  tests: Evidence[],
  lastDay: string,
  overdueAt: string,
  after: Verdict,
  subject: string,
]

const LAPSED: Case[] = [
  [
    'efficiency',
    HF,
    [efficiency('XFM-90', BATCH_EFFICIENCY.A, EARLY)],
    '2027-03-10',
    '2027-03-11',
    'not-proven',
    'XFM-90',
  ],
  [
    'antenna sweep',
    HF,
    [sweep('ANT-90', goodSwr, EARLY)],
    '2027-03-10',
    '2027-03-11',
    'not-proven',
    'ANT-90',
  ],
  [
    'feedline loss',
    HF,
    [feedlineLoss('FDL-90', HF_LINE_DB, EARLY)],
    '2027-03-10',
    '2027-03-11',
    'not-proven',
    'FDL-90',
  ],
  [
    'radio check',
    HF,
    [radioCheck('RAD-90', hfWatts, EARLY)],
    '2027-03-10',
    '2027-03-11',
    'not-proven',
    'RAD-90',
  ],
  [
    'capacity',
    HF,
    [capacity('BAT-901', 96, EARLY), capacity('BAT-902', 96, EARLY)],
    '2027-03-10',
    '2027-03-11',
    'not-proven',
    'BAT-901',
  ],
  ['count', HF, [count(HF, EARLY)], '2026-09-10', '2026-09-11', 'not-proven', 'K-90'],
  [
    'boot',
    DIGITAL,
    [boot('CMP-91', '2026-05-10')],
    '2026-06-10',
    '2026-06-11',
    'proven-with-limits',
    'CMP-91',
  ],
  ['calibration', BENCH, [calibration('WTM-94', EARLY)], '2027-03-10', '2027-03-11', 'not-proven', 'WTM-94'],
]

/** The count, due twice a year, is repeated so that it does not lapse before the check under test. */
const recounted = (kit: KitState, procedure: string) =>
  procedure === 'count' ? kit : withTests(kit, count(kit, '2026-11-20'), count(kit, '2027-02-20'))

describe('a due day', () => {
  for (const [name, kit, tests, lastDay, overdueAt, after, subject] of LAPSED) {
    const aged = recounted(retested(kit, ...tests), name)

    it(`is the last day on which a ${name} stands`, () => {
      expect(verdictAt(aged, at(lastDay))).toBe('proven')
      expect(verdictAt(aged, at(overdueAt) - 1)).toBe('proven')
    })

    it(`ends at local midnight: ${name} has then lapsed`, () => {
      const period = periodAt(aged, at(overdueAt))
      expect(period.verdict).toBe(after)
      const reason = lowering(period).find(({ text }) => text.includes(subject))
      expect(reason?.action?.text, textsOf(lowering(period)).join()).toContain(subject)
    })

    it(`is a boundary of the timeline: ${name}`, () => {
      const before = kitTimeline(aged, at(lastDay)).map(({ from }) => from)
      expect(before).toContain(at(overdueAt))
    })
  }

  it('takes one band only when the heat test of one band lapses', () => {
    const rest = HF.evidence.filter(({ id }) => !id.startsWith('XFM-90 heat-test 40 m'))
    const aged = recounted({ ...HF, evidence: rest }, 'heat')
    const tested = withTests(aged, heatTest('XFM-90', '40 m', EARLY))
    const states = (when: number) => periodAt(tested, when).capability.bands.map(({ state }) => state)
    expect(states(at('2027-03-11') - 1)).toEqual(['proven', 'proven', 'proven', 'proven'])
    expect(states(at('2027-03-11'))).toEqual(['not-proven', 'proven', 'proven', 'proven'])
    expect(verdictAt(tested, at('2027-03-11'))).toBe('proven-with-limits')
  })

  it('is counted from the local day of the test, not from its day in UTC', () => {
    const lateEvening = retested(HF, count(HF, '2026-03-10 23:30'))
    expect(verdictAt(lateEvening, at('2026-09-11') - 1)).toBe('proven')
    expect(verdictAt(lateEvening, at('2026-09-11'))).toBe('not-proven')
  })

  it('is the last day of a shorter month', () => {
    const kit = retested(HF, count(HF, '2026-08-31'))
    expect(verdictAt(kit, at('2027-03-01') - 1)).toBe('proven')
    expect(verdictAt(kit, at('2027-03-01'))).toBe('not-proven')
  })

  it('never comes for a rule that asks on events only', () => {
    const rules = HF.policies[0]?.rules.map((rule) => ({ ...rule, intervalMonths: null })) ?? []
    const policies = HF.policies.map((policy) => ({ ...policy, rules }))
    const periods = kitTimeline({ ...HF, policies }, at('2026-06-15'))
    expect(periods.map(({ verdict, to }) => ({ verdict, to }))).toEqual([{ verdict: 'proven', to: null }])
  })

  const issued = (assignedAt: number) => ({
    ...retested(HF, count(HF, EARLY)),
    kit: { ...HF.kit, availability: 'assigned' as const, assignedAt },
  })

  it('does not end a count while the kit is on issue', () => {
    expect(verdictAt(issued(at('2026-09-11') - 1), at('2026-10-01'))).toBe('proven')
  })

  it('ends a count at the return of the kit', () => {
    const out = issued(at('2026-09-01'))
    const back = { ...out, kit: { ...out.kit, availability: 'available' as const } }
    expect(verdictAt(back, at('2026-10-01'))).toBe('not-proven')
  })

  it('is not undone by an issue: a count that had lapsed before stays lapsed', () => {
    expect(verdictAt(issued(at('2026-09-11')), at('2026-10-01'))).toBe('not-proven')
    expect(verdictAt({ ...issued(0), kit: { ...HF.kit, availability: 'assigned' } }, at('2026-10-01'))).toBe(
      'not-proven',
    )
  })

  it('gives way to a newer test, from the moment at which it is recorded', () => {
    const late = withTests(
      retested(HF, count(HF, EARLY)),
      count(HF, { on: '2026-09-10', recorded: '2026-09-13 08:00' }),
    )
    const changes = kitTimeline(late, at('2026-09-10')).map(({ from, verdict }) => ({ from, verdict }))
    expect(changes.slice(0, 3)).toEqual([
      { from: at('2026-09-10'), verdict: 'proven' },
      { from: at('2026-09-11'), verdict: 'not-proven' },
      { from: at('2026-09-13 08:00'), verdict: 'proven' },
    ])
  })
})
