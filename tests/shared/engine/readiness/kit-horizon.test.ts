import { describe, expect, it } from 'vitest'
import { holdsUntil, horizonOf } from '#shared/engine/readiness/horizon.ts'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import { at, D0 } from './support/instants.ts'
import { K_01, K_08 } from './support/demo/hf-kits.ts'

describe('the horizon of a kit', () => {
  it('says that K-01 holds until the day after its next count is due', () => {
    const periods = kitTimeline(K_01, D0)
    expect(holdsUntil(periods)).toBe(at('2027-03-13'))
    expect(horizonOf(periods)[0]?.cause).toMatch(/^K-01: last count on 12 Sep 2026/)
  })

  it('has one step where nothing can get worse', () => {
    expect(horizonOf(kitTimeline(K_08, D0))).toEqual([{ until: null, verdict: 'not-fit', cause: '' }])
  })
})
