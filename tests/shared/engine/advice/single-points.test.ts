import { describe, expect, it } from 'vitest'
import { holdersIn, singlePoints, type GroupFacts } from '#shared/engine/advice/single-points.ts'

const NOTHING: GroupFacts = {
  places: [],
  instruments: [],
  chargers: { kitsWithout: 0, loose: [] },
  testers: [],
  roles: [],
  operators: ['Ines', 'Tobin'],
}
const texts = (facts: Partial<GroupFacts>) => singlePoints({ ...NOTHING, ...facts }).map(({ text }) => text)

describe('single points of failure', () => {
  it('reads names and whatever else opens a door from free text', () => {
    expect(holdersIn('Tobin Arkwell, Maren Oldstrand; duty lockbox')).toHaveLength(3)
    expect(holdersIn('Ines and Oona')).toEqual(['Ines', 'Oona'])
    expect(holdersIn(' ')).toEqual([])
  })

  it('names the only key holder of a place that kits lie in', () => {
    expect(texts({ places: [{ name: 'Grange', keyHolders: 'Hollis', kits: 3 }] })).toEqual([
      'Hollis alone has the key of Grange: 3 kits lie behind it',
    ])
    expect(texts({ places: [{ name: 'Grange', keyHolders: '', kits: 1 }] })).toEqual([
      'Nobody is on record as having the key of Grange: 1 kit lies behind it',
    ])
    expect(texts({ places: [{ name: 'Grange', keyHolders: 'Hollis', kits: 0 }] })).toEqual([])
    expect(texts({ places: [{ name: 'Grange', keyHolders: 'Hollis, lockbox', kits: 3 }] })).toEqual([])
  })

  it('names the only instrument, tester, role and operator, and none where there are two', () => {
    expect(
      texts({
        instruments: [
          { category: 'wattmeter', designations: ['WTM-1'] },
          { category: 'analyzer', designations: ['VNA-1', 'VNA-2'] },
        ],
        testers: [{ procedure: 'heat-test', names: ['Maren'] }],
        roles: [{ role: 'quartermaster', names: ['Maren'] }],
        operators: ['Ines'],
      }),
    ).toEqual([
      'Maren alone is quartermaster',
      'Ines alone has a licence in force on record',
      'Maren alone has made a heat test in the last two years',
      'WTM-1 is the only serviceable wattmeter',
    ])
  })

  it('misses a charger only where kits with batteries have none of their own', () => {
    expect(texts({ chargers: { kitsWithout: 2, loose: ['CHG-1'] } })).toEqual([
      '2 kits with batteries have no charger of their own, and CHG-1 is the only loose charger',
    ])
    expect(texts({ chargers: { kitsWithout: 1, loose: [] } })).toEqual([
      '1 kit with batteries has no charger of its own, and there is no loose charger',
    ])
    expect(texts({ chargers: { kitsWithout: 2, loose: ['CHG-1', 'CHG-2'] } })).toEqual([])
  })

  it('says with each what to do about it', () => {
    const [point] = singlePoints({ ...NOTHING, operators: [] })
    expect(point).toMatchObject({ kind: 'operator', todo: expect.stringContaining('licences') })
  })
})
