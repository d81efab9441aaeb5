import { describe, expect, it } from 'vitest'
import type { KitState, RaisedCheck } from '#shared/engine/readiness/types.ts'
import { lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { withTests } from './support/kits.ts'
import { count } from './support/more-evidence.ts'
import { HF } from './support/sample-kits.ts'

describe('a check raised by an event', () => {
  const raised = (change: Partial<RaisedCheck> = {}): KitState => ({
    ...HF,
    raisedChecks: [
      {
        id: 'storm',
        subjectId: 'ANT-90',
        procedure: 'antenna-sweep',
        band: null,
        reason: 'used in the storm',
        doubtsEarlier: false,
        raisedAt: at('2026-06-05 10:00'),
        dueOn: '2026-06-20',
        ...change,
      },
    ],
  })

  it('leaves the verdict alone until its day is over', () => {
    expect(verdictAt(raised(), at('2026-06-05 10:00'))).toBe('proven')
    expect(verdictAt(raised(), at('2026-06-21') - 1)).toBe('proven')
  })

  it('takes the proof away at the midnight after its day', () => {
    const period = periodAt(raised(), at('2026-06-21'))
    expect(period.verdict).toBe('not-proven')
    expect(textsOf(lowering(period)).join()).toMatch(/ANT-90.*used in the storm/)
  })

  it('is answered by a sweep made after it', () => {
    const goodSwr = { '40 m': 1.4, '20 m': 1.5, '15 m': 1.7, '10 m': 1.6 }
    expect(verdictAt(withTests(raised(), sweep('ANT-90', goodSwr, '2026-06-10')), at('2026-06-21'))).toBe(
      'proven',
    )
    expect(verdictAt(withTests(raised(), sweep('ANT-90', goodSwr, '2026-06-04')), at('2026-06-21'))).toBe(
      'not-proven',
    )
  })

  it('asks for a count of the whole kit', () => {
    const opened = raised({ subjectId: 'K-90', procedure: 'count', reason: 'opened' })
    expect(verdictAt(opened, at('2026-06-21'))).toBe('not-proven')
    expect(verdictAt(withTests(opened, count(HF, '2026-06-19')), at('2026-06-21'))).toBe('proven')
  })
})
