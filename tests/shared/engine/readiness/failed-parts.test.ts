import { describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { capacity } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withTests } from './support/kits.ts'
import { boot, count, inspection } from './support/more-evidence.ts'
import { DIGITAL, HF, SOON } from './support/sample-kits.ts'

/** What a failed test of a battery, a computer or the packing does, at its limit and just over it. */

const WHEN = at(SOON)
const TODAY = '2026-06-10'
const now = (kit: KitState) => periodAt(kit, WHEN)
const said = (kit: KitState) => textsOf(lowering(now(kit))).join('\n')

describe('a battery', () => {
  const holding = (a: number, b: number) =>
    retested(HF, capacity('BAT-901', a, TODAY), capacity('BAT-902', b, TODAY))

  it('with exactly 80 % counts', () => {
    const { capability } = now(holding(80, 80))
    expect(capability.usableAh).toBeCloseTo(60 * 0.8 * 0.9, 6)
  })

  it('below 80 % counts for no hours', () => {
    const period = now(holding(79.9, 100))
    expect(period.capability.usableAh).toBeCloseTo(30 * 0.9, 6)
    expect(period.capability.hours).toBeCloseTo(27 / 3.06, 6)
    expect(period.verdict).toBe('proven-with-limits')
  })

  it('leaves the kit to mains or a vehicle when none counts', () => {
    const period = now(holding(79.9, 60))
    expect(period.capability.hours).toBeNull()
    expect(period.verdict).toBe('proven-with-limits')
    expect(said(holding(79.9, 60))).toContain('no battery endurance')
  })

  it('that gives exactly the promised hours is no limit, a little less is', () => {
    const hoursOf = (percent: number) => (60 * (percent / 100) * 0.9) / 3.06
    const promising = (hours: number) => ({ ...holding(90, 90), promise: { ...HF.promise, hours } })
    expect(now(promising(hoursOf(90))).verdict).toBe('proven')
    expect(now(promising(hoursOf(90) + 0.01)).verdict).toBe('proven-with-limits')
    expect(said(promising(16))).toMatch(/15\.8 h.*16 h/)
  })
})

describe('a computer', () => {
  const booted = (on: string) => retested(DIGITAL, boot('CMP-91', on))

  it('booted exactly three months ago still carries digital', () => {
    const kit = booted('2026-03-15')
    expect(periodAt(kit, at('2026-06-16') - 1).capability.modes).toEqual(['digital', 'voice'])
    expect(periodAt(kit, at('2026-06-16')).capability.modes).toEqual(['voice'])
  })

  it('loses digital at a boundary of the timeline', () => {
    const starts = kitTimeline(booted('2026-05-20'), WHEN).map(({ from }) => from)
    expect(starts).toContain(at('2026-06-21'))
    expect(starts).toContain(at('2026-08-21'))
  })

  it('booted too long ago leaves voice as a limit', () => {
    expect(now(booted('2026-03-10')).verdict).toBe('proven-with-limits')
    expect(said(booted('2026-03-10'))).toMatch(/voice only/i)
  })

  it('that does not boot leaves voice only', () => {
    const kit = retested(DIGITAL, boot('CMP-91', TODAY, false))
    expect(now(kit).capability.modes).toEqual(['voice'])
    expect(now(kit).verdict).toBe('proven-with-limits')
  })
})

describe('an inspection', () => {
  it('that says unserviceable makes a vital item so', () => {
    const kit = withTests(HF, inspection('ANT-90', TODAY, 'element broken'))
    expect(now(kit).verdict).toBe('not-fit')
    expect(said(kit)).toMatch(/ANT-90.*element broken/)
  })

  it('that passes later puts the item right', () => {
    const kit = withTests(
      HF,
      inspection('ANT-90', TODAY, 'element broken'),
      inspection('ANT-90', '2026-06-12'),
    )
    expect(now(kit).verdict).toBe('proven')
  })

  it('of a supporting item is a limit', () => {
    const kit = withTests(HF, inspection('MST-90', TODAY, 'bent'))
    expect(now(kit).verdict).toBe('proven-with-limits')
  })
})

describe('a count', () => {
  it('that misses a vital part is not fit', () => {
    const kit = withTests(HF, count(HF, TODAY, { jumper: 0 }))
    expect(verdictAt(kit, WHEN)).toBe('not-fit')
    expect(said(kit)).toContain('jumper')
  })

  it('that misses a supporting part is a limit', () => {
    const kit = withTests(HF, count(HF, TODAY, { mast: 0 }))
    expect(verdictAt(kit, WHEN)).toBe('proven-with-limits')
    expect(said(kit)).toContain('mast')
  })

  it('that finds it again lifts the reason', () => {
    const kit = withTests(HF, count(HF, TODAY, { jumper: 0 }), count(HF, '2026-06-12'))
    expect(verdictAt(kit, WHEN)).toBe('proven')
  })
})
