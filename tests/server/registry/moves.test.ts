import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { TestGroup } from '../../support/test-app.ts'
import {
  at,
  givenItem,
  givenKit,
  givenKitKind,
  givenPlace,
  into,
  moved,
  moveOf,
  position,
  to,
  type KitKind,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let volunteer: TestMember
let kind: KitKind

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Moves')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  volunteer = await app.givenMember(group, { roles: ['volunteer'] })
  kind = await givenKitKind(keeper)
})
afterAll(() => app.close())

const whereIs = async (itemId: string) => (await keeper.get(`/api/v1/items/${itemId}`)).body

describe('moving an item', () => {
  it('puts it into a position, and shows it in the kit', async () => {
    const kit = await givenKit(keeper, kind)
    const item = await givenItem(keeper, 'radio')
    const after = await moved(volunteer, item, into(kit, 'radio'))
    expect(after).toMatchObject({
      kit: { id: kit.id, designation: kit.designation },
      place: null,
      version: 2,
    })
    const shown = (await keeper.get(`/api/v1/kits/${kit.id}`)).body
    expect(shown.positions[0].items).toMatchObject([{ id: item.id, designation: item.designation }])
  })

  it('leaves a trace on the item and on the pages of both kits', async () => {
    const [one, other] = [await givenKit(keeper, kind), await givenKit(keeper, kind)]
    const item = await givenItem(keeper, 'radio')
    const there = into(one, 'radio')
    await moved(keeper, item, there)
    app.clock.advance(1, 'minutes')
    await moved(volunteer, item, into(other, 'radio'), { from: there, reason: 'K needs it' })
    const words = `moved ${item.designation} from ${one.designation} to ${other.designation}: K needs it`
    const moves = (await keeper.get(`/api/v1/items/${item.id}/moves`)).body
    expect(moves.rows).toHaveLength(2)
    expect(moves.rows[0]).toMatchObject({ from: { kit: { id: one.id } }, to: { kit: { id: other.id } } })
    expect(moves.rows[0].movedBy.id).toBe(volunteer.memberId)
    for (const path of [`kit/${one.id}`, `kit/${other.id}`, `item/${item.id}`]) {
      const { rows } = (await keeper.get(`/api/v1/history/${path}`)).body
      expect(rows[0].summary).toBe(words)
    }
    expect((await keeper.get(`/api/v1/history/item/${item.id}`)).body.rows).toHaveLength(3)
  })

  it('is the same success when the phone sends it again, and stores one movement', async () => {
    const item = await givenItem(keeper, 'radio')
    const { path, body } = moveOf(item, to(await givenPlace(keeper)))
    const first = await keeper.post(path, body)
    const second = await keeper.post(path, body)
    expect(second.status).toBe(200)
    expect(second.body).toEqual(first.body)
    expect((await keeper.get(`/api/v1/items/${item.id}/moves`)).body.rows).toHaveLength(1)
    const other = await keeper.post(path, { ...body, reason: 'Another' })
    expect(other.body.code).toBe('id-taken')
  })

  it('answers a repeat with success even after the item went on', async () => {
    const item = await givenItem(keeper, 'radio')
    const [one, two] = [await givenPlace(keeper), await givenPlace(keeper)]
    const { path, body } = moveOf(item, to(one))
    await keeper.post(path, body).expect(200)
    await moved(keeper, item, to(two), { from: to(one) })
    const again = await keeper.post(path, body)
    expect(again.status).toBe(200)
    expect(again.body.item.place.id).toBe(two.id)
  })

  it('refuses an id that another item’s movement has', async () => {
    const place = await givenPlace(keeper)
    const [one, other] = [await givenItem(keeper, 'radio'), await givenItem(keeper, 'radio')]
    const { path, body } = moveOf(one, to(place))
    await keeper.post(path, body).expect(200)
    const answer = await keeper.post(moveOf(other, to(place)).path, body)
    expect(answer.status).toBe(409)
    expect(answer.body.code).toBe('id-taken')
  })

  it('refuses a mover who saw it somewhere else', async () => {
    const item = await givenItem(keeper, 'radio', { placeId: (await givenPlace(keeper)).id })
    const { path, body } = moveOf(item, to(await givenPlace(keeper)))
    const answer = await keeper.post(path, body)
    expect(answer.status).toBe(409)
    expect(answer.body.detail).toContain('somebody moved it')
  })

  it('refuses a position of another category, of another kind, and an unknown one', async () => {
    const kit = await givenKit(keeper, kind)
    const elsewhere = await givenKit(keeper, await givenKitKind(keeper))
    const item = await givenItem(keeper, 'battery')
    const wrong = moveOf(item, into(kit, 'radio'))
    const answer = await keeper.post(wrong.path, wrong.body)
    expect(answer.status).toBe(422)
    expect(answer.body.errors[0]).toMatchObject({ pointer: '#/to/positionId' })
    const foreign = moveOf(item, { ...into(kit, 'battery'), positionId: elsewhere.positions[2]!.id })
    expect((await keeper.post(foreign.path, foreign.body)).status).toBe(404)
  })

  it('takes a retired item out of its kit and refuses to move it', async () => {
    const kit = await givenKit(keeper, kind)
    const item = await givenItem(keeper, 'radio')
    const packed = await moved(keeper, item, into(kit, 'radio'))
    const retired = await at(
      packed.version,
      keeper.post(`/api/v1/items/${item.id}/retire`, { reason: 'Final stage dead' }),
    )
    expect(retired.body).toMatchObject({ kit: null, position: null, place: null })
    const moves = (await keeper.get(`/api/v1/items/${item.id}/moves`)).body.rows
    expect(moves[0]).toMatchObject({ from: { kit: { id: kit.id } }, to: { kit: null, place: null } })
    expect((await keeper.get(`/api/v1/history/kit/${kit.id}`)).body.rows[0].action).toBe('item-retired')
    const { path, body } = moveOf(item, into(kit, 'radio'))
    expect((await keeper.post(path, body)).body.code).toBe('state-conflict')
  })

  it('refuses a retired place and a retired kit', async () => {
    const place = await givenPlace(keeper)
    await at(1, keeper.post(`/api/v1/places/${place.id}/retire`, { reason: 'Sold' })).expect(200)
    const kit = await givenKit(keeper, kind)
    await at(1, keeper.post(`/api/v1/kits/${kit.id}/retire`, { reason: 'Broken up' })).expect(200)
    const item = await givenItem(keeper, 'radio')
    const toPlace = moveOf(item, to(place))
    expect((await keeper.post(toPlace.path, toPlace.body)).status).toBe(422)
    const toKit = moveOf(item, into(kit, 'radio'))
    expect((await keeper.post(toKit.path, toKit.body)).body.code).toBe('state-conflict')
  })

  it('pages through the movements by the last id', async () => {
    const [one, two] = [await givenPlace(keeper), await givenPlace(keeper)]
    const item = await givenItem(keeper, 'radio')
    await moved(keeper, item, to(one))
    await moved(keeper, item, to(two), { from: to(one) })
    await moved(keeper, item, to(one), { from: to(two) })
    const first = (await keeper.get(`/api/v1/items/${item.id}/moves?size=2`)).body
    const rest = (await keeper.get(`/api/v1/items/${item.id}/moves?size=2&before=${first.next}`)).body
    expect(first.rows).toHaveLength(2)
    expect(rest).toMatchObject({ rows: [{ to: { place: { id: one.id } } }], next: null })
  })
})

describe('moves at the same moment (P8)', () => {
  it('fills the last free place of a position once', async () => {
    const kit = await givenKit(keeper, kind)
    const items = await Promise.all(Array.from({ length: 6 }, () => givenItem(keeper, 'battery')))
    const answers = await Promise.all(
      items.map((item) => {
        const { path, body } = moveOf(item, into(kit, 'battery'))
        return keeper.post(path, body)
      }),
    )
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 200, 409, 409, 409, 409])
    const full = answers.find((answer) => answer.status === 409)!
    expect(full.body).toMatchObject({ code: 'state-conflict' })
    expect(full.body.detail).toMatch(/battery of K-\d+ is full: ITEM-\d+, ITEM-\d+/)
    const shown = (await keeper.get(`/api/v1/kits/${kit.id}`)).body
    expect(shown.positions[2].items).toHaveLength(2)
  })

  it('moves one item to one of several kits that want it', async () => {
    const item = await givenItem(keeper, 'radio')
    const kits = await Promise.all(Array.from({ length: 5 }, () => givenKit(keeper, kind)))
    const answers = await Promise.all(
      kits.map((kit) => {
        const { path, body } = moveOf(item, into(kit, 'radio'))
        return keeper.post(path, body)
      }),
    )
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409, 409, 409, 409])
    const winner = answers.find((answer) => answer.status === 200)!
    expect((await whereIs(item.id)).kit.id).toBe(winner.body.item.kit.id)
    expect((await keeper.get(`/api/v1/items/${item.id}/moves`)).body.rows).toHaveLength(1)
  })

  it('stores one movement when the same one arrives six times at once', async () => {
    const item = await givenItem(keeper, 'radio')
    const { path, body } = moveOf(item, to(await givenPlace(keeper)))
    const answers = await Promise.all(Array.from({ length: 6 }, () => keeper.post(path, body)))
    expect(answers.map((answer) => answer.status)).toEqual(Array(6).fill(200))
    expect((await whereIs(item.id)).version).toBe(2)
  })

  it('swaps two items between two kits back and forth without a deadlock', async () => {
    const open = await givenKitKind(keeper, { positions: [position('radio', { quantity: 4 })] })
    const [one, other] = [await givenKit(keeper, open), await givenKit(keeper, open)]
    const items = await Promise.all(Array.from({ length: 4 }, () => givenItem(keeper, 'radio')))
    const [left, right] = [into(one, 'radio'), into(other, 'radio')]
    for (const [index, item] of items.entries()) await moved(keeper, item, index % 2 ? left : right)
    const answers = await Promise.all(
      items.map((item, index) => {
        const [from, destination] = index % 2 ? [left, right] : [right, left]
        const { path, body } = moveOf(item, destination, { from })
        return keeper.post(path, body)
      }),
    )
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200, 200])
  })

  it('never leaves an item in a position that was removed meanwhile', async () => {
    for (let round = 0; round < 5; round += 1) {
      const own = await givenKitKind(keeper)
      const kit = await givenKit(keeper, own)
      const item = await givenItem(keeper, 'radio')
      const { path, body } = moveOf(item, into(kit, 'radio'))
      const { code, name, station, promise, positions } = own
      const fewer = { code, name, station, promise, positions: positions.slice(1) }
      const [move, update] = await Promise.all([
        keeper.post(path, body),
        at(1, keeper.post(`/api/v1/kit-kinds/${own.id}`, fewer)),
      ])
      const moveWon = move.status === 200
      expect([move.status, update.status]).toEqual(moveWon ? [200, 409] : [404, 200])
    }
  })
})
