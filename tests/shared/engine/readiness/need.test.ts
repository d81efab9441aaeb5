import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { meetsNeed, shortfallsOf } from '#shared/engine/readiness/need.ts'
import { anyNeed, anyNeedKit, needKit, NO_NEED, onBand, weakerThan } from './support/needs.ts'
import { RUNS, SLOW } from './support/runs.ts'

describe('a need', () => {
  it('is met by what the kit has at the antenna, to the watt and the hour', () => {
    const need = {
      ...NO_NEED,
      bands: ['40 m'],
      mode: 'voice',
      watts: 84.8,
      hours: 17,
      placeId: 'cage',
    } as const
    expect(shortfallsOf(needKit(), need)).toEqual([])
    expect(shortfallsOf(needKit(), { ...need, watts: 84.9 })).toEqual([
      { kind: 'watts', band: '40 m', needed: 84.9, has: 84.8 },
    ])
    expect(shortfallsOf(needKit(), { ...need, hours: 17.5 })).toEqual([
      { kind: 'hours', band: null, needed: 17.5, has: 17 },
    ])
  })

  it('asks for all of its bands, and the watts on each', () => {
    const kit = needKit({
      capability: {
        bands: [onBand('80 m', { wattsAtAntenna: 30 }), onBand('40 m'), onBand('20 m', { state: 'out' })],
      },
    })
    expect(shortfallsOf(kit, { ...NO_NEED, bands: ['80 m', '40 m', '20 m', '6 m'], watts: 50 })).toEqual([
      { kind: 'watts', band: '80 m', needed: 50, has: 30 },
      { kind: 'band', band: '20 m', state: 'out' },
      { kind: 'not-built', what: '6 m' },
    ])
  })

  it('is met on any band that stands where it names none', () => {
    const weakFirst = [onBand('80 m', { wattsAtAntenna: 10 }), onBand('40 m', { wattsAtAntenna: 61 })]
    const need = { ...NO_NEED, watts: 60 }
    expect(meetsNeed(needKit({ capability: { bands: weakFirst } }), need)).toBe(true)
    expect(shortfallsOf(needKit({ capability: { bands: weakFirst } }), { ...need, watts: 70 })).toEqual([
      { kind: 'watts', band: '40 m', needed: 70, has: 61 },
    ])
    expect(shortfallsOf(needKit({ capability: { bands: [] } }), need)).toEqual([
      { kind: 'not-built', what: 'transmit' },
    ])
    const unproven = [onBand('80 m', { state: 'out' }), onBand('40 m', { state: 'not-proven' })]
    expect(shortfallsOf(needKit({ capability: { bands: unproven } }), need)).toEqual([
      { kind: 'band', band: null, state: 'not-proven' },
    ])
  })

  it('does not count hours where mains or a vehicle is at hand', () => {
    const empty = needKit({ capability: { hours: null } })
    expect(shortfallsOf(empty, { ...NO_NEED, hours: 12 })).toEqual([
      { kind: 'hours', band: null, needed: 12, has: null },
    ])
    expect(meetsNeed(empty, { ...NO_NEED, hours: 12, mains: true })).toBe(true)
  })

  it('tells a mode that is lost from one that the kind never had', () => {
    const kit = needKit({ promisedModes: ['voice', 'digital'] })
    expect(shortfallsOf(kit, { ...NO_NEED, mode: 'digital' })).toEqual([{ kind: 'mode', mode: 'digital' }])
    expect(shortfallsOf(kit, { ...NO_NEED, mode: 'relay' })).toEqual([{ kind: 'not-built', what: 'relay' }])
  })

  it('is met by nothing that may not go or has not been shown to work', () => {
    expect(shortfallsOf(needKit({ availability: 'assigned', verdict: 'not-proven' }), NO_NEED)).toEqual([
      { kind: 'availability', availability: 'assigned' },
      { kind: 'verdict', verdict: 'not-proven' },
    ])
    expect(shortfallsOf(needKit(), { ...NO_NEED, placeId: 'north' })).toEqual([{ kind: 'place' }])
    expect(meetsNeed(needKit({ placeId: null }), { ...NO_NEED, placeId: 'north' })).toBe(false)
  })
})

describe('any need', SLOW, () => {
  it('that is weaker is met by whatever meets the stronger one', () => {
    const needs = anyNeed.chain((strong) => weakerThan(strong).map((weak) => ({ strong, weak })))
    fc.assert(
      fc.property(anyNeedKit, needs, (kit, { strong, weak }) => {
        if (meetsNeed(kit, strong)) expect(shortfallsOf(kit, weak)).toEqual([])
      }),
      RUNS,
    )
  })

  it('is still met by a kit with more watts and hours', () => {
    fc.assert(
      fc.property(anyNeedKit, anyNeed, (kit, need) => {
        const more = (value: number | null) => (value ?? 0) + 10
        const { bands, hours } = kit.capability
        const stronger = {
          ...kit.capability,
          hours: more(hours),
          bands: bands.map((one) => ({ ...one, wattsAtAntenna: more(one.wattsAtAntenna) })),
        }
        if (meetsNeed(kit, need)) expect(meetsNeed({ ...kit, capability: stronger }, need)).toBe(true)
      }),
      RUNS,
    )
  })

  it('names amounts that fall short of what is needed, and only bands that it asks for', () => {
    fc.assert(
      fc.property(anyNeedKit, anyNeed, (kit, need) => {
        for (const one of shortfallsOf(kit, need)) {
          if (one.kind === 'watts' || one.kind === 'hours') expect(one.has ?? 0).toBeLessThan(one.needed)
          if (one.kind === 'watts' && need.bands.length > 0) expect(need.bands).toContain(one.band)
        }
      }),
      RUNS,
    )
  })
})
