import { describe, expect, it } from 'vitest'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { bandOf, lowering, periodAt, textsOf } from './support/answers.ts'
import { at } from './support/instants.ts'
import { itemIn, withItem, withoutItem } from './support/kits.ts'
import { HF, SOON } from './support/sample-kits.ts'

const now = (kit: KitState) => periodAt(kit, at(SOON))

describe('a lead, against the current of the radio', () => {
  const CASES: [ratedA: number, watts: number | null, verdict: string][] = [
    [25, 100, 'proven'],
    [20, 100, 'proven'],
    [19.9, 50, 'proven-with-limits'],
    [13, 50, 'proven-with-limits'],
    [12.9, 20, 'proven-with-limits'],
    [8, 20, 'proven-with-limits'],
    [7.9, null, 'not-fit'],
  ]
  for (const [ratedA, watts, verdict] of CASES)
    it(`rated ${ratedA} A allows ${watts ?? 0} W`, () => {
      const period = now(withItem(HF, 'DCL-90', { facts: { ratedA } }))
      expect(period.verdict).toBe(verdict)
      if (watts !== null) expect(bandOf(period, '40 m').watts).toBe(watts)
      else expect(period.capability.bands.map(({ state }) => state)).toEqual(Array(4).fill('out'))
    })

  it('says nothing when its rating is not on record', () => {
    expect(now(withItem(HF, 'DCL-90', { facts: {} })).verdict).toBe('proven')
  })
})

describe('a radio', () => {
  const radio = itemIn(HF, 'radio')
  const facts = (change: object) => withItem(HF, radio.id, { facts: { ...radio.facts, ...change } })

  it('takes a band out that it does not cover', () => {
    const period = now(facts({ bands: ['40 m', '20 m', '15 m'] }))
    expect(bandOf(period, '10 m').state).toBe('out')
    expect(period.verdict).toBe('proven-with-limits')
    expect(textsOf(lowering(period)).join()).toMatch(/RAD-90.*10 m|10 m.*RAD-90/)
  })

  it('limits the watts to its rating', () => {
    expect(bandOf(now(facts({ ratedWatts: 100 })), '40 m').watts).toBe(100)
    expect(bandOf(now(facts({ ratedWatts: 99 })), '40 m')).toMatchObject({ state: 'limited', watts: 99 })
  })
})

describe('a transformer capped by its heat test', () => {
  it('is not raised by a lead that carries more', () => {
    const period = now(withItem(HF, 'DCL-90', { facts: { ratedA: 13 } }))
    expect(bandOf(period, '10 m').watts).toBe(50)
  })
})

describe('a position', () => {
  it('that is vital and empty is not fit', () => {
    for (const item of HF.items.filter(({ category }) => category !== 'mast')) {
      const period = now(withoutItem(HF, item.id))
      expect(period.verdict, item.id).toBe('not-fit')
      expect(textsOf(lowering(period)).join(), item.id).toContain(item.positionId)
    }
  })

  it('that is supporting and empty is a limit', () => {
    const period = now(withoutItem(HF, 'MST-90'))
    expect(period.verdict).toBe('proven-with-limits')
    expect(textsOf(lowering(period)).join()).toContain('mast')
  })

  it.each(['unserviceable', 'missing', 'away'] as const)(
    'whose item is %s counts as not filled',
    (condition) => {
      const change = { condition, conditionReason: 'lent to the school' }
      expect(now(withItem(HF, 'CHG-90', change)).verdict).toBe('not-fit')
      expect(textsOf(lowering(now(withItem(HF, 'CHG-90', change)))).join()).toMatch(
        /CHG-90.*lent to the school/,
      )
      expect(now(withItem(HF, 'MST-90', change)).verdict).toBe('proven-with-limits')
    },
  )
})
