import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { KitExposureRecord } from '#shared/contracts/kit-exposure.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

let demo: DemoApp
let member: TestMember

beforeAll(async () => {
  demo = await startDemoApp()
  member = await demo.as('josiah')
}, LOADING_MS)
afterAll(() => demo.close())

const read = async (kit: string, query = '') =>
  member.get(`/api/v1/kits/${await demo.idOf(kit)}/exposure${query}`)

describe('the exposure record of a kit', () => {
  it('is of the power that reaches its antenna, with the caution', async () => {
    const { status, body } = await read('K-03')
    const record = body as KitExposureRecord
    expect(status).toBe(200)
    expect(record.designation).toBe('K-03')
    expect(record.caution).toMatch(/far-field estimate.*Nobody touches the antenna/s)
    expect(record.bands.length + record.unknownBands.length).toBeGreaterThan(0)
    for (const { general, controlled } of record.bands)
      expect(general.distanceM).toBeGreaterThanOrEqual(controlled.distanceM)
  })

  it('grows with duty and gain', async () => {
    const [voice, carrier] = (
      await Promise.all([read('K-03'), read('K-03', '?emission=carrier&gainDbi=6')])
    ).map(({ body }) => (body as KitExposureRecord).bands[0]?.general.distanceM ?? 0)
    expect(carrier).toBeGreaterThan(voice!)
  })

  it('refuses a use that is none', async () => {
    expect((await read('K-03', '?emission=shouting')).status).toBe(400)
    expect((await read('K-03', '?onMinutes=0&offMinutes=0')).status).toBe(422)
  })
})
