import { describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { KitState, RaisedCheck } from '#shared/engine/readiness/types.ts'
import { bandOf, lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { efficiency, heatTest, radioCheck, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withTests } from './support/kits.ts'
import { calibration } from './support/more-evidence.ts'
import { HF, SOON, VHF } from './support/sample-kits.ts'

const METER = { id: 'WTM-1', designation: 'WTM-1', category: 'wattmeter' } as const
const WATTS = { '2 m': 50, '70 cm': 50 }
const withMeter = (on: string) => radioCheck('RAD-92', WATTS, { on, with: 'WTM-1' }, 50)
const metered = (kit: KitState): KitState => ({ ...kit, instruments: [METER] })

describe('a lapsed calibration', () => {
  const checked = (on: string) =>
    metered(withTests(retested(VHF, withMeter(on)), calibration('WTM-1', '2025-06-10')))
  const later = at('2026-06-20')

  it('still covers a test on its last day', () => {
    expect(verdictAt(checked('2026-06-10'), later)).toBe('proven')
  })

  it('puts a test of the next day in doubt, by the name of the instrument', () => {
    const period = periodAt(checked('2026-06-11'), later)
    expect(period.verdict).toBe('not-proven')
    expect(textsOf(lowering(period)).join()).toMatch(/RAD-92.*doubt.*WTM-1/)
  })

  it('falls back on an older result in date', () => {
    const kit = withTests(checked('2026-06-11'), radioCheck('RAD-92', WATTS, '2026-03-01', 50))
    expect(verdictAt(kit, later)).toBe('proven')
    expect(verdictAt(kit, at('2027-03-02'))).toBe('not-proven')
  })

  it('does not hide an older failure behind a pass in doubt', () => {
    const low = radioCheck('RAD-92', { '2 m': 30, '70 cm': 30 }, '2026-03-01', 50)
    const period = periodAt(withTests(checked('2026-06-11'), low), later)
    expect(bandOf(period, '2 m')).toMatchObject({ state: 'limited', watts: 30 })
  })

  it('leaves a failure in doubt standing against an older pass', () => {
    const swr = { '2 m': 4, '70 cm': 1.5 }
    const failed = sweep('ANT-92', swr, { on: '2026-06-12', with: 'WTM-1' })
    const kit = metered(withTests(VHF, failed, calibration('WTM-1', '2025-06-10')))
    expect(bandOf(periodAt(kit, later), '2 m').state).toBe('not-proven')
    expect(bandOf(periodAt(kit, later), '70 cm').state).toBe('proven')
  })

  it('counts a calibration from its very instant', () => {
    const together = metered(
      withTests(
        retested(VHF, withMeter('2026-06-12 10:00')),
        calibration('WTM-1', '2026-06-12 10:00'),
        calibration('WTM-1', '2025-01-01'),
      ),
    )
    expect(verdictAt(together, later)).toBe('proven')
  })

  it('is undone by a valid calibration that is recorded later with an earlier date', () => {
    const kit = withTests(
      checked('2026-06-11'),
      calibration('WTM-1', { on: '2026-05-20', recorded: '2026-06-25 09:00' }),
    )
    expect(verdictAt(kit, at('2026-06-25 09:00') - 1)).toBe('not-proven')
    expect(verdictAt(kit, at('2026-06-25 09:00'))).toBe('proven')
  })

  it('doubts nothing that was measured with another instrument', () => {
    const kit = metered(withTests(VHF, calibration('WTM-1', '2024-01-01')))
    expect(verdictAt(kit, at(SOON))).toBe('proven')
  })
})

describe('a failed calibration', () => {
  const kit = metered(withTests(retested(VHF, withMeter('2026-05-01')), calibration('WTM-1', '2026-02-01')))
  const failed = withTests(kit, calibration('WTM-1', '2026-06-20', false))

  it('puts results since the last good one in doubt, from its own record on', () => {
    expect(verdictAt(kit, at('2026-06-21'))).toBe('proven')
    expect(verdictAt(failed, at('2026-06-20 12:00') - 1)).toBe('proven')
    expect(verdictAt(failed, at('2026-06-20 12:00'))).toBe('not-proven')
  })

  it('leaves results before the last good one alone', () => {
    const older = metered(
      withTests(
        retested(VHF, withMeter('2026-01-15')),
        calibration('WTM-1', '2025-09-01'),
        ...calibrations(),
      ),
    )
    expect(verdictAt(older, at('2026-06-21'))).toBe('proven')
  })

  it('is not undone by a later good one, which says nothing about the time before the repair', () => {
    const repaired = withTests(failed, calibration('WTM-1', '2026-07-01'))
    expect(verdictAt(repaired, at('2026-07-02'))).toBe('not-proven')
  })

  it('lets results after a later good one count', () => {
    const repaired = withTests(failed, calibration('WTM-1', '2026-07-01'), withMeter('2026-07-05'))
    expect(verdictAt(repaired, at('2026-07-06'))).toBe('proven')
  })

  const calibrations = () => [calibration('WTM-1', '2026-02-01'), calibration('WTM-1', '2026-06-20', false)]
})

describe('a recall', () => {
  const recall: RaisedCheck = {
    id: 'recall',
    subjectId: 'XFM-90',
    procedure: 'heat-test',
    band: '10 m',
    reason: 'XFM-91 of the same batch failed on 10 m',
    doubtsEarlier: true,
    raisedAt: at('2026-06-05 10:00'),
    dueOn: '2026-08-01',
  }
  const recalled = { ...HF, raisedChecks: [recall] }
  const stateOn10 = (kit: KitState, when: number) => bandOf(periodAt(kit, when), '10 m').state

  it('puts the band in doubt from the moment it is raised', () => {
    expect(stateOn10(recalled, recall.raisedAt - 1)).toBe('proven')
    expect(stateOn10(recalled, recall.raisedAt)).toBe('not-proven')
    expect(textsOf(lowering(periodAt(recalled, at(SOON)))).join()).toMatch(/XFM-90.*10 m.*XFM-91/)
  })

  it('begins a period of its own', () => {
    const starts = kitTimeline(recalled, at('2026-06-02')).map(({ from }) => from)
    expect(starts.slice(0, 2)).toEqual([at('2026-06-02'), recall.raisedAt])
  })

  it('leaves the other bands standing', () => {
    const period = periodAt(recalled, at(SOON))
    expect(period.capability.bands.map(({ state }) => state)).toEqual([
      'proven',
      'proven',
      'proven',
      'not-proven',
    ])
    expect(period.verdict).toBe('proven-with-limits')
  })

  const retest = (on: string) => [
    heatTest('XFM-90', '10 m', on),
    efficiency('XFM-90', { '40 m': 0.93, '20 m': 0.92, '15 m': 0.9, '10 m': 0.87 }, on),
  ]

  it('is cleared by a test of its own', () => {
    const kit = withTests(recalled, ...retest('2026-06-08 09:00'))
    expect(stateOn10(kit, at('2026-06-08 09:00') - 1)).toBe('not-proven')
    expect(stateOn10(kit, at('2026-06-08 09:00'))).toBe('proven')
  })

  it('is not cleared by a test made before it and recorded after it', () => {
    const early = heatTest('XFM-90', '10 m', { on: '2026-06-04', recorded: '2026-06-07' })
    expect(stateOn10(withTests(recalled, early), at(SOON))).toBe('not-proven')
  })

  it('is not cleared by a test on another band', () => {
    expect(stateOn10(withTests(recalled, heatTest('XFM-90', '20 m', '2026-06-08')), at(SOON))).toBe(
      'not-proven',
    )
  })
})
