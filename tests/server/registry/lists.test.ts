import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  at,
  givenItem,
  givenKit,
  givenKitKind,
  givenPlace,
  into,
  moved,
  type Item,
  type Kit,
  type Place,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let kit: Kit
let place: Place
const items: Item[] = []

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Lists')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  place = await givenPlace(keeper, { name: 'Station 4 Cage' })
  kit = await givenKit(keeper, await givenKitKind(keeper), { placeId: place.id, designation: 'K-01' })
  for (const [designation, category, fields] of THINGS) {
    items.push(await givenItem(keeper, category, { designation, ...fields }))
  }
  await moved(keeper, items[0]!, into(kit, 'radio'))
  await at(1, keeper.post(`/api/v1/items/${items[5]!.id}/retire`, { reason: 'Worn out' })).expect(200)
})
afterAll(() => app.close())

const THINGS = [
  ['RAD-01', 'radio', { maker: 'Maker B', model: '100%', serial: 'DEMO-1' }],
  ['rad-02', 'radio', { maker: 'Maker A', model: 'x_y', serial: 'DEMO-2' }],
  ['BAT-001', 'battery', { condition: 'unserviceable', conditionReason: 'One cell dead' }],
  ['BAT-002', 'battery', { acquiredOn: '2024-05-01' }],
  ['ANT-01', 'antenna', { maker: 'Maker A' }],
  ['MST-01', 'mast', {}],
] as const

async function found(query: string): Promise<string[]> {
  const answer = await keeper.get(`/api/v1/items?${query}`)
  expect(answer.status).toBe(200)
  return answer.body.rows.map((row: Item) => row.designation)
}

describe('the list of items', () => {
  it('comes by designation, whatever the case, without retired things', async () => {
    expect(await found('')).toEqual(['ANT-01', 'BAT-001', 'BAT-002', 'RAD-01', 'rad-02'])
    expect(await found('retired=yes')).toEqual(['MST-01'])
    expect(await found('retired=any&descending=true&size=2')).toEqual(['rad-02', 'RAD-01'])
  })

  it('counts all and shows a page', async () => {
    const answer = await keeper.get('/api/v1/items?page=2&size=2')
    expect(answer.body.total).toBe(5)
    expect(answer.body.rows.map((row: Item) => row.designation)).toEqual(['BAT-002', 'RAD-01'])
    expect((await keeper.get('/api/v1/items?page=99')).body).toEqual({ rows: [], total: 5 })
  })

  it.each([
    ['category=battery', ['BAT-001', 'BAT-002']],
    ['condition=unserviceable', ['BAT-001']],
    ['held=kit', ['RAD-01']],
    ['held=loose&category=radio', ['rad-02']],
    ['sort=acquiredOn', ['BAT-002']],
    ['sort=acquiredOn&descending=true', ['BAT-002']],
    ['sort=maker&descending=true', ['RAD-01']],
  ])('answers %s', async (query, first) => {
    expect((await found(query)).slice(0, first.length)).toEqual(first)
  })

  it('filters by kit, by its kind, and by place also through the kit', async () => {
    expect(await found(`kitId=${kit.id}`)).toEqual(['RAD-01'])
    expect(await found(`kitKindId=${kit.kind.id}`)).toEqual(['RAD-01'])
    expect(await found(`placeId=${place.id}`)).toEqual(['RAD-01'])
  })

  it('searches designation, tag, maker, model and serial, and takes signs as they are', async () => {
    expect(await found('search=rad-')).toEqual(['RAD-01', 'rad-02'])
    expect(await found('search=demo-2')).toEqual(['rad-02'])
    expect(await found('search=100%25')).toEqual(['RAD-01'])
    expect(await found('search=x_y')).toEqual(['rad-02'])
    expect(await found('search=_')).toEqual(['rad-02'])
    expect(await found('search=%5C')).toEqual([])
    const tag = items[4]!.tag.toLowerCase()
    expect(await found(`search=${tag.slice(0, 2)}-${tag.slice(2)}`)).toEqual(['ANT-01'])
  })

  it.each([
    'sort=weight',
    'size=0',
    'size=201',
    'size=1e9',
    'page=0',
    'page=1.5',
    'page=x',
    'size=5&size=6',
    'retired=maybe',
    'category=kite',
    'kitId=7',
    'order=asc',
    'search=%00',
  ])('refuses %s with 400', async (query) => {
    const answer = await keeper.get(`/api/v1/items?${query}`)
    expect(answer.status).toBe(400)
    expect(answer.body.code).toBe('request-malformed')
  })
})

describe('the list of kits', () => {
  it('shows how full a kit is, and filters', async () => {
    const answer = await keeper.get(`/api/v1/kits?placeId=${place.id}&availability=available&sort=verdict`)
    expect(answer.body).toMatchObject({
      total: 1,
      rows: [{ designation: 'K-01', items: 1, itemsPlanned: 4 }],
    })
    expect((await keeper.get('/api/v1/kits?verdict=proven')).body.total).toBe(0)
    const unfit = await keeper.get('/api/v1/kits?verdict=not-fit')
    expect(unfit.body.rows).toMatchObject([{ designation: 'K-01', verdict: 'not-fit', holdsUntil: null }])
  })

  it.each(['designation', 'tag', 'kind', 'place', 'availability', 'verdict', 'holdsUntil'])(
    'sorts by %s',
    async (sort) => {
      const answer = await keeper.get(`/api/v1/kits?sort=${sort}&descending=true`)
      expect(answer.body.total).toBe(1)
    },
  )
})

describe('other lists', () => {
  it.each([
    ['places', ['name', 'kind', 'kits', 'items']],
    ['kit-kinds', ['code', 'name', 'kits', 'positions']],
    ['build-sheets', ['name', 'category', 'batches', 'items']],
    ['batches', ['name', 'buildSheet', 'coreLot', 'builtOn', 'items']],
    ['consumables', ['name', 'quantity', 'minimum', 'useByOn', 'place']],
  ])('sort %s by each of their words', async (list, sorts) => {
    for (const sort of sorts) {
      expect((await keeper.get(`/api/v1/${list}?sort=${sort}&search=a`)).status).toBe(200)
    }
    expect((await keeper.get(`/api/v1/${list}?sort=nothing`)).status).toBe(400)
  })

  it('count what is in a place', async () => {
    const answer = await keeper.get('/api/v1/places?search=cage')
    expect(answer.body.rows).toMatchObject([{ name: 'Station 4 Cage', kits: 1, items: 0 }])
  })

  it('give forms their choices in one answer', async () => {
    const answer = await keeper.get('/api/v1/registry/options')
    expect(answer.body.kitKinds[0].positions.map((each: { category: string }) => each.category)).toEqual([
      'radio',
      'transformer',
      'battery',
    ])
    expect(answer.body.members).toEqual([{ id: keeper.memberId, name: expect.any(String), callSign: null }])
    expect(answer.body.places).toEqual([{ id: place.id, name: place.name }])
  })
})

describe('finding a tag', () => {
  it('takes it as it was typed or read out', async () => {
    const { tag, id } = items[0]!
    const spoken = `${tag.slice(0, 3).toLowerCase()} - ${tag.slice(3)}`
    const answer = await keeper.get(`/api/v1/tags/${encodeURIComponent(spoken)}`)
    expect(answer.body).toEqual({ kind: 'item', id, tag, designation: 'RAD-01', retired: false })
    expect((await keeper.get(`/api/v1/tags/${kit.tag}`)).body).toMatchObject({ kind: 'kit', id: kit.id })
    expect((await keeper.get(`/api/v1/tags/${items[5]!.tag}`)).body.retired).toBe(true)
  })

  it('says what is wrong with one that was read wrong', async () => {
    for (const [input, words] of [
      ['KT4Z67', 'wrong or swapped'],
      ['XF1LO0', 'never contain'],
      ['XF', 'at least 3'],
      ['X'.repeat(40), 'at most 36'],
      ['XF2%00', 'never contain'],
    ]) {
      const answer = await keeper.get(`/api/v1/tags/${input}`)
      expect(answer.status).toBe(422)
      expect(answer.body.errors[0].pointer).toBe('#/tag')
      expect(answer.body.errors[0].detail).toContain(words)
    }
    expect((await keeper.get('/api/v1/tags/ZZZZZZV')).status).toBe(404)
  })
})

describe('the history', () => {
  it('is paged by the last entry', async () => {
    const first = (await keeper.get(`/api/v1/history/kit/${kit.id}?size=1`)).body
    expect(first.rows[0].action).toBe('item-moved')
    const rest = (await keeper.get(`/api/v1/history/kit/${kit.id}?before=${first.next}`)).body
    expect(rest.rows.map((row: { action: string }) => row.action)).toEqual(['kit-created'])
    expect(rest.next).toBeNull()
  })

  it('knows no other kinds of thing', async () => {
    expect((await keeper.get(`/api/v1/history/member/${keeper.memberId}`)).status).toBe(404)
    expect((await keeper.get(`/api/v1/history/item/${kit.id}`)).status).toBe(404)
    expect((await keeper.get(`/api/v1/history/kit/${kit.id}?before=x`)).status).toBe(400)
  })
})
