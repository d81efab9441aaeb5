import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import type { TestGroup } from '../../support/test-app.ts'
import {
  at,
  fresh,
  givenItem,
  givenKit,
  givenKitKind,
  givenPlace,
  into,
  kitKindBody,
  moved,
  position,
  type KitKind,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let coordinator: TestMember
let kind: KitKind

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Kits')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  coordinator = await app.givenMember(group, { roles: ['net-coordinator'] })
  kind = await givenKitKind(keeper)
})
afterAll(() => app.close())

const bodyOf = (own: KitKind) => ({
  code: own.code,
  name: own.name,
  station: own.station,
  promise: own.promise,
  positions: own.positions,
})

describe('a kit kind', () => {
  it('keeps its load plan in the order it was sent', async () => {
    const positions = [position('antenna'), position('mast', { vital: false, requires: { note: '6 m' } })]
    const own = await givenKitKind(keeper, { positions })
    expect(own.positions).toEqual(positions.map((each) => ({ requires: {}, ...each })))
    const turned = await at(
      1,
      keeper.post(`/api/v1/kit-kinds/${own.id}`, { ...bodyOf(own), positions: [...own.positions].reverse() }),
    )
    expect(turned.body.positions.map((each: { name: string }) => each.name)).toEqual(['mast', 'antenna'])
    expect(turned.body.version).toBe(2)
  })

  it('lets go of empty positions only', async () => {
    const own = await givenKitKind(keeper)
    const kit = await givenKit(keeper, own)
    await moved(keeper, await givenItem(keeper, 'radio'), into(kit, 'radio'))
    const withoutRadio = { ...bodyOf(own), positions: own.positions.slice(1) }
    const refused = await at(1, keeper.post(`/api/v1/kit-kinds/${own.id}`, withoutRadio))
    expect(refused.body).toMatchObject({ status: 409, code: 'state-conflict' })
    const withoutBattery = { ...bodyOf(own), positions: own.positions.slice(0, 2) }
    await at(1, keeper.post(`/api/v1/kit-kinds/${own.id}`, withoutBattery)).expect(200)
  })

  it('refuses to shrink a position below what is packed, and another category', async () => {
    const own = await givenKitKind(keeper)
    const kit = await givenKit(keeper, own)
    for (let n = 0; n < 2; n += 1)
      await moved(keeper, await givenItem(keeper, 'battery'), into(kit, 'battery'))
    const change = (fields: object) => ({
      ...bodyOf(own),
      positions: own.positions.map((each) => (each.category === 'battery' ? { ...each, ...fields } : each)),
    })
    const fewer = await at(1, keeper.post(`/api/v1/kit-kinds/${own.id}`, change({ quantity: 1 })))
    expect(fewer.body.errors[0].pointer).toBe('#/positions/2/quantity')
    const other = await at(1, keeper.post(`/api/v1/kit-kinds/${own.id}`, change({ category: 'charger' })))
    expect(other.body.code).toBe('state-conflict')
  })

  it('refuses a position of another kind', async () => {
    const own = await givenKitKind(keeper)
    const body = { ...bodyOf(own), positions: [...own.positions, kind.positions[0]] }
    const answer = await at(1, keeper.post(`/api/v1/kit-kinds/${own.id}`, body))
    expect(answer.body.code).toBe('id-taken')
  })

  it('is not retired while a kit has it', async () => {
    const own = await givenKitKind(keeper)
    const kit = await givenKit(keeper, own)
    const retire = () => at(1, keeper.post(`/api/v1/kit-kinds/${own.id}/retire`, { reason: 'Old' }))
    expect((await retire()).body.detail).toContain('still has 1 kit.')
    await at(1, keeper.post(`/api/v1/kits/${kit.id}/retire`, { reason: 'Old' })).expect(200)
    expect((await retire()).status).toBe(200)
    const body = { designation: fresh('K'), kitKindId: own.id }
    const late = await keeper.put(`/api/v1/kits/${uuidv7()}`, body)
    expect(late.body).toMatchObject({ status: 422, errors: [{ pointer: '#/kitKindId' }] })
  })

  it('refuses a code that differs in case only', async () => {
    const own = await givenKitKind(keeper, { code: 'HF-X' })
    const answer = await keeper.put(`/api/v1/kit-kinds/${uuidv7()}`, kitKindBody({ code: 'hf-x' }))
    expect(answer.body).toMatchObject({ code: 'already-exists', errors: [{ pointer: '#/code' }] })
    expect(own.kits).toBe(0)
  })
})

describe('a kit', () => {
  it('gets a tag that begins with KT and shows its load plan', async () => {
    const kit = await givenKit(keeper, kind)
    expect(kit.tag.startsWith('KT')).toBe(true)
    expect(kit.positions.map((each) => each.category)).toEqual(['radio', 'transformer', 'battery'])
    expect(kit).toMatchObject({ availability: 'available', kind: { code: kind.code }, holder: null })
  })

  it('shares no designation with an item, also when both are made at once', async () => {
    const kit = await givenKit(keeper, kind)
    const item = { designation: kit.designation.toLowerCase(), details: { category: 'radio' } }
    const answer = await keeper.put(`/api/v1/items/${uuidv7()}`, item)
    expect(answer.body).toMatchObject({ code: 'already-exists', errors: [{ pointer: '#/designation' }] })
    const designation = fresh('BOTH')
    const both = await Promise.all([
      keeper.put(`/api/v1/items/${uuidv7()}`, { ...item, designation }),
      keeper.put(`/api/v1/kits/${uuidv7()}`, { designation, kitKindId: kind.id }),
    ])
    expect(both.map((each) => each.status).sort()).toEqual([200, 409])
  })

  it('keeps its kind while something is packed in it', async () => {
    const kit = await givenKit(keeper, kind)
    const other = await givenKitKind(keeper)
    const body = { designation: kit.designation, kitKindId: other.id }
    const item = await givenItem(keeper, 'radio')
    const packed = await moved(keeper, item, into(kit, 'radio'))
    expect((await at(1, keeper.post(`/api/v1/kits/${kit.id}`, body))).body.code).toBe('state-conflict')
    const retire = () => at(1, keeper.post(`/api/v1/kits/${kit.id}/retire`, { reason: 'Old' }))
    expect((await retire()).body.detail).toContain('still has 1 item.')
    await at(packed.version, keeper.post(`/api/v1/items/${item.id}/retire`, { reason: 'Dead' })).expect(200)
    expect((await at(1, keeper.post(`/api/v1/kits/${kit.id}`, body))).body.kind.id).toBe(other.id)
  })

  it('is retired once and comes back', async () => {
    const kit = await givenKit(keeper, kind)
    await at(1, keeper.post(`/api/v1/kits/${kit.id}/retire`, { reason: 'Crushed' })).expect(200)
    const again = await keeper.put(`/api/v1/kits/${uuidv7()}`, {
      designation: kit.designation,
      kitKindId: kind.id,
    })
    expect(again.body.errors[0].detail).toContain('perhaps a retired one')
    const back = await at(2, keeper.post(`/api/v1/kits/${kit.id}/bring-back`, {}))
    expect(back.body).toMatchObject({ retiredAt: null, version: 3 })
  })
})

describe('availability', () => {
  const set = (by: TestMember, kit: { id: string; version: number }, body: object) =>
    at(kit.version, by.post(`/api/v1/kits/${kit.id}/availability`, body))

  it('is set by the net coordinator with reason, holder and expected return', async () => {
    const kit = await givenKit(keeper, kind)
    const body = {
      availability: 'assigned',
      reason: 'Training',
      expectedReturnOn: '2026-11-05',
      holderId: coordinator.memberId,
    }
    const answer = await set(coordinator, kit, body)
    expect(answer.body).toMatchObject({
      availability: 'assigned',
      availabilityReason: 'Training',
      expectedReturnOn: '2026-11-05',
      holder: { id: coordinator.memberId },
      version: 2,
    })
    const { rows } = (await keeper.get(`/api/v1/history/kit/${kit.id}`)).body
    expect(rows[0].summary).toBe(`set ${kit.designation} to assigned until 5 Nov 2026: Training`)
    const free = await set(coordinator, answer.body, { availability: 'available' })
    expect(free.body).toMatchObject({ holder: null, expectedReturnOn: null, availabilityReason: '' })
  })

  it.each([
    [{ availability: 'out-of-service' }, '#/reason'],
    [{ availability: 'available', expectedReturnOn: '2026-11-05' }, '#/expectedReturnOn'],
    [{ availability: 'lent', reason: 'x' }, '#/availability'],
  ])('refuses %j', async (body, pointer) => {
    const answer = await set(keeper, await givenKit(keeper, kind), body)
    expect(answer.body.errors[0].pointer).toBe(pointer)
  })

  it('is not for volunteers', async () => {
    const volunteer = await app.givenMember(group)
    const kit = await givenKit(keeper, kind)
    expect((await set(volunteer, kit, { availability: 'available' })).status).toBe(403)
  })
})

describe('a place', () => {
  it('is not retired while something lives there', async () => {
    const place = await givenPlace(keeper, { minC: -8, maxC: 34.5, kind: 'locker' })
    expect(place).toMatchObject({ minC: -8, maxC: 34.5, kits: 0 })
    const kit = await givenKit(keeper, kind, { placeId: place.id, homePlaceId: place.id })
    await givenItem(keeper, 'radio', { placeId: place.id })
    const answer = await at(1, keeper.post(`/api/v1/places/${place.id}/retire`, { reason: 'Closed' }))
    expect(answer.body.detail).toContain('still has 1 kit and 1 item.')
    expect(kit.place?.name).toBe(place.name)
  })

  it('is not retired behind the back of something that is being put there', async () => {
    for (let round = 0; round < 5; round += 1) {
      const place = await givenPlace(keeper)
      const body = { designation: fresh('IN'), details: { category: 'radio' }, placeId: place.id }
      const [item, retired] = await Promise.all([
        keeper.put(`/api/v1/items/${uuidv7()}`, body),
        at(1, keeper.post(`/api/v1/places/${place.id}/retire`, { reason: 'Closed' })),
      ])
      expect([
        [200, 409],
        [422, 200],
      ]).toContainEqual([item.status, retired.status])
    }
  })

  it('refuses a range that is upside down', async () => {
    const answer = await keeper.put(`/api/v1/places/${uuidv7()}`, { name: fresh('P'), minC: 10, maxC: 5 })
    expect(answer.body.errors[0].pointer).toBe('#/maxC')
  })
})
