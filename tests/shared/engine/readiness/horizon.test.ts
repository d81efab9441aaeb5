import { describe, expect, it } from 'vitest'
import { effectSentences } from '#shared/engine/readiness/effect-sentences.ts'
import { causeOfChange, holdsUntil, horizonOf, type VerdictPeriod } from '#shared/engine/readiness/horizon.ts'
import type { Verdict } from '#shared/engine/vocabulary.ts'

const period = (from: number, to: number | null, verdict: Verdict, ...texts: string[]): VerdictPeriod => ({
  from,
  to,
  verdict,
  reasons: texts.map((text) => ({ text })),
})

describe('the horizon', () => {
  it('is one step for a kit that never changes', () => {
    expect(horizonOf([period(0, null, 'proven')])).toEqual([{ until: null, verdict: 'proven', cause: '' }])
    expect(holdsUntil([period(0, null, 'proven')])).toBeNull()
  })

  it('joins neighbours with one verdict, and names what changes it', () => {
    const periods = [
      period(0, 10, 'proven'),
      period(10, 20, 'proven', 'a note'),
      period(20, 30, 'not-proven', 'a note', 'count overdue'),
      period(30, null, 'not-fit', 'radio missing', 'count overdue'),
    ]
    expect(horizonOf(periods)).toEqual([
      { until: 20, verdict: 'proven', cause: 'count overdue' },
      { until: 30, verdict: 'not-proven', cause: 'radio missing' },
      { until: null, verdict: 'not-fit', cause: '' },
    ])
    expect(holdsUntil(periods)).toBe(20)
  })

  it('says what has gone when nothing new came', () => {
    const before = period(0, 10, 'not-proven', 'lowered')
    expect(causeOfChange(before, period(10, null, 'proven'))).toBe('no longer: lowered')
    expect(causeOfChange(period(0, 10, 'proven'), period(10, null, 'proven'))).toBe('')
  })
})

describe('what a change did to a kit', () => {
  it('says the verdict first, then what is new and what was lifted', () => {
    const before = period(0, null, 'not-proven', 'no count on record', 'seal broken')
    const after = period(0, null, 'proven-with-limits', 'seal broken', 'mast missing')
    expect(effectSentences('K-07', before, after)).toEqual([
      'K-07 goes from not proven to proven with limits.',
      'New: mast missing.',
      'Lifted: no count on record.',
    ])
  })

  it('says that nothing changed', () => {
    const same = period(0, null, 'proven')
    expect(effectSentences('K-01', same, same)).toEqual(['K-01 stays proven.'])
    expect(effectSentences('K-01', null, same)).toEqual(['K-01 is proven.'])
  })
})
