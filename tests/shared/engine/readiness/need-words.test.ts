import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { nearnessOf } from '#shared/engine/readiness/need-nearness.ts'
import { missingText, needSentence } from '#shared/engine/readiness/need-words.ts'
import { meetsNeed, shortfallsOf, type Need, type NeedKit } from '#shared/engine/readiness/need.ts'
import { anyNeed, anyNeedKit, needKit, NO_NEED, onBand } from './support/needs.ts'
import { RUNS } from './support/runs.ts'

const said = (kit: NeedKit, need: Partial<Need>, reasonTop = '', tense: 'now' | 'past' = 'now') =>
  missingText({
    shortfalls: shortfallsOf(kit, { ...NO_NEED, ...need }),
    need: { ...NO_NEED, ...need },
    reasonTop,
    places: { asked: 'North store', has: kit.placeId === null ? null : 'Cage' },
    tense,
  })
const nearness = (kit: NeedKit, need: Partial<Need>) => nearnessOf(shortfallsOf(kit, { ...NO_NEED, ...need }))

const weak = needKit({
  capability: {
    bands: [onBand('80 m', { wattsAtAntenna: 38.2 }), onBand('40 m', { wattsAtAntenna: 42.4 })],
    hours: 9.44,
  },
})

describe('what is missing, in words', () => {
  it.each<[Partial<Need>, string]>([
    [{ bands: ['40 m'], watts: 60 }, 'it gave 60 W on 40 m: 42 W now'],
    [{ bands: ['80 m', '40 m'], watts: 60 }, 'it gave 60 W on 80 m and 40 m: 38 W and 42 W now'],
    [{ hours: 12 }, 'it ran 12 h on its own batteries: 9.4 h now'],
    [{ hours: 12.5 }, 'it ran 12.5 h on its own batteries: 9.4 h now'],
    [{ placeId: 'north' }, 'it were at North store: at Cage now'],
    [{ watts: 60 }, 'it gave 60 W on 40 m: 42 W now'],
  ])('says %o', (need, text) => expect(said(weak, need)).toBe(text))

  it('never rounds a figure onto what is asked for', () => {
    const close = needKit({
      capability: { bands: [onBand('40 m', { wattsAtAntenna: 59.96 })], hours: 11.98 },
    })
    expect(said(close, { bands: ['40 m'], watts: 60 })).toBe('it gave 60 W on 40 m: 59.9 W now')
    expect(said(close, { hours: 12 })).toBe('it ran 12 h on its own batteries: 11.9 h now')
  })

  it('says of the past what was so then', () => {
    expect(said(weak, { bands: ['40 m'], watts: 60 }, '', 'past')).toBe('it gave 60 W on 40 m: 42 W then')
  })

  it('asks of a band that does not stand for its watts as well, which nobody knows', () => {
    const kit = needKit({ capability: { bands: [onBand('40 m', { state: 'out', wattsAtAntenna: null })] } })
    expect(said(kit, { bands: ['40 m'] })).toBe('it worked on 40 m: out now')
    expect(said(kit, { bands: ['40 m'], watts: 60 })).toBe('it worked on 40 m and gave 60 W there: out now')
    expect(said({ ...kit, verdict: 'not-fit' }, { bands: ['40 m'], watts: 60 }, 'ANT-07 is missing')).toBe(
      'it were fit, worked on 40 m and gave 60 W there: ANT-07 is missing',
    )
  })

  it('names what a person has decided, and what nobody has measured', () => {
    expect(said(needKit({ availability: 'assigned' }), {})).toBe('it were back: out on issue now')
    expect(said(needKit({ availability: 'out-of-service' }), {})).toBe(
      'it were in service: out of service now',
    )
    expect(said(needKit({ verdict: 'not-proven' }), {}, 'K-15 count lapsed')).toBe(
      'it were proven: K-15 count lapsed',
    )
    expect(said(needKit({ capability: { hours: null } }), { hours: 4 })).toBe(
      'it ran 4 h on its own batteries: no hours are proven now',
    )
    expect(said(needKit({ promisedModes: ['digital'] }), { mode: 'digital' })).toBe(
      'it worked in digital modes: it does not now',
    )
    const unknown = needKit({ capability: { bands: [onBand('40 m', { wattsAtAntenna: null })] } })
    expect(said(unknown, { bands: ['40 m'], watts: 60 })).toBe('it gave 60 W on 40 m: not measured now')
  })
})

describe('a near miss', () => {
  it('lacks one kind of thing, and of a figure no more than half', () => {
    expect(nearness(weak, { bands: ['80 m', '40 m'], watts: 60 })).toBeCloseTo(1 - 38.2 / 60)
    expect(nearness(weak, { watts: 85 })).toBeNull()
    expect(nearness(weak, { watts: 60, hours: 12 })).toBeNull()
    expect(nearness(weak, { bands: ['6 m'] })).toBeNull()
    expect(nearness(weak, { bands: ['40 m'] })).toBeNull()
  })

  it('that may not go lacks its bands for the same cause', () => {
    const out = needKit({ verdict: 'not-fit', capability: { bands: [onBand('40 m', { state: 'out' })] } })
    expect(nearness(out, { bands: ['40 m'] })).not.toBeNull()
    expect(nearness(out, { bands: ['40 m'], hours: 20 })).toBeNull()
  })

  it('is the nearer the less has to happen', () => {
    const distances = [
      nearness(weak, { watts: 45 }),
      nearness(weak, { watts: 60 }),
      nearness(weak, { placeId: 'north' }),
      nearness(needKit({ availability: 'assigned' }), {}),
      nearness(needKit({ verdict: 'not-proven' }), {}),
      nearness(needKit({ verdict: 'not-fit' }), {}),
    ]
    expect(distances).toEqual([...distances].sort((a, b) => a! - b!))
    expect(new Set(distances).size).toBe(distances.length)
  })

  it('always says what is missing, and is never a kit that can', () => {
    fc.assert(
      fc.property(anyNeedKit, anyNeed, (kit, need) => {
        if (nearnessOf(shortfallsOf(kit, need)) === null) return
        expect(meetsNeed(kit, need)).toBe(false)
        expect(said(kit, need, 'A reason')).toMatch(/^it .+/)
      }),
      RUNS,
    )
  })
})

describe('the answer in one sentence', () => {
  const k03 = { designation: 'K-03', missing: 'it gave 60 W on 40 m: 42 W now' }

  it('counts stations and other kits, names the nearest and counts the rest', () => {
    expect(needSentence({ stations: 4, others: 0, near: [k03], tense: 'now' })).toEqual({
      lead: '4 stations can do that;',
      rest: 'K-03 could if it gave 60 W on 40 m: 42 W now.',
    })
    expect(needSentence({ stations: 1, others: 2, near: [k03, k03, k03], tense: 'future' })).toEqual({
      lead: '1 station and 2 other kits will be able to do that;',
      rest: 'K-03 could if it gave 60 W on 40 m: 42 W now. 2 more nearly can.',
    })
    expect(needSentence({ stations: 0, others: 0, near: [], tense: 'past' })).toEqual({
      lead: 'None could do that.',
      rest: '',
    })
  })
})
