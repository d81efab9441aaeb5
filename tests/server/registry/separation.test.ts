import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import type { Role } from '#shared/contracts/roles.ts'
import {
  at,
  fresh,
  givenItem,
  givenKit,
  givenKitKind,
  givenPlace,
  into,
  moveOf,
  to,
  type Item,
  type Kit,
  type KitKind,
  type Place,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let stranger: TestMember
let kind: KitKind
let kit: Kit
let item: Item
let place: Place
let own: { kind: KitKind; kit: Kit; item: Item; place: Place }
let member: (role: Role) => Promise<TestMember>

beforeAll(async () => {
  app = await startTestApp()
  const [one, other] = [await app.givenGroup('One'), await app.givenGroup('Other')]
  keeper = await app.givenMember(one, { roles: ['quartermaster'] })
  stranger = await app.givenMember(other, { roles: ['administrator', 'quartermaster', 'net-coordinator'] })
  member = (role) => app.givenMember(one, { roles: [role] })
  const thingsOf = async (by: TestMember) => {
    const ownKind = await givenKitKind(by)
    return {
      kind: ownKind,
      kit: await givenKit(by, ownKind),
      item: await givenItem(by, 'radio', { maker: 'Maker A', serial: 'DEMO-9' }),
      place: await givenPlace(by),
    }
  }
  ;({ kind, kit, item, place } = await thingsOf(keeper))
  own = await thingsOf(stranger)
})
afterAll(() => app.close())

describe('another group (P12)', () => {
  it('gets the same answer as for a record that does not exist', async () => {
    const paths = (id: Record<'kind' | 'kit' | 'item' | 'place', string>) => [
      `/api/v1/kit-kinds/${id.kind}`,
      `/api/v1/kits/${id.kit}`,
      `/api/v1/items/${id.item}`,
      `/api/v1/items/${id.item}/moves`,
      `/api/v1/places/${id.place}`,
      `/api/v1/history/kit/${id.kit}`,
    ]
    const foreign = paths({ kind: kind.id, kit: kit.id, item: item.id, place: place.id })
    const unknown = paths({ kind: uuidv7(), kit: uuidv7(), item: uuidv7(), place: uuidv7() })
    for (const [index, path] of foreign.entries()) {
      const [one, two] = [await stranger.get(path), await stranger.get(unknown[index]!)]
      expect([path, one.status]).toEqual([path, 404])
      expect({ ...one.body, requestId: '' }).toEqual({ ...two.body, requestId: '' })
    }
    expect((await stranger.get(`/api/v1/tags/${item.tag}`)).status).toBe(404)
  })

  it('sees nothing of it in any list', async () => {
    for (const list of ['kits', 'items', 'places', 'kit-kinds']) {
      const answer = await stranger.get(`/api/v1/${list}?retired=any&size=200`)
      expect([list, answer.body.total]).toEqual([list, 1])
    }
  })

  it('changes nothing of it', async () => {
    const change = (path: string, body: object) => at(1, stranger.post(`/api/v1/${path}`, body))
    const answers = await Promise.all([
      change(`items/${item.id}`, { designation: 'MINE', details: { category: 'radio' } }),
      change(`items/${item.id}/retire`, { reason: 'Mine' }),
      change(`kits/${kit.id}/availability`, { availability: 'out-of-service', reason: 'Mine' }),
      change(`kits/${kit.id}`, { designation: 'MINE', kitKindId: own.kind.id }),
      change(`places/${place.id}/retire`, { reason: 'Mine' }),
      stranger.post(moveOf(item, to(own.place)).path, moveOf(item, to(own.place)).body),
    ])
    expect(answers.map((answer) => answer.status)).toEqual(Array(6).fill(404))
    expect((await keeper.get(`/api/v1/items/${item.id}`)).body).toEqual(item)
    expect((await keeper.get(`/api/v1/kits/${kit.id}`)).body).toEqual(kit)
  })

  it('cannot put its ids into own records', async () => {
    const make = (list: string, body: object) => stranger.put(`/api/v1/${list}/${uuidv7()}`, body)
    const details = { category: 'radio' }
    const intoForeign = moveOf(own.item, into(kit, 'radio'))
    const mixed = moveOf(own.item, { ...into(own.kit, 'radio'), positionId: kit.positions[0]!.id })
    const answers = await Promise.all([
      make('kits', { designation: fresh('K'), kitKindId: kind.id }),
      make('kits', { designation: fresh('K'), kitKindId: own.kind.id, placeId: place.id }),
      make('items', { designation: fresh('I'), details, placeId: place.id }),
      make('items', { designation: fresh('I'), details, ownerId: keeper.memberId }),
      make('consumables', { name: fresh('C'), unit: 'm', minimum: '1', placeId: place.id }),
      stranger.post(intoForeign.path, intoForeign.body),
      stranger.post(mixed.path, mixed.body),
    ])
    expect(answers.map((answer) => answer.status)).toEqual(Array(7).fill(404))
  })

  it('may use the same names, serials and designations', async () => {
    await givenItem(stranger, 'radio', { designation: item.designation, maker: 'Maker B', serial: 'DEMO-9' })
    await givenPlace(stranger, { name: place.name })
  })

  it('is told that an id is taken, and nothing more', async () => {
    const body = { designation: fresh('I'), details: { category: 'radio' } }
    const answer = await stranger.put(`/api/v1/items/${item.id}`, body)
    expect(answer.body).toMatchObject({ status: 409, code: 'id-taken' })
  })
})

describe('rights', () => {
  const READS = [
    'places',
    'kits',
    'items',
    'kit-kinds',
    'build-sheets',
    'batches',
    'consumables',
    'registry/options',
  ]

  it('keep observers out of the whole registry', async () => {
    const observer = await member('observer')
    for (const list of READS) expect((await observer.get(`/api/v1/${list}`)).status).toBe(403)
    expect((await observer.get(`/api/v1/items/${item.id}`)).status).toBe(403)
    expect((await observer.get(`/api/v1/tags/${item.tag}`)).status).toBe(403)
    expect((await observer.get(`/api/v1/history/kit/${kit.id}`)).status).toBe(403)
  })

  it('let volunteers read and move, and keep the records to the keepers', async () => {
    const volunteer = await member('volunteer')
    for (const list of READS) expect((await volunteer.get(`/api/v1/${list}`)).status).toBe(200)
    const { path, body } = moveOf(item, into(kit, 'radio'))
    expect((await volunteer.post(path, body)).status).toBe(200)
    const create = { designation: fresh('I'), details: { category: 'radio' } }
    expect((await volunteer.put(`/api/v1/items/${uuidv7()}`, create)).status).toBe(403)
    expect((await at(1, volunteer.post(`/api/v1/items/${item.id}`, create))).status).toBe(403)
    expect((await at(1, volunteer.post(`/api/v1/kits/${kit.id}/retire`, { reason: 'x' }))).status).toBe(403)
  })

  it('let nobody in who is signed out', async () => {
    for (const list of READS) expect((await app.request().get(`/api/v1/${list}`)).status).toBe(401)
  })
})
