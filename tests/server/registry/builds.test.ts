import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import { at, fresh, givenItem } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Builds')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
})
afterAll(() => app.close())

const DETAILS = {
  category: 'transformer',
  core: '240-size toroid',
  mix: '43',
  turnsPrimary: 2,
  turnsSecondary: 14,
}

async function givenSheet(fields: object = {}) {
  const body = { name: fresh('49 to 1'), details: DETAILS, ...fields }
  return (await keeper.put(`/api/v1/build-sheets/${uuidv7()}`, body).expect(200)).body
}

async function givenBatch(buildSheetId: string, fields: object = {}) {
  const body = { buildSheetId, name: fresh('Batch'), coreLot: 'L-2602', builtOn: '2026-02-14', ...fields }
  return (await keeper.put(`/api/v1/batches/${uuidv7()}`, body).expect(200)).body
}

describe('build sheets and batches', () => {
  it('say how units were made, and count them', async () => {
    const sheet = await givenSheet()
    const batch = await givenBatch(sheet.id, { builderId: keeper.memberId })
    const item = await givenItem(keeper, 'transformer', { batchId: batch.id })
    expect(item).toMatchObject({ batch: { id: batch.id }, buildSheet: { id: sheet.id, name: sheet.name } })
    expect((await keeper.get(`/api/v1/batches/${batch.id}`)).body).toMatchObject({
      items: 1,
      coreLot: 'L-2602',
      builtOn: '2026-02-14',
      builder: { id: keeper.memberId },
    })
    const shown = (await keeper.get(`/api/v1/build-sheets/${sheet.id}`)).body
    expect(shown).toMatchObject({ items: 1, batches: 1, details: DETAILS })
  })

  it('refuse an item of another category', async () => {
    const sheet = await givenSheet()
    const body = { designation: fresh('ANT'), details: { category: 'antenna' }, buildSheetId: sheet.id }
    const answer = await keeper.put(`/api/v1/items/${uuidv7()}`, body)
    expect(answer.body).toMatchObject({ status: 422, errors: [{ pointer: '#/buildSheetId' }] })
  })

  it('refuse a batch of another build sheet', async () => {
    const [one, other] = [await givenSheet(), await givenSheet()]
    const batch = await givenBatch(one.id)
    const body = { designation: fresh('XFM'), details: DETAILS, buildSheetId: other.id, batchId: batch.id }
    const answer = await keeper.put(`/api/v1/items/${uuidv7()}`, body)
    expect(answer.body.errors[0].pointer).toBe('#/batchId')
  })

  it('keep their category and their units', async () => {
    const sheet = await givenSheet()
    const body = { name: sheet.name, details: { category: 'antenna' } }
    const turned = await at(1, keeper.post(`/api/v1/build-sheets/${sheet.id}`, body))
    expect(turned.body.errors[0].pointer).toBe('#/details/category')
    const batch = await givenBatch(sheet.id)
    await givenItem(keeper, 'transformer', { batchId: batch.id })
    const other = await givenSheet()
    const change = { buildSheetId: other.id, name: batch.name }
    expect((await at(1, keeper.post(`/api/v1/batches/${batch.id}`, change))).body.code).toBe('state-conflict')
  })

  it('stay with their units when they are retired, and take no new ones', async () => {
    const sheet = await givenSheet()
    const item = await givenItem(keeper, 'transformer', { buildSheetId: sheet.id })
    await at(1, keeper.post(`/api/v1/build-sheets/${sheet.id}/retire`, { reason: 'Runs hot' })).expect(200)
    const body = {
      designation: item.designation,
      details: { category: 'transformer' },
      buildSheetId: sheet.id,
    }
    await at(1, keeper.post(`/api/v1/items/${item.id}`, { ...body, notes: 'Kept' })).expect(200)
    const late = await keeper.put(`/api/v1/items/${uuidv7()}`, { ...body, designation: fresh('XFM') })
    expect(late.body.errors[0]).toMatchObject({
      pointer: '#/buildSheetId',
      detail: 'That build sheet is retired.',
    })
  })

  it('are found by name, category and sheet', async () => {
    const sheet = await givenSheet({ name: 'Nine to one, small', details: { category: 'transformer' } })
    const batch = await givenBatch(sheet.id)
    const sheets = (await keeper.get('/api/v1/build-sheets?search=nine&category=transformer')).body
    expect(sheets.rows.map((row: { id: string }) => row.id)).toEqual([sheet.id])
    const batches = (await keeper.get(`/api/v1/batches?buildSheetId=${sheet.id}&sort=builtOn`)).body
    expect(batches).toMatchObject({ total: 1, rows: [{ id: batch.id }] })
  })
})
