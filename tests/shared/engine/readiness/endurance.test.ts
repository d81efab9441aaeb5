import { describe, expect, it } from 'vitest'
import type { ItemFacts, KitState, PolicySettings } from '#shared/engine/readiness/types.ts'
import { periodAt } from './support/answers.ts'
import { capacity, currentCheck } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { itemIn, retested, withItem } from './support/kits.ts'
import { DEMO_1 } from './support/policy.ts'
import { HF, SOON, TESTED_ON, VHF } from './support/sample-kits.ts'

/** Hours of one battery at a steady load; figures of the calculation sheet, section 10, or worked out from it. */

interface Bank {
  readonly facts: ItemFacts
  readonly percent: number
  readonly loadA: number
  readonly settings?: PolicySettings
}

const steady = (kit: KitState, loadA: number) =>
  currentCheck(itemIn(kit, 'radio').id, { receiveA: loadA, transmitA: loadA }, TESTED_ON)

function endurance({ facts, percent, loadA, settings = {} }: Bank) {
  const tests = [capacity('BAT-92', percent, TESTED_ON), steady(VHF, loadA)]
  const kit = retested(withItem(VHF, 'BAT-92', { facts }), ...tests)
  return capabilityOf({ ...kit, policies: [{ ...DEMO_1, settings }] })
}

const capabilityOf = (kit: KitState) => periodAt(kit, at(SOON)).capability

describe('a lithium battery', () => {
  const lithium = { chemistry: 'lifepo4', ratedAh: 20 }

  it('gives 80 % of what was measured, unless the policy says otherwise', () => {
    expect(endurance({ facts: lithium, percent: 92, loadA: 2 }).usableAh).toBeCloseTo(20 * 0.92 * 0.8, 9)
    const settings = { usableFraction: { lifepo4: 0.9 } }
    expect(endurance({ facts: lithium, percent: 92, loadA: 2, settings }).hours).toBeCloseTo(8.28, 9)
  })

  it('counts no more than 110 % of its rating', () => {
    const { usableAh, hoursFactors } = endurance({ facts: lithium, percent: 118, loadA: 2 })
    expect(usableAh).toBeCloseTo(20 * 1.1 * 0.8, 9)
    expect(hoursFactors[0]).toContain('118 % measured on 1 Jun 2026, counted as 110 %')
    expect(endurance({ facts: lithium, percent: 110, loadA: 2 }).hoursFactors[0]).not.toContain('counted as')
  })

  it('loses in the cold', () => {
    const settings = { enduranceC: -10 }
    const cold = endurance({ facts: lithium, percent: 100, loadA: 2, settings })
    expect(cold.usableAh).toBeCloseTo(20 * 0.8 * 0.8, 9)
    expect(cold.hoursFactors.join()).toContain('80 % at −10 °C')
  })

  it('lasts longer at less load in proportion', () => {
    const at2 = endurance({ facts: lithium, percent: 100, loadA: 2 }).hours ?? 0
    expect(endurance({ facts: lithium, percent: 100, loadA: 4 }).hours).toBeCloseTo(at2 / 2, 9)
  })
})

describe('a lead-acid battery', () => {
  const agm = { chemistry: 'agm', ratedAh: 35 }

  it('pays for a fast discharge: 35 Ah at 85 %, 10 °C and the equivalent current of the sheet', () => {
    const settings = { enduranceC: 10 }
    const { hours } = endurance({ facts: agm, percent: 85, loadA: 3.05092, settings })
    expect(hours).toBeCloseTo(3.58386, 3)
  })

  it('has no bonus for a slow one', () => {
    const settings = { temperatureFactor: 1 }
    const { hours } = endurance({ facts: agm, percent: 100, loadA: 1, settings })
    expect(hours).toBeCloseTo(17.5, 9)
  })

  it('is linear where the policy says so', () => {
    const settings = { temperatureFactor: 1, peukert: 1 }
    const { hours } = endurance({ facts: agm, percent: 82, loadA: 3.48, settings })
    expect(hours).toBeCloseTo((35 * 0.82 * 0.5) / 3.48, 9)
  })

  it('is what a battery of unknown chemistry counts as', () => {
    const settings = { temperatureFactor: 1 }
    const unknown = endurance({ facts: { ratedAh: 35 }, percent: 100, loadA: 5, settings })
    expect(unknown.hours).toBe(endurance({ facts: agm, percent: 100, loadA: 5, settings }).hours)
  })

  it('counts for nothing in a cold that no table covers', () => {
    expect(endurance({ facts: agm, percent: 100, loadA: 2, settings: { enduranceC: -20 } }).hours).toBeNull()
  })
})

describe('two batteries side by side', () => {
  it('share the load: two of 30 Ah last as long as one of 60', () => {
    const settings = { temperatureFactor: 1 }
    const twin = (id: string) => ({ facts: { chemistry: 'agm', ratedAh: 30 }, id })
    const two = [twin('BAT-901'), twin('BAT-902')].reduce(
      (kit, { id, facts }) => retested(withItem(kit, id, { facts }), capacity(id, 100, TESTED_ON)),
      retested(HF, steady(HF, 3.06)),
    )
    const one = endurance({ facts: { chemistry: 'agm', ratedAh: 60 }, percent: 100, loadA: 3.06, settings })
    expect(capabilityOf({ ...two, policies: [{ ...DEMO_1, settings }] }).hours).toBeCloseTo(one.hours ?? 0, 9)
  })
})
