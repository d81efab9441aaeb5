import { describe, expect, it } from 'vitest'
import { bandOf, lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { ANT_07_SWEEPS, K_04, K_05, K_18, K_18_SWAPPED } from './support/demo/hf-kits.ts'
import { RECALLED_AT } from './support/demo/hot-batch.ts'
import { hfKit } from './support/demo/stations.ts'
import { AGM_26 } from './support/demo/things.ts'
import { at } from './support/instants.ts'
import { count } from './support/more-evidence.ts'
import { retested, withKit, withTests } from './support/kits.ts'

const NEW_YEAR = at('2026-01-01')
const JULY = at('2026-07-01')

/** Section 12 of the demo scenario, facts 4 and 13. */

describe('looking back to 1 January 2026', () => {
  it('has 40 m at K-07, whose wire had not stretched yet', () => {
    const then = retested(
      hfKit('07', {
        transformer: 'XFM-05',
        batteries: ['BAT-013', 'BAT-014'],
        pack: AGM_26,
        percent: [88, 87],
        testedOn: '2025-09-13',
      }),
      ...ANT_07_SWEEPS,
    )
    expect(bandOf(periodAt(then, NEW_YEAR), '40 m').state).toBe('proven')
    expect(bandOf(periodAt(then, at('2026-07-11 11:59')), '40 m').state).not.toBe('out')
    expect(bandOf(periodAt(then, at('2026-07-11 12:00')), '40 m').state).toBe('out')
  })

  it('has no limit on 10 m at K-04, which held its former transformer', () => {
    const former = hfKit('04', {
      transformer: 'XFM-F4',
      batteries: ['BAT-007', 'BAT-008'],
      testedOn: '2025-09-13',
    })
    expect(verdictAt(former, NEW_YEAR)).toBe('proven')
    expect(bandOf(periodAt(former, NEW_YEAR), '10 m')).toMatchObject({ state: 'proven', watts: 100 })
  })
})

describe('looking back to 1 July 2026', () => {
  // Only what was in the kits by then, with proofs in date: the tests of September had not been made.
  const inSpring = { '04': 'XFM-07', '05': 'XFM-08' } as const
  const asPacked = (number: '04' | '05') => {
    const kit = number === '04' ? K_04 : K_05
    const base = hfKit(number, {
      transformer: 'XFM-none',
      batteries: number === '04' ? ['BAT-007', 'BAT-008'] : ['BAT-009', 'BAT-010'],
      testedOn: '2026-03-14',
    })
    const transformer = kit.evidence.filter(({ subjectId }) => subjectId === inSpring[number])
    const rest = base.evidence.filter(({ subjectId }) => subjectId !== 'XFM-none')
    return withTests({ ...kit, evidence: rest }, ...transformer)
  }

  it('limits K-04 on 10 m by its own failed heat test', () => {
    const period = periodAt(asPacked('04'), JULY)
    expect(period.verdict).toBe('proven-with-limits')
    expect(bandOf(period, '10 m')).toMatchObject({ state: 'limited', watts: 20 })
  })

  it('does not limit K-04 before its test reached the record', () => {
    const kit = asPacked('04')
    expect(bandOf(periodAt(kit, RECALLED_AT - 1), '10 m').watts).not.toBe(20)
    expect(bandOf(periodAt(kit, RECALLED_AT), '10 m').watts).toBe(20)
  })

  it('says K-05 is not proven on 10 m, because of its sibling, while its other bands stand', () => {
    const period = periodAt(asPacked('05'), JULY)
    expect(period.capability.bands.map(({ state }) => state)).toEqual([
      'proven',
      'proven',
      'proven',
      'not-proven',
    ])
    expect(period.verdict).toBe('proven-with-limits')
    expect(textsOf(lowering(period)).join()).toMatch(/10 m.*XFM-07/)
  })

  it('lifts the recall of K-05 when its own transformer is tried on 10 m', () => {
    const tried = at('2026-07-11 20:40')
    expect(bandOf(periodAt(asPacked('05'), tried), '10 m')).toMatchObject({ state: 'limited', watts: 20 })
  })
})

describe('swapping XFM-13 into K-18', () => {
  it('is not proven until the kit is counted', () => {
    expect(verdictAt(K_18)).toBe('not-fit')
    expect(verdictAt(K_18_SWAPPED)).toBe('not-proven')
  })

  it('makes it proven once it is counted and sealed', () => {
    const counted = withKit(withTests(K_18_SWAPPED, count(K_18_SWAPPED, '2026-10-31 17:00')), {
      sealMatches: true,
    })
    expect(verdictAt(counted)).toBe('proven')
  })
})
