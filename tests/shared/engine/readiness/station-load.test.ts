import { describe, expect, it } from 'vitest'
import { leadAcidRuntime } from '#shared/engine/battery-runtime.ts'
import type { ItemFacts, KitState } from '#shared/engine/readiness/types.ts'
import { periodAt, textsOf } from './support/answers.ts'
import { capacity, currentCheck, radioCheck } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { itemIn, retested, withItem, withTests } from './support/kits.ts'
import { calibration } from './support/more-evidence.ts'
import { DIGITAL, HF, SOON, TESTED_ON, VHF } from './support/sample-kits.ts'

/** Hours from the currents that a radio check measured: of 45 usable Ah (50 Ah, 98.2 % measured, 90 % of it). */

const RADIO = itemIn(VHF, 'radio').id
const LATER = '2026-06-10'
const capabilityOf = (kit: KitState, on = SOON) => periodAt(kit, at(on)).capability
const usableAh = capabilityOf(VHF).usableAh ?? 0

const measured = (kit: KitState, of: 'radio' | 'station' = 'radio', on = TESTED_ON) =>
  retested(kit, currentCheck(itemIn(kit, 'radio').id, { receiveA: 0.6, transmitA: 11, of }, on))
const withFacts = (kit: KitState, facts: ItemFacts) => withItem(kit, itemIn(kit, 'radio').id, { facts })

describe('currents measured in a radio check', () => {
  it('come before the mean load that somebody wrote down', () => {
    const { hours, hoursFactors, hoursConditions } = capabilityOf(measured(VHF))
    expect(hours).toBeCloseTo(usableAh / (0.2 * 11 + 0.8 * 0.6), 9)
    expect(hoursFactors.join('; ')).toContain(
      'Mean load 2.68 A, from currents measured at 100 W on RAD-92 on 1 Jun 2026, in the lead of the radio',
    )
    expect(hoursConditions).toBe(
      'transmitting 20 % of the time, voice, FM, at 20 °C, currents measured 1 Jun 2026',
    )
  })

  it('are drawn in full for as long as the kind says that somebody transmits', () => {
    const busy = { ...measured(VHF), promise: { ...VHF.promise, transmitPercent: 50 } }
    const { hours, hoursFactors } = capabilityOf(busy)
    expect(hours).toBeCloseTo(usableAh / (0.5 * 11 + 0.5 * 0.6), 9)
    expect(hoursFactors.join('; ')).toContain('Transmitting 50 % of the time, voice, FM: 11 A for 50 %')
    expect(capabilityOf(measured(VHF)).hoursFactors.join('; ')).toContain('as its kind says nothing else')
  })

  it('are drawn in full for half of a transmission on sideband, and for all of it in a digital mode', () => {
    const ofHf = (capabilityOf(HF).usableAh ?? 0) / (0.1 * 11 + 0.9 * 0.6)
    expect(capabilityOf(measured(HF)).hours).toBeCloseTo(ofHf, 9)
    const ofDigital = (capabilityOf(DIGITAL).usableAh ?? 0) / (0.2 * 11 + 0.8 * 0.6)
    expect(capabilityOf(measured(DIGITAL, 'station')).hours).toBeCloseTo(ofDigital, 9)
  })

  it('are those of the lowest setting that gives the promised power', () => {
    const check = radioCheck(RADIO, { '2 m': 50 }, TESTED_ON, 50)
    const transmit = [
      { settingW: 100, currentA: 20 },
      { settingW: 50, currentA: 12 },
      { settingW: 50, currentA: 11 },
      { settingW: 10, currentA: 4 },
    ]
    const kit = retested(VHF, { ...check, currents: { of: 'radio', receiveA: 0.6, transmit } })
    expect(capabilityOf(kit).hours).toBeCloseTo(usableAh / (0.2 * 12 + 0.8 * 0.6), 9)
  })

  it('stay known after a later check that read the power alone', () => {
    const later = withTests(measured(VHF), radioCheck(RADIO, { '2 m': 50, '70 cm': 50 }, LATER, 50))
    expect(capabilityOf(later).hours).toBe(capabilityOf(measured(VHF)).hours)
  })

  it('count from when they were recorded, and not while their instrument is in doubt', () => {
    const check = { receiveA: 1, transmitA: 20 }
    const arrived = withTests(VHF, currentCheck(RADIO, check, { on: LATER, recorded: '2026-06-14' }))
    expect(capabilityOf(arrived, '2026-06-12').hours).toBe(capabilityOf(VHF).hours)
    expect(capabilityOf(arrived).hours).toBeCloseTo(usableAh / (0.2 * 20 + 0.8 * 1), 9)
    const doubted = {
      ...withTests(
        VHF,
        currentCheck(RADIO, check, { on: LATER, with: 'WTM-1' }),
        calibration('WTM-1', '2025-01-01', false),
      ),
      instruments: [{ id: 'WTM-1', designation: 'WTM-1', category: 'wattmeter' as const }],
    }
    expect(capabilityOf(doubted).hours).toBe(capabilityOf(VHF).hours)
  })

  it('cost lead-acid more than their mean does', () => {
    const agm = { chemistry: 'agm', ratedAh: 50 }
    const kit = measured(
      retested(withItem(VHF, 'BAT-92', { facts: agm }), capacity('BAT-92', 100, TESTED_ON)),
    )
    const open = {
      ...kit,
      policies: kit.policies.map((one) => ({ ...one, settings: { temperatureFactor: 1 } })),
    }
    const runtime = leadAcidRuntime({ ratedAh: 50, capacityFraction: 1, depth: 0.5, temperatureFactor: 1 }, [
      { share: 0.2, currentA: 11 },
      { share: 0.8, currentA: 0.6 },
    ])
    const { hours } = capabilityOf(open)
    expect(runtime).toMatchObject({ hours: expect.closeTo(hours ?? 0, 9) })
    expect(hours).toBeLessThan(25 / 2.68)
  })
})

describe('a computer of the station', () => {
  const withComputer = (facts: ItemFacts) => withItem(DIGITAL, itemIn(DIGITAL, 'computer').id, { facts })

  it('is added as it is rated where the current was read in the lead of the radio', () => {
    const { hours, hoursFactors, usableAh: ah } = capabilityOf(measured(withComputer({ supplyW: 30 })))
    expect(hours).toBeCloseTo((ah ?? 0) / (0.2 * 13.5 + 0.8 * 3.1), 9)
    expect(hoursFactors.join('; ')).toContain('CMP-91: 2.5 A all the time, its rated 30 W at 12 V')
  })

  it('is named where nobody knows what it draws, and is in what was read of the whole station', () => {
    expect(capabilityOf(measured(withComputer({}))).hoursFactors.join()).toContain(
      'CMP-91: what it draws is not',
    )
    const whole = capabilityOf(measured(withComputer({ supplyW: 30 }), 'station')).hoursFactors.join()
    expect(whole).not.toContain('CMP-91')
    expect(whole).toContain('with the whole station running')
  })
})

describe('without a measurement', () => {
  it('the mean load that somebody wrote down stands, and is called undated', () => {
    const { hours, hoursFactors, hoursConditions } = capabilityOf(VHF)
    expect(hours).toBeCloseTo(usableAh / 3.48, 9)
    expect(hoursFactors.at(-1)).toBe('Mean load 3.48 A, as written down with RAD-92, undated')
    expect(hoursConditions).toContain('a mean load written down, undated')
  })

  it('a mean load costs lead-acid as the radio’s record spreads it, and most where that says nothing', () => {
    const agm = withItem(VHF, 'BAT-92', { facts: { chemistry: 'agm', ratedAh: 50 } })
    const hoursOf = (drawA?: ItemFacts['drawA']) =>
      capabilityOf({
        ...withFacts(agm, {
          bands: VHF.promise.bands,
          ratedWatts: 50,
          meanLoadA: 3,
          ...(drawA && { drawA }),
        }),
        policies: VHF.policies.map((one) => ({ ...one, settings: {} })),
      }).hours ?? 0
    const spread = hoursOf([{ watts: 50, amps: 11 }])
    expect(hoursOf()).toBeLessThan(spread)
    expect(spread).toBeLessThan(hoursOf([{ watts: 50, amps: 3 }]))
  })

  it('the radio’s rated currents stand in, and are called rated', () => {
    const rated = withFacts(VHF, {
      bands: VHF.promise.bands,
      ratedWatts: 50,
      receiveA: 0.8,
      drawA: [{ watts: 50, amps: 12 }],
    })
    const { hours, hoursConditions } = capabilityOf(rated)
    expect(hours).toBeCloseTo(usableAh / (0.2 * 12 + 0.8 * 0.8), 9)
    expect(hoursConditions).toContain('rated currents')
  })

  it('the hours stay unknown, and a radio check is what would tell', () => {
    const period = periodAt(withFacts(VHF, { bands: VHF.promise.bands, ratedWatts: 50 }), at(SOON))
    expect(period.capability.hours).toBeNull()
    expect(textsOf(period.reasons).join()).toContain('Hours not known')
    expect(period.reasons.find(({ code }) => code === 'hours-unknown')?.action?.text).toContain('radio check')
  })
})
