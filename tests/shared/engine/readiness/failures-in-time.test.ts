import { describe, expect, it } from 'vitest'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { bandOf, periodAt, verdictAt } from './support/answers.ts'
import { capacity, efficiency, feedlineLoss, heatTest, radioCheck, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withoutTests, withTests } from './support/kits.ts'
import { boot, count, inspection } from './support/more-evidence.ts'
import { DIGITAL, HF, RELAY, VHF } from './support/sample-kits.ts'

/**
 * A failure that leaves something to go with is evidence like any other and lapses to not proven; one that leaves
 * nothing stays until the thing is tested anew, so that no verdict improves by waiting.
 */

const TESTED = '2026-06-02'
const LAST = at('2027-06-03') - 1
const OVER = at('2027-06-03')
const LATER = at('2030-01-01')

/** Everything but the subject of the test is tested again and again. */
const kept = (kit: KitState, ...untouched: string[]): KitState => {
  const years = [1, 2, 3].flatMap((year) =>
    kit.evidence.flatMap((test) =>
      [0, 3, 6, 9].map((month) => ({
        ...test,
        id: `${test.id} ${year} ${month}`,
        performedAt: at(`${2026 + year}-${String(month + 1).padStart(2, '0')}-20`),
        performedOn: `${2026 + year}-${String(month + 1).padStart(2, '0')}-20`,
        recordedAt: at('2026-06-03'),
      })),
    ),
  )
  return withTests(
    kit,
    ...years.filter(
      ({ id, subjectId }) => ![...untouched].some((name) => id.startsWith(name) || subjectId === name),
    ),
  )
}

describe('a failure that limits', () => {
  const lowRadio = retested(VHF, radioCheck('RAD-92', { '2 m': 30, '70 cm': 50 }, TESTED, 50))
  const CASES: [name: string, kit: KitState, subject: string][] = [
    ['low radio power', lowRadio, 'RAD-92'],
    ['feedline loss', retested(RELAY, feedlineLoss('FDL-93', { '2 m': 3 }, TESTED)), 'FDL-93'],
  ]
  for (const [name, kit, subject] of CASES)
    it(`lapses to not proven: ${name}`, () => {
      const steady = kept(kit, subject)
      expect(verdictAt(steady, LAST)).toBe('proven-with-limits')
      expect(verdictAt(steady, OVER)).toBe('not-proven')
    })

  it('lapses to not proven: low efficiency', () => {
    const values = { '40 m': 0.7, '20 m': 0.9, '15 m': 0.9, '10 m': 0.87 }
    const kit = kept(retested(HF, efficiency('XFM-90', values, TESTED)), 'XFM-90 pair-loss')
    expect(bandOf(periodAt(kit, LAST), '40 m').state).toBe('limited')
    expect(bandOf(periodAt(kit, OVER), '40 m').state).toBe('not-proven')
  })

  it('lapses with the pass that set the power: heat test', () => {
    const base = withoutTests(HF, ({ id }) => id.startsWith('XFM-90 heat-test 10 m'))
    const kit = withTests(
      kept(base),
      heatTest('XFM-90', '10 m', TESTED, { stoppedAtMin: 8 }),
      heatTest('XFM-90', '10 m', `${TESTED} 14:00`, { powerW: 20 }),
    )
    expect(bandOf(periodAt(kit, LAST), '10 m')).toMatchObject({ state: 'limited', watts: 20 })
    expect(bandOf(periodAt(kit, OVER), '10 m').state).toBe('not-proven')
  })

  it('lapses: a count that missed a supporting part', () => {
    const kit = kept(retested(HF, count(HF, TESTED, { mast: 0 })), 'K-90')
    expect(verdictAt(kit, at('2026-12-03') - 1)).toBe('proven-with-limits')
    expect(verdictAt(kit, at('2026-12-03'))).toBe('not-proven')
  })
})

describe('a failure that leaves nothing', () => {
  const badSweep = { '40 m': 3, '20 m': 1.5, '15 m': 1.5, '10 m': 1.5 }
  const stays = (kit: KitState) => [verdictAt(kit, LAST), verdictAt(kit, OVER), verdictAt(kit, LATER)]

  it('stays on its band: antenna sweep', () => {
    const kit = kept(retested(HF, sweep('ANT-90', badSweep, TESTED)), 'ANT-90')
    for (const when of [LAST, OVER, LATER]) expect(bandOf(periodAt(kit, when), '40 m').state).toBe('out')
  })

  it('stays: a battery below its limit is not counted however old the test', () => {
    const kit = kept(retested(VHF, capacity('BAT-92', 70, TESTED)), 'BAT-92')
    expect(stays(kit)).toEqual(Array(3).fill('proven-with-limits'))
  })

  it('stays: a count that missed a vital part', () => {
    const kit = kept(retested(HF, count(HF, TESTED, { jumper: 0 })), 'K-90')
    expect(stays(kit)).toEqual(Array(3).fill('not-fit'))
  })

  it('stays: an inspection that said unserviceable', () => {
    const kit = withTests(kept(HF), inspection('CHG-90', TESTED, 'no output'))
    expect(stays(kit)).toEqual(Array(3).fill('not-fit'))
  })

  it('stays: a computer that did not boot', () => {
    const kit = retested(DIGITAL, boot('CMP-91', TESTED, false))
    expect(periodAt(kit, LATER).capability.modes).toEqual(['voice'])
  })
})

describe('a radio measured on some bands', () => {
  const failed = retested(VHF, radioCheck('RAD-92', { '2 m': 30, '70 cm': 50 }, TESTED, 50))

  it('keeps its failure on a band that a newer test left out', () => {
    const other = withTests(failed, radioCheck('RAD-92', { '70 cm': 50 }, '2026-06-10', 50))
    const period = periodAt(other, at('2026-06-15'))
    expect(bandOf(period, '2 m')).toMatchObject({ state: 'limited', watts: 30 })
    expect(bandOf(period, '70 cm').state).toBe('proven')
  })

  it('does not forget that failure when its year is over', () => {
    const other = withTests(kept(failed, 'RAD-92'), radioCheck('RAD-92', { '70 cm': 50 }, '2027-01-10', 50))
    const states = (when: number) => periodAt(other, when).capability.bands.map(({ state }) => state)
    expect(states(LAST)).toEqual(['limited', 'proven'])
    expect(states(OVER)).toEqual(['not-proven', 'proven'])
  })

  it('that does not receive is out on every band', () => {
    const [test] = VHF.evidence.filter(({ procedure }) => procedure === 'radio-check')
    const deaf = {
      ...test!,
      finding: 'fail' as const,
      findings: [
        ...test!.findings,
        { ...test!.findings[0]!, band: null, measure: 'receives', finding: 'fail' as const, value: null },
      ],
    }
    expect(verdictAt(retested(VHF, deaf), at('2026-06-15'))).toBe('not-fit')
  })
})

describe('a feedline measured on one band', () => {
  it('that fails there is counted lossy on the others too', () => {
    const kit = retested(VHF, feedlineLoss('FDL-92', { '2 m': 3 }, TESTED))
    const period = periodAt(kit, at('2026-06-15'))
    expect(bandOf(period, '70 cm').wattsAtAntenna).toBeCloseTo(50 * 10 ** -0.3, 6)
  })

  it('uses the figure of each band where both were measured', () => {
    const kit = retested(VHF, feedlineLoss('FDL-92', { '2 m': 3, '70 cm': 2 }, TESTED))
    const period = periodAt(kit, at('2026-06-15'))
    expect(bandOf(period, '2 m').wattsAtAntenna).toBeCloseTo(50 * 10 ** -0.3, 6)
    expect(bandOf(period, '70 cm')).toMatchObject({ state: 'proven' })
  })
})
