import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import pg from 'pg'
import { failStatement } from '../../support/failing-statement.ts'
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
  moveOf,
  type KitKind,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let kind: KitKind
let owner: pg.Client

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Whole or absent')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  kind = await givenKitKind(keeper)
  owner = new pg.Client({ connectionString: app.database!.ownerUrl })
  await owner.connect()
})
afterAll(async () => {
  await owner.end()
  await app.close()
})

const TABLES = ['place', 'kit_kind', 'position', 'kit', 'item', 'movement', 'consumable', 'consumable_lot']
const ADDED = ['stock_change', 'tag_print', 'audit_event', 'readiness_period', 'board_row', 'board_count']

/** Every row of every table that the operations touch, as one text. */
async function everything(): Promise<string> {
  const parts = [...TABLES, ...ADDED].map(
    (table) =>
      `SELECT '${table}' AS t, coalesce(string_agg(r::text, E'\\n' ORDER BY r::text), '') AS rows FROM ${table} r`,
  )
  const { rows } = await owner.query<{ t: string; rows: string }>(parts.join(' UNION ALL '))
  return rows.map((row) => `${row.t}\n${row.rows}`).join('\n\n')
}

/** Sends a request again and again, each time with a later statement failing, until it passes. Returns how many failed. */
async function failEach(send: () => Promise<{ status: number }>): Promise<number> {
  const before = await everything()
  for (let nth = 1; nth < 100; nth += 1) {
    const injection = failStatement(app, nth)
    const answer = await send().finally(() => injection.stop())
    if (injection.failed === undefined) {
      expect(answer.status).toBe(200)
      return nth - 1
    }
    expect([injection.failed, answer.status]).toEqual([injection.failed, 507])
    expect(await everything()).toBe(before)
  }
  throw new Error('It never ends.')
}

describe('an operation is whole or absent, whichever statement fails (P9)', () => {
  it('moves an item from one kit to another', async () => {
    const [one, other] = [await givenKit(keeper, kind), await givenKit(keeper, kind)]
    const item = await givenItem(keeper, 'radio')
    const from = into(one, 'radio')
    await moved(keeper, item, from)
    const { path, body } = moveOf(item, into(other, 'radio'), { from, reason: 'Swap' })
    expect(await failEach(async () => keeper.post(path, body))).toBeGreaterThan(8)
  })

  it('retires an item that is in a kit', async () => {
    const kit = await givenKit(keeper, kind)
    const item = await givenItem(keeper, 'radio')
    const { version } = await moved(keeper, item, into(kit, 'radio'))
    const send = async () => at(version, keeper.post(`/api/v1/items/${item.id}/retire`, { reason: 'Dead' }))
    expect(await failEach(send)).toBeGreaterThan(6)
  })

  it('adds a kit kind with its load plan, and changes it', async () => {
    const id = uuidv7()
    const body = kitKindBody()
    await failEach(async () => keeper.put(`/api/v1/kit-kinds/${id}`, body))
    const fewer = { ...body, positions: [...body.positions].reverse().slice(1) }
    await failEach(async () => at(1, keeper.post(`/api/v1/kit-kinds/${id}`, fewer)))
  })

  it('adds a kit, and sets its availability', async () => {
    const id = uuidv7()
    const body = { designation: fresh('K'), kitKindId: kind.id, placeId: (await givenPlace(keeper)).id }
    await failEach(async () => keeper.put(`/api/v1/kits/${id}`, body))
    const away = { availability: 'out-of-service', reason: 'Flooded' }
    await failEach(async () => at(1, keeper.post(`/api/v1/kits/${id}/availability`, away)))
  })

  it('adds a consumable and a lot, and takes stock in', async () => {
    const [id, lotId, changeId] = [uuidv7(), uuidv7(), uuidv7()]
    const path = `/api/v1/consumables/${id}`
    const body = { name: fresh('Fuse'), unit: 'pieces', minimum: '5' }
    await failEach(async () => keeper.put(path, body))
    await failEach(async () => keeper.put(`${path}/lots/${lotId}`, { name: '2026' }))
    const change = { difference: '12', reason: 'Bought' }
    await failEach(async () => keeper.put(`${path}/lots/${lotId}/changes/${changeId}`, change))
  })

  it('prints tags and remembers them', async () => {
    const item = await givenItem(keeper, 'mast')
    const format = { kind: 'sheet', paper: 'a4', size: 'item' }
    const body = { selection: { kind: 'chosen', itemIds: [item.id] }, format }
    expect(await failEach(async () => keeper.post('/api/v1/tag-sheets', body))).toBeGreaterThan(3)
  })
})
