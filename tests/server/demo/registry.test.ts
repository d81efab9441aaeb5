import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { daysBetween } from '#shared/engine/plain-date.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

let demo: DemoApp
let tobin: TestMember
let ines: TestMember

beforeAll(async () => {
  demo = await startDemoApp()
  ;[tobin, ines] = await Promise.all([demo.as('tobin'), demo.as('ines')])
}, LOADING_MS)
afterAll(() => demo.close())

async function listed<Row>(path: string, by = tobin): Promise<Row[]> {
  const answer = await by.get(`${path}${path.includes('?') ? '&' : '?'}size=200`)
  expect(answer.status, JSON.stringify(answer.body)).toBe(200)
  return (answer.body as { rows: Row[] }).rows
}

interface ItemRow {
  designation: string
  owner: { name: string } | null
  kit: { designation: string } | null
  place: { name: string } | null
  condition: string
}

const BY_PREFIX = {
  'RAD': 22, 'XFM': 15, 'ANT': 23, 'FDL': 24, 'JMP': 11, 'BAT': 45, 'CHG': 24, 'DCL': 18, 'ADP': 20, 'MST': 20,
  'HDS': 7, 'CMP': 3, 'SIF': 3, 'DPX': 2, 'SOL': 2, 'SCC': 2, 'DBX': 2, 'VNA': 2, 'WTM': 2, 'DML': 2, 'IRT': 2,
  'BTT': 2, 'DMM': 2, 'CAL': 2, 'FIX': 2, 'CLM': 1,
} // prettier-ignore

async function ownItems(): Promise<ItemRow[]> {
  const pages = [await listed<ItemRow>('/api/v1/items'), await listed<ItemRow>('/api/v1/items?page=2')]
  return pages.flat().filter(({ owner }) => owner === null)
}

describe('what the demo group owns', () => {
  it('is 260 items of 26 prefixes', async () => {
    const counts: Record<string, number> = {}
    for (const { designation } of await ownItems()) {
      const prefix = designation.split('-')[0] ?? ''
      counts[prefix] = (counts[prefix] ?? 0) + 1
    }
    expect(counts).toEqual(BY_PREFIX)
    expect(Object.values(counts).reduce((sum, n) => sum + n)).toBe(260)
    expect(Object.keys(counts)).toHaveLength(26)
  })

  it('is 24 kits in 3 places', async () => {
    expect(await listed('/api/v1/kits')).toHaveLength(24)
    const places = await listed<{ name: string }>('/api/v1/places')
    expect(places.map(({ name }) => name)).toEqual([
      'Quarry Bend Grange Locker',
      'Response Trailer',
      'Station 4 Cage',
    ])
  })

  it('fills every position but the lead of K-11', async () => {
    const kits = await listed<{ designation: string; items: number; itemsPlanned: number }>('/api/v1/kits')
    const short = kits.filter(({ items, itemsPlanned }) => items !== itemsPlanned)
    expect(short).toMatchObject([{ designation: 'K-11', items: 8, itemsPlanned: 9 }])
  })

  it('keeps four transformers, a radio and a battery on record as retired', async () => {
    const retired = await listed<ItemRow>('/api/v1/items?retired=yes')
    expect(retired.map(({ designation }) => designation)).toEqual([
      'BAT-046',
      'RAD-93',
      'XFM-81',
      'XFM-82',
      'XFM-83',
      'XFM-84',
    ])
  })

  it('does not count two radios that a member lent', async () => {
    const lent = (await listed<ItemRow>('/api/v1/items?search=LNT')).map(({ owner }) => owner?.name)
    expect(lent).toEqual(['Gideon Staplewick', 'Gideon Staplewick'])
  })

  it('is 14 consumables, with 45 seals left and a lot of leaking cells', async () => {
    const lines = await listed<{ id: string; name: string; quantity: string }>('/api/v1/consumables')
    expect(lines).toHaveLength(14)
    expect(lines.find(({ name }) => name === 'Seals, numbered')?.quantity).toBe('45')
    const cells = lines.find(({ name }) => name === 'AA cells')
    const { body } = await tobin.get(`/api/v1/consumables/${cells?.id}`)
    const old = (body as { lots: { name: string; condition: string }[] }).lots.find(
      ({ name }) => name === '2023',
    )
    expect(old?.condition).toContain('leaking')
  })
})

describe('who belongs to the demo group', () => {
  it('is 22 members and 3 agency people', async () => {
    const people = await listed<{ callSign: string | null; roles: string[] }>('/api/v1/people', ines)
    expect(people.filter(({ callSign }) => callSign !== null)).toHaveLength(22)
    expect(people.filter(({ roles }) => roles.join() === 'observer')).toHaveLength(3)
    expect(people).toHaveLength(25)
  })

  it('is administered by two', async () => {
    const administrators = await listed<{ name: string }>('/api/v1/people?role=administrator', ines)
    expect(administrators.map(({ name }) => name)).toEqual(['Ines Calderwick', 'Tobin Arkwell'])
  })
})

describe('loans of the demo group', () => {
  interface KitRow {
    designation: string
    expectedReturnOn: string | null
    holder: { name: string } | null
    homePlace: { name: string } | null
    place: { name: string } | null
  }
  const kit = async (designation: string) =>
    (await tobin.get(`/api/v1/kits/${await demo.idOf(designation)}`)).body as KitRow

  it('have K-12 nine days late', async () => {
    const late = await kit('K-12')
    expect(late.holder?.name).toBe('Piet Vandergrove')
    expect(daysBetween(late.expectedReturnOn!, '2026-10-31')).toBe(9)
  })

  it('have K-10 in time', async () => {
    const training = await kit('K-10')
    expect(training).toMatchObject({ holder: { name: 'Rafael Ybarronda' }, expectedReturnOn: '2026-11-05' })
  })

  it('have three kits away from home', async () => {
    const kits = await listed<KitRow>('/api/v1/kits')
    const astray = kits.filter(({ place, homePlace }) => place !== null && place.name !== homePlace?.name)
    expect(astray.map(({ designation }) => designation)).toEqual(['K-06', 'K-07', 'K-22'])
  })

  it('have the lead of K-11 in K-03, and what melted on the shelf', async () => {
    const items = await ownItems()
    const whereIs = (designation: string) => items.find((item) => item.designation === designation)
    expect(whereIs('DCL-11')).toMatchObject({ kit: { designation: 'K-03' }, condition: 'serviceable' })
    expect(whereIs('DCL-03')).toMatchObject({ place: { name: 'Station 4 Cage' }, condition: 'unserviceable' })
    expect(whereIs('ADP-11')).toMatchObject({ kit: { designation: 'K-11' }, condition: 'missing' })
  })
})
