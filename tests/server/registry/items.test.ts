import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import { isFailure } from '#shared/engine/outcome.ts'
import { verifyTag } from '#shared/engine/tag.ts'
import { at, fresh, givenItem, givenPlace } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Items')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
})
afterAll(() => app.close())

describe('creating an item', () => {
  it('answers the record with a tag that begins with the two letters of its category', async () => {
    const place = await givenPlace(keeper)
    const details = { category: 'transformer', core: '240-size toroid', turnsPrimary: 2, turnsSecondary: 14 }
    const item = await givenItem(keeper, 'transformer', { details, placeId: place.id, weightKg: 0.325 })
    expect(item.tag.startsWith('XF')).toBe(true)
    expect(isFailure(verifyTag(item.tag))).toBe(false)
    expect(item).toMatchObject({ category: 'transformer', details, version: 1, weightKg: 0.325, kit: null })
    expect(item.place).toEqual({ id: place.id, name: place.name })
  })

  it('is the same success when the phone sends it twice, also after a change', async () => {
    const id = uuidv7()
    const body = { designation: fresh('TWICE'), details: { category: 'battery', ratedAh: 30 } }
    const first = await keeper.put(`/api/v1/items/${id}`, body)
    const second = await keeper.put(`/api/v1/items/${id}`, body)
    expect(second.status).toBe(200)
    expect(second.body).toEqual(first.body)
    await at(1, keeper.post(`/api/v1/items/${id}`, { ...body, notes: 'Dented' })).expect(200)
    const third = await keeper.put(`/api/v1/items/${id}`, body)
    expect(third.status).toBe(200)
    expect(third.body.notes).toBe('Dented')
  })

  it('stores one item when the same creation arrives eight times at once', async () => {
    const id = uuidv7()
    const body = { designation: fresh('EIGHT'), details: { category: 'radio' } }
    const answers = await Promise.all(
      Array.from({ length: 8 }, () => keeper.put(`/api/v1/items/${id}`, body)),
    )
    expect(answers.map((answer) => answer.status)).toEqual(Array(8).fill(200))
    expect(new Set(answers.map((answer) => answer.body.tag)).size).toBe(1)
  })

  it('refuses other content under an id that was used', async () => {
    const item = await givenItem(keeper, 'mast')
    const body = { designation: fresh('OTHER'), details: { category: 'mast' } }
    const answer = await keeper.put(`/api/v1/items/${item.id}`, body)
    expect(answer.status).toBe(409)
    expect(answer.body.code).toBe('id-taken')
  })

  it('never gives one tag twice when items are made at once', async () => {
    const made = await Promise.all(Array.from({ length: 12 }, () => givenItem(keeper, 'accessory')))
    expect(new Set(made.map((item) => item.tag)).size).toBe(12)
  })

  it('refuses a designation that differs in case only', async () => {
    const item = await givenItem(keeper, 'headset', { designation: 'HDS-77' })
    const body = { designation: 'hds-77', details: { category: 'headset' } }
    const answer = await keeper.put(`/api/v1/items/${uuidv7()}`, body)
    expect(answer.status).toBe(409)
    expect(answer.body).toMatchObject({ code: 'already-exists', errors: [{ pointer: '#/designation' }] })
    expect(item.version).toBe(1)
  })

  it('takes a serial number once when two ask for it at once (P8)', async () => {
    const create = () =>
      keeper.put(`/api/v1/items/${uuidv7()}`, {
        designation: fresh('SER'),
        details: { category: 'radio' },
        maker: 'Maker A',
        model: 'One',
        serial: 'DEMO-0001',
      })
    const answers = await Promise.all([create(), create(), create()])
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409, 409])
    const refused = answers.find((answer) => answer.status === 409)!
    expect(refused.body.errors[0].pointer).toBe('#/serial')
  })

  it.each([
    ['an unknown field of the category', { category: 'battery', turnsPrimary: 2 }, '#/details/turnsPrimary'],
    ['a number out of range', { category: 'battery', ratedAh: -1 }, '#/details/ratedAh'],
    ['an unknown category', { category: 'kite' }, '#/details/category'],
    ['a band named twice', { category: 'antenna', bands: ['40 m', '40 m'] }, '#/details/bands'],
  ])('refuses %s and names it', async (_what, details, pointer) => {
    const answer = await keeper.put(`/api/v1/items/${uuidv7()}`, { designation: fresh('BAD'), details })
    expect(answer.status).toBe(422)
    expect(answer.body.errors.map((error: { pointer: string }) => error.pointer)).toContain(pointer)
  })

  it('asks for a reason when the condition is not serviceable', async () => {
    const body = { designation: fresh('BAD'), details: { category: 'radio' }, condition: 'away' }
    const answer = await keeper.put(`/api/v1/items/${uuidv7()}`, body)
    expect(answer.body.errors[0].pointer).toBe('#/conditionReason')
  })

  it('refuses a version and a tag in the body', async () => {
    const body = { designation: fresh('BAD'), details: { category: 'radio' }, version: 9, tag: 'RD2222X' }
    const answer = await keeper.put(`/api/v1/items/${uuidv7()}`, body)
    expect(answer.body.errors.map((error: { pointer: string }) => error.pointer).sort()).toEqual([
      '#/tag',
      '#/version',
    ])
  })
})

describe('changing an item', () => {
  it('tells the second of two editors and shows the record as it is now (P4)', async () => {
    const item = await givenItem(keeper, 'charger')
    const body = { designation: item.designation, details: { category: 'charger' } }
    await at(1, keeper.post(`/api/v1/items/${item.id}`, { ...body, maker: 'Maker A' })).expect(200)
    const late = await at(1, keeper.post(`/api/v1/items/${item.id}`, { ...body, maker: 'Maker B' }))
    expect(late.status).toBe(412)
    expect(late.body).toMatchObject({ code: 'version-stale', current: { maker: 'Maker A', version: 2 } })
  })

  it('needs the version that was read', async () => {
    const item = await givenItem(keeper, 'charger')
    const body = { designation: item.designation, details: { category: 'charger' } }
    const answer = await keeper.post(`/api/v1/items/${item.id}`, body)
    expect(answer.status).toBe(428)
  })

  it('keeps the version when nothing differs, whatever the order of the fields', async () => {
    const details = {
      category: 'feedline',
      lengthM: 15,
      velocityFactor: 0.66,
      lossDb: { '20 m': 0.6, '40 m': 0.4 },
    }
    const item = await givenItem(keeper, 'feedline', { details })
    const same = { ...details, lossDb: { '40 m': 0.4, '20 m': 0.6 } }
    const body = { designation: item.designation, details: same }
    const answer = await at(1, keeper.post(`/api/v1/items/${item.id}`, body))
    expect(answer.body.version).toBe(1)
    const history = await keeper.get(`/api/v1/history/item/${item.id}`)
    expect(history.body.rows).toHaveLength(1)
  })

  it('keeps the changed fields in its history, with who changed them', async () => {
    const item = await givenItem(keeper, 'dc-lead', {
      details: { category: 'dc-lead', ratedA: 25, fuseA: 30 },
    })
    const body = {
      designation: item.designation,
      details: { category: 'dc-lead', ratedA: 15, fuseA: 30 },
      notes: 'Thin',
    }
    await at(1, keeper.post(`/api/v1/items/${item.id}`, body)).expect(200)
    const { rows } = (await keeper.get(`/api/v1/history/item/${item.id}`)).body
    expect(rows[0]).toMatchObject({
      action: 'item-changed',
      memberId: keeper.memberId,
      summary: `changed notes and details of ${item.designation}`,
      before: { details: { ratedA: 25 }, notes: '' },
      after: { details: { ratedA: 15 }, notes: 'Thin' },
    })
  })

  it('refuses another category, which the tag says', async () => {
    const item = await givenItem(keeper, 'charger')
    const body = { designation: item.designation, details: { category: 'radio' } }
    const answer = await at(1, keeper.post(`/api/v1/items/${item.id}`, body))
    expect(answer.status).toBe(422)
    expect(answer.body.errors[0].pointer).toBe('#/details/category')
  })
})

describe('retiring an item', () => {
  it('leaves it on record with the reason and frees its designation', async () => {
    const item = await givenItem(keeper, 'mast')
    const retired = await at(1, keeper.post(`/api/v1/items/${item.id}/retire`, { reason: 'Bent' }))
    expect(retired.body).toMatchObject({ retiredReason: 'Bent', version: 2 })
    await givenItem(keeper, 'mast', { designation: item.designation })
    const back = await at(2, keeper.post(`/api/v1/items/${item.id}/bring-back`, {}))
    expect(back.status).toBe(409)
    expect(back.body.code).toBe('already-exists')
  })

  it('refuses to change or retire it again, and brings it back', async () => {
    const item = await givenItem(keeper, 'mast')
    await at(1, keeper.post(`/api/v1/items/${item.id}/retire`, { reason: 'Lost' })).expect(200)
    const body = { designation: item.designation, details: { category: 'mast' } }
    expect((await at(2, keeper.post(`/api/v1/items/${item.id}`, body))).body.code).toBe('state-conflict')
    expect((await at(2, keeper.post(`/api/v1/items/${item.id}/retire`, { reason: 'Lost' }))).status).toBe(409)
    const back = await at(2, keeper.post(`/api/v1/items/${item.id}/bring-back`, {}))
    expect(back.body).toMatchObject({ retiredAt: null, version: 3 })
  })
})
