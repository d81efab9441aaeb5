import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import { givenStation, heatTest, recorded, type Station } from '../../support/evidence.ts'
import { at, givenItem, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let thermometer: Item
let station: Station

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Checks')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  thermometer = await givenItem(keeper, 'thermometer')
  station = await givenStation(keeper)
})
afterAll(() => app.close())

interface Check {
  procedure: string
  state: string
  vital: boolean
  testId: string | null
}

async function checksOf(itemId: string): Promise<Check[]> {
  const { body } = await keeper.get(`/api/v1/items/${itemId}/checks`).expect(200)
  return (body as { checks: Check[] }).checks
}

const common = () => ({ performedAt: app.clock.now().toISOString(), instrumentId: thermometer.id })

describe('the checks of one item', () => {
  it('are those that its kit page shows', async () => {
    const { id } = station.items.transformer!
    const { body } = await keeper.get(`/api/v1/kits/${station.kit.id}/readiness`).expect(200)
    const { positions } = body as { positions: { items: { id: string; checks: Check[] }[] }[] }
    const shown = positions.flatMap(({ items }) => items).find((item) => item.id === id)!.checks
    expect(shown).not.toEqual([])
    expect(await checksOf(id)).toEqual(shown)
  })

  it('are known of a spare too, which is vital to nothing', async () => {
    const details = { category: 'transformer', bands: ['10 m'] }
    const spare = await givenItem(keeper, 'transformer', { details })
    await givenItem(keeper, 'transformer')
    const before = await checksOf(spare.id)
    expect(before.find(({ procedure }) => procedure === 'heat-test')).toMatchObject({
      state: 'never',
      vital: false,
    })

    const test = await recorded(keeper, heatTest(spare.id, common()))
    const after = await checksOf(spare.id)
    expect(after.some(({ testId }) => testId === test.id)).toBe(true)
  })

  it('are none once the item is retired', async () => {
    const { id, version } = await givenItem(keeper, 'battery')
    await at(version, keeper.post(`/api/v1/items/${id}/retire`, { reason: 'swollen' })).expect(200)
    expect(await checksOf(id)).toEqual([])
  })

  it('are not found for what is not there', async () => {
    await keeper.get(`/api/v1/items/${uuidv7()}/checks`).expect(404)
  })
})
