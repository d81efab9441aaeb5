import { describe, expect, it } from 'vitest'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { bandOf, lowering, periodAt, textsOf } from './support/answers.ts'
import * as hf from './support/demo/hf-kits.ts'
import * as other from './support/demo/other-kits.ts'

/** The figures of table 6 and of section 12 of the demo scenario, to the tolerances given there. */

describe('hours of the demo kits', () => {
  const HOURS: [kit: KitState, hours: number][] = [
    [hf.K_01, 17],
    [hf.K_02, 17],
    [other.K_09, 12.7],
    [hf.K_16, 12.1],
    [other.K_19, 13],
  ]
  for (const [kit, hours] of HOURS)
    it(`gives ${kit.kit.designation} ${hours} h`, () => {
      const { capability } = periodAt(kit)
      expect(Math.abs((capability.hours ?? 0) - hours)).toBeLessThan(0.05)
    })

  it('computes the hours of K-01 from measured capacity, usable fraction and measured load', () => {
    const { capability } = periodAt(hf.K_01)
    expect(capability.usableAh).toBeCloseTo(60 * 0.963 * 0.9, 6)
    expect(capability.hours).toBeCloseTo((60 * 0.963 * 0.9) / 3.06, 6)
    expect(capability.hoursFactors.join('; ')).toMatch(/96\.3 %.*90 %.*3\.06 A/)
  })

  it.each([hf.K_06, hf.K_07])('gives no hours where every battery is below 80 %: $kit.designation', (kit) => {
    const period = periodAt(kit)
    expect(period.capability).toMatchObject({ hours: null, usableAh: null })
    expect(textsOf(lowering(period)).join()).toContain('no battery endurance')
  })

  it('counts 353 usable Ah at K-21', () => {
    expect(periodAt(other.K_21).capability.usableAh).toBeCloseTo(352.8, 6)
  })

  it('counts the two good batteries of K-22 alone: 82 usable Ah', () => {
    expect(periodAt(other.K_22).capability.usableAh).toBeCloseTo((83 + 81) * 0.5, 6)
  })
})

describe('watts of the demo kits', () => {
  const WATTS: [kit: KitState, band: Band, radioW: number, antennaW: number][] = [
    [hf.K_01, '40 m', 100, 84.8],
    [hf.K_01, '10 m', 100, 70.7],
    [hf.K_03, '40 m', 50, 42.4],
    [hf.K_03, '10 m', 50, 35.4],
    [hf.K_04, '40 m', 100, 83.9],
    [hf.K_04, '10 m', 20, 12.0],
    [hf.K_05, '10 m', 20, 12.0],
    [other.K_09, '2 m', 50, 36.2],
    [hf.K_16, '40 m', 50, 42.4],
    [other.K_19, '2 m', 50, 36.2],
    [other.K_20, '2 m', 50, 24.5],
  ]
  for (const [kit, band, radioW, antennaW] of WATTS)
    it(`gives ${kit.kit.designation} ${radioW} W on ${band}, ${antennaW} W at the antenna`, () => {
      const capability = bandOf(periodAt(kit), band)
      expect(capability.watts).toBe(radioW)
      expect(Math.abs((capability.wattsAtAntenna ?? 0) - antennaW)).toBeLessThan(0.05)
      expect(capability.fraction).toBeCloseTo((capability.wattsAtAntenna ?? 0) / radioW, 9)
    })

  it('states the line loss and the transformer as one loss on 40 m of K-01', () => {
    expect(bandOf(periodAt(hf.K_01), '40 m').lossDb).toBeCloseTo(0.4 - 10 * Math.log10(0.93), 9)
  })
})

describe('bands and modes of the demo kits', () => {
  const states = (kit: KitState) =>
    Object.fromEntries(periodAt(kit).capability.bands.map(({ band, state }) => [band, state]))

  it('caps K-04 on 10 m and leaves its other bands alone', () => {
    expect(states(hf.K_04)).toEqual({
      '40 m': 'proven',
      '20 m': 'proven',
      '15 m': 'proven',
      '10 m': 'limited',
    })
    expect(bandOf(periodAt(hf.K_04), '10 m').limit).toContain('20 W')
  })

  it('takes 40 m out of K-07 and leaves its other bands alone', () => {
    expect(states(hf.K_07)).toEqual({ '40 m': 'out', '20 m': 'proven', '15 m': 'proven', '10 m': 'proven' })
  })

  it('limits every band of K-03 to 50 W', () => {
    const limits = periodAt(hf.K_03).capability.bands.map(({ state, watts }) => `${state} ${watts}`)
    expect(limits).toEqual(Array(4).fill('limited 50'))
  })

  it('leaves K-17 voice alone, and K-16 both modes', () => {
    expect(periodAt(hf.K_17).capability.modes).toEqual(['voice'])
    expect(periodAt(hf.K_16).capability.modes).toEqual(['digital', 'voice'])
  })

  it('lists the bands in the order of the promise', () => {
    expect(periodAt(hf.K_01).capability.bands.map(({ band }) => band)).toEqual([
      '40 m',
      '20 m',
      '15 m',
      '10 m',
    ])
  })
})
