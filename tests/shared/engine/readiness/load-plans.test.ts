import { describe, expect, it } from 'vitest'
import type { KitState, Position } from '#shared/engine/readiness/types.ts'
import { bandOf, lowering, periodAt, textsOf } from './support/answers.ts'
import { capacity, efficiency, heatTest, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { anItem, itemIn, withItem, withoutItem, withoutTests, withTests } from './support/kits.ts'
import { DIGITAL, HF, SOON, TESTED_ON } from './support/sample-kits.ts'

const now = (kit: KitState) => periodAt(kit, at(SOON))

/** The kit with one more position, and what is in it. */
function withSpare(
  kit: KitState,
  spare: Omit<Position, 'quantity' | 'name'>,
  facts: KitState['items'][number]['facts'] = {},
): KitState {
  return {
    ...kit,
    positions: [...kit.positions, { ...spare, name: spare.id, quantity: 1 }],
    items: [
      ...kit.items,
      anItem({ id: `SPARE ${spare.id}`, category: spare.category, positionId: spare.id, facts }),
    ],
  }
}

describe('a spare beside the part that does the work', () => {
  it('takes over a band: the better of two antennas counts', () => {
    const spare = withSpare(HF, { id: 'spare wire', category: 'antenna', vital: false })
    const bad = { '40 m': 3, '20 m': 1.5, '15 m': 1.5, '10 m': 1.5 }
    const kit = withTests(
      spare,
      sweep('ANT-90', bad, '2026-06-10'),
      sweep('SPARE spare wire', { '40 m': 1.5 }, '2026-06-10'),
    )
    expect(bandOf(now(kit), '40 m').state).toBe('proven')
    expect(bandOf(now(withoutItem(kit, 'SPARE spare wire')), '40 m').state).toBe('out')
  })

  it('adds no loss: transformers stand side by side', () => {
    const spare = withSpare(HF, { id: 'spare transformer', category: 'transformer', vital: false })
    const id = 'SPARE spare transformer'
    const kit = withTests(
      spare,
      efficiency(id, { '40 m': 0.5, '20 m': 0.5, '15 m': 0.5, '10 m': 0.5 }, TESTED_ON),
      heatTest(id, '40 m', TESTED_ON),
    )
    expect(now(kit).capability.bands).toEqual(now(HF).capability.bands)
  })

  it('holds nothing up when it is not proven', () => {
    const kit = withSpare(
      HF,
      { id: 'spare battery', category: 'battery', vital: false },
      { chemistry: 'lifepo4', ratedAh: 30 },
    )
    expect(now(kit).verdict).toBe('proven-with-limits')
    expect(textsOf(lowering(now(kit))).join()).toContain('SPARE spare battery')
    expect(now(withTests(kit, capacity('SPARE spare battery', 95, TESTED_ON))).verdict).toBe('proven')
  })

  it('adds its hours when it is proven', () => {
    const spare = withSpare(
      HF,
      { id: 'spare battery', category: 'battery', vital: true },
      { chemistry: 'lifepo4', ratedAh: 30 },
    )
    const kit = withTests(spare, capacity('SPARE spare battery', 100, TESTED_ON))
    expect(now(kit).capability.usableAh).toBeCloseTo((60 * 0.963 + 30) * 0.9, 6)
  })

  it('of a lead caps nothing', () => {
    const kit = withSpare(HF, { id: 'spare lead', category: 'dc-lead', vital: false }, { ratedA: 5 })
    expect(bandOf(now(kit), '40 m').watts).toBe(100)
  })

  it('of a radio covers its own bands', () => {
    const vhf = { bands: ['2 m' as const], ratedWatts: 50 }
    const both = withSpare(HF, { id: 'second radio', category: 'radio', vital: true }, vhf)
    const rules = HF.policies[0]!.rules.filter(({ procedure }) => procedure !== 'radio-check')
    const kit = { ...both, policies: [{ ...HF.policies[0]!, rules }] }
    expect(bandOf(now(kit), '40 m')).toMatchObject({ state: 'proven', watts: 100 })
  })
})

describe('a part that the load plan calls supporting', () => {
  const supporting = (kit: KitState, category: Position['category']): KitState => ({
    ...kit,
    positions: kit.positions.map((one) => (one.category === category ? { ...one, vital: false } : one)),
  })

  it('takes no band out by its failure', () => {
    const bad = { '40 m': 3, '20 m': 3, '15 m': 3, '10 m': 3 }
    const kit = withTests(supporting(HF, 'antenna'), sweep('ANT-90', bad, '2026-06-10'))
    expect(now(kit).verdict).toBe('proven-with-limits')
    expect(now(kit).capability.bands.map(({ state }) => state)).toEqual(Array(4).fill('limited'))
  })

  it('is no better missing than failed', () => {
    const kit = withoutItem(supporting(HF, 'antenna'), 'ANT-90')
    expect(now(kit).verdict).toBe('proven-with-limits')
  })

  it('leaves voice when it is the computer', () => {
    const kit = withoutItem(supporting(DIGITAL, 'computer'), 'CMP-91')
    expect(now(kit).capability.modes).toEqual(['voice'])
    expect(now(kit).verdict).toBe('proven-with-limits')
  })

  it('leaves no mode when nothing but digital was promised', () => {
    const digital = { ...DIGITAL, promise: { ...DIGITAL.promise, modes: ['digital' as const] } }
    const kit = withoutItem(supporting(digital, 'computer'), 'CMP-91')
    expect(now(kit).verdict).toBe('not-proven')
  })
})

describe('a position for several', () => {
  const two: KitState = {
    ...HF,
    positions: HF.positions.map((one) => (one.id === 'jumper' ? { ...one, quantity: 2 } : one)),
  }

  it('says how many it holds', () => {
    expect(now(two).verdict).toBe('not-fit')
    expect(textsOf(lowering(now(two))).join()).toContain('jumper holds 1 of 2')
  })

  it('names the broken one and the missing one', () => {
    const kit = withItem(
      {
        ...two,
        positions: two.positions.map((one) => (one.id === 'jumper' ? { ...one, quantity: 3 } : one)),
      },
      'JMP-90',
      {
        condition: 'unserviceable',
        conditionReason: 'crushed',
      },
    )
    expect(textsOf(lowering(now(kit)))).toEqual(
      expect.arrayContaining([expect.stringContaining('crushed'), expect.stringContaining('holds 1 of 3')]),
    )
  })
})

describe('what is not on record', () => {
  it('is a limit when the load was never measured', () => {
    const radio = itemIn(HF, 'radio')
    const { meanLoadA: _, ...rest } = radio.facts
    const period = now(withItem(HF, radio.id, { facts: rest }))
    expect(period.verdict).toBe('proven-with-limits')
    expect(period.capability.hours).toBeNull()
    expect(period.capability.usableAh).toBeCloseTo(60 * 0.963 * 0.9, 6)
  })

  it('is a limit when a battery has no rating', () => {
    const kit = withItem(HF, 'BAT-901', { facts: { chemistry: 'lifepo4' } })
    expect(textsOf(lowering(now(kit))).join()).toMatch(/BAT-901.*rated capacity is not on record/)
  })

  it('leaves the watts at the antenna open when no loss is known', () => {
    const kit = withoutTests(withItem(HF, 'FDL-90', { facts: {} }), ({ subjectId }) => subjectId === 'FDL-90')
    const open = {
      ...kit,
      policies: kit.policies.map((one) => ({
        ...one,
        rules: one.rules.filter(({ procedure }) => procedure !== 'feedline-loss'),
      })),
    }
    expect(bandOf(now(open), '40 m')).toMatchObject({
      state: 'proven',
      watts: 100,
      wattsAtAntenna: null,
      fraction: null,
    })
  })
})

describe('a kit that promises no bands', () => {
  it('still asks for the tests of what is in it', () => {
    const plain = { ...HF, promise: { bands: [], modes: [], watts: null, hours: null } }
    expect(now(plain).verdict).toBe('proven')
    expect(now(withoutTests(plain, ({ procedure }) => procedure === 'antenna-sweep')).verdict).toBe(
      'not-proven',
    )
    expect(now(withTests(plain, sweep('ANT-90', { '40 m': 3 }, '2026-06-10'))).verdict).toBe('not-fit')
  })
})
