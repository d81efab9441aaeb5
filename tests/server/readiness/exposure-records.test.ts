import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { exposureRecord, type ExposureRecord } from '#shared/contracts/kit-exposure.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

let demo: DemoApp
let member: TestMember
let keeper: TestMember

beforeAll(async () => {
  demo = await startDemoApp()
  member = await demo.as('josiah')
  keeper = await demo.as('tobin')
}, LOADING_MS)
afterAll(() => demo.close())

const USE = { emission: 'cw-conversational', onMinutes: 10, offMinutes: 5, gainDbi: 2.15 }
const evaluate = async (kit: string, recordId: string, use: object = USE) =>
  member.post(`/api/v1/kits/${await demo.idOf(kit)}/exposure-records`, { recordId, ...use })
const records = async (kit: string) =>
  (await member.get(`/api/v1/kits/${await demo.idOf(kit)}/exposure-records`)).body.records as ExposureRecord[]
const note = async (kit: string) =>
  (await member.get(`/api/v1/kits/${await demo.idOf(kit)}/readiness`)).body.exposure

async function takeOut(item: string): Promise<void> {
  const [row] = await demo.rows<{ kitId: string; positionId: string; placeId: string }>(
    `SELECT i.kit_id AS "kitId", i.position_id AS "positionId", p.id AS "placeId" FROM item i, place p
      WHERE i.designation = $1 LIMIT 1`,
    [item],
  )
  const { placeId, ...from } = row!
  const body = {
    moveId: uuidv7(),
    from: { kind: 'position', ...from },
    to: { kind: 'place', placeId },
    reason: 'to be mended',
  }
  const answer = await keeper.post(`/api/v1/items/${await demo.idOf(item)}/moves`, body)
  if (answer.status !== 200) throw new Error(answer.text)
}

describe('an exposure evaluation that is put on record', () => {
  it('keeps what was assumed, what followed, who and when', async () => {
    expect(await note('K-03')).toBeNull()
    const recordId = uuidv7()
    const { status, body } = await evaluate('K-03', recordId)
    expect(status).toBe(200)
    expect(exposureRecord.strict().parse(body)).toEqual(body)
    expect(body).toMatchObject({
      id: recordId,
      use: USE,
      antenna: { designation: 'ANT-03' },
      recordedOn: '2026-10-31',
      recordedBy: 'Josiah Fennimark',
      changed: [],
    })
    const now = await member.get(
      `/api/v1/kits/${await demo.idOf('K-03')}/exposure?emission=cw-conversational&onMinutes=10&offMinutes=5`,
    )
    expect(body.bands).toEqual(now.body.bands)
    expect(await note('K-03')).toMatchObject({ recordedBy: 'Josiah Fennimark', changed: [] })
  })

  it('is stored once however often it is sent, and never under an id that is taken', async () => {
    const recordId = uuidv7()
    const first = await evaluate('K-01', recordId)
    expect((await evaluate('K-01', recordId)).body).toEqual(first.body)
    expect(await records('K-01')).toHaveLength(1)
    expect((await evaluate('K-01', recordId, { ...USE, onMinutes: 1 })).status).toBe(409)
    expect((await evaluate('K-02', recordId)).status).toBe(409)
  })

  it('says that the configuration changed when another antenna comes in', async () => {
    await evaluate('K-02', uuidv7())
    await takeOut('ANT-02')
    expect((await records('K-02'))[0]?.changed).toContain('the antenna is none, it was ANT-02')
    expect((await note('K-02')).changed).toContain('the antenna is none, it was ANT-02')
  })

  it('needs a band whose power is known, and a use that is one', async () => {
    expect((await evaluate('K-21', uuidv7())).status).toBe(422)
    expect((await evaluate('K-01', uuidv7(), { ...USE, onMinutes: 0, offMinutes: 0 })).status).toBe(422)
    expect((await evaluate('K-01', uuidv7(), { ...USE, emission: 'shouting' })).status).toBe(422)
  })

  it('stands in the history of the kit', async () => {
    const { body } = await member.get(`/api/v1/history/kit/${await demo.idOf('K-03')}`)
    expect(JSON.stringify(body.rows)).toContain('put the RF exposure evaluation of K-03 on record')
  })
})
