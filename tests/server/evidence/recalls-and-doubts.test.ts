import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import {
  calibration,
  fullCount,
  givenStation,
  heatTest,
  newTestId,
  recorded,
  stoppedHeatTest,
  type Station,
} from '../../support/evidence.ts'
import { fresh, givenItem, givenKitKind, position, type Item, type KitKind } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let member: TestMember
let kind: KitKind
let thermometer: Item

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Recalls')
  keeper = await app.givenMember(group, { roles: ['quartermaster'], name: 'Keeper' })
  member = await app.givenMember(group)
  thermometer = await givenItem(keeper, 'thermometer')
  kind = await givenKitKind(keeper, {
    positions: [position('adapter-pouch')],
    promise: { bands: [], modes: [], watts: null, hours: null },
  })
})
afterAll(() => app.close())
beforeEach(() => app.clock.advance(10, 'seconds'))

const now = () => app.clock.now().toISOString()
const common = () => ({ performedAt: now(), instrumentId: thermometer.id })
const kitPage = async (station: Station) =>
  (await member.get(`/api/v1/kits/${station.kit.id}/readiness`)).body

async function givenBatch(): Promise<string> {
  const details = { category: 'transformer' }
  const sheet = uuidv7()
  await keeper.put(`/api/v1/build-sheets/${sheet}`, { name: fresh('Sheet'), details })
  const batch = uuidv7()
  const made = await keeper.put(`/api/v1/batches/${batch}`, { buildSheetId: sheet, name: fresh('Batch') })
  if (made.status !== 200) throw new Error(made.text)
  return batch
}

describe('a failed unit of a batch', () => {
  it('proposes a recall, which puts its siblings in doubt until each is tested', async () => {
    const batchId = await givenBatch()
    const unit = () => givenItem(keeper, 'transformer', { batchId })
    const [bad, good] = [await unit(), await unit()]
    await recorded(member, heatTest(good.id, common()))
    app.clock.advance(10, 'seconds')
    const failed = await recorded(member, stoppedHeatTest(bad.id, common()))
    expect(failed.proposedRecalls).toMatchObject([
      {
        batch: { id: batchId },
        procedure: 'heat-test',
        band: '10 m',
        causes: [{ unit: { id: bad.id }, kind: 'failed', text: 'reached 85 °C after 8.2 min at 50 W' }],
        siblings: [{ id: good.id, kit: null }],
      },
    ])

    const body = { band: '10 m', reason: 'a sibling reached 85 °C', dueOn: '2026-08-01' }
    const answer = await keeper.post(`/api/v1/batches/${batchId}/recall`, body)
    expect(answer.body.raised).toMatchObject([
      { itemId: good.id, cause: 'recall', doubtsEarlier: true, dueOn: '2026-08-01', raisedBy: 'Keeper' },
    ])
    const due = (await member.get(`/api/v1/due-checks?search=${good.designation}`)).body.rows
    expect(due.find(({ raised }: { raised: boolean }) => raised)).toMatchObject({
      procedure: 'heat-test',
      state: 'in-doubt',
      dueOn: '2026-08-01',
    })
    expect((await member.get(`/api/v1/tests/${failed.id}`)).body.proposedRecalls).toEqual([])
    expect((await keeper.post(`/api/v1/batches/${batchId}/recall`, body)).body.raised).toEqual([])
  })

  it('is recalled by those who answer for readiness, in their own group', async () => {
    const batchId = await givenBatch()
    const body = { band: null, reason: 'cores of the wrong mix', dueOn: '2026-08-01' }
    expect((await member.post(`/api/v1/batches/${batchId}/recall`, body)).status).toBe(403)
    const other = await app.givenMember(await app.givenGroup('Others'), { roles: ['quartermaster'] })
    expect((await other.post(`/api/v1/batches/${batchId}/recall`, body)).status).toBe(404)
  })
})

describe('a check asked for by an event', () => {
  const ask = (fields: object) => ({
    procedure: 'count',
    cause: 'opening',
    reason: 'opened',
    dueOn: '2026-06-03',
    ...fields,
  })

  it('is due on its day, is lifted by the test, and can be taken back', async () => {
    const station = await givenStation(keeper, { kind })
    await recorded(member, fullCount(station.kit, now()))
    expect((await kitPage(station)).holdsUntil).toBe('2026-12-02T05:00:00.000Z')
    app.clock.advance(10, 'seconds')
    const checkId = uuidv7()
    const asked = await member.put(`/api/v1/raised-checks/${checkId}`, ask({ kitId: station.kit.id }))
    expect(asked.body).toMatchObject({ id: checkId, kitId: station.kit.id, withdrawnAt: null })
    expect(await kitPage(station)).toMatchObject({
      holdsUntil: '2026-06-04T04:00:00.000Z',
      raisedChecks: [{ id: checkId, reason: 'opened' }],
    })
    const back = await keeper.post(`/api/v1/raised-checks/${checkId}/withdraw`, { reason: 'only looked' })
    expect(back.body.withdrawnAt).toBe(now())
    expect((await kitPage(station)).holdsUntil).toBe('2026-12-02T05:00:00.000Z')
    const twice = await keeper.post(`/api/v1/raised-checks/${checkId}/withdraw`, { reason: 'again' })
    expect(twice.status).toBe(409)
  })

  it('is raised once, however often it is sent', async () => {
    const station = await givenStation(keeper, { kind })
    const checkId = uuidv7()
    const body = ask({ kitId: station.kit.id })
    const send = (sent: object) => member.put(`/api/v1/raised-checks/${checkId}`, sent)
    const answers = await Promise.all([send(body), send(body), send(body)])
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200])
    expect((await send({ ...body, reason: 'another' })).body.code).toBe('id-taken')
  })

  it('is asked of a thing that the procedure is done to', async () => {
    const radio = await givenItem(keeper, 'radio')
    const send = (fields: object) => member.put(`/api/v1/raised-checks/${uuidv7()}`, ask(fields))
    expect((await send({ itemId: radio.id })).body.errors[0].pointer).toBe('#/procedure')
    expect((await send({})).body.errors[0].pointer).toBe('#/itemId')
    expect((await send({ itemId: uuidv7(), procedure: 'radio-check' })).status).toBe(404)
  })
})

describe('a calibration', () => {
  it('rewrites every kit that was measured with the instrument', async () => {
    const meter = await givenItem(keeper, 'thermometer')
    const details = { transformer: { bands: ['40 m', '20 m'] } }
    const stations = [await givenStation(keeper, { details }), await givenStation(keeper, { details })]
    for (const { items } of stations) {
      const used = { performedAt: now(), instrumentId: meter.id }
      await recorded(member, heatTest(items.transformer!.id, used, { band: '40 m' }))
      await recorded(member, heatTest(items.transformer!.id, used, { band: '20 m' }))
    }
    const checkOf = async (station: Station) =>
      (await kitPage(station)).positions
        .flatMap(({ items }: { items: { checks: { procedure: string; state: string }[] }[] }) => items)
        .flatMap(({ checks }: { checks: { procedure: string; state: string }[] }) => checks)
        .find(({ procedure }: { procedure: string }) => procedure === 'heat-test')
    expect((await checkOf(stations[0]!)).state).toBe('current')
    app.clock.advance(10, 'seconds')
    const failed = await recorded(member, calibration(meter.id, now(), false))
    expect(failed.effects.map(({ kitId }) => kitId).sort()).toEqual(stations.map(({ kit }) => kit.id).sort())
    expect((await checkOf(stations[0]!)).state).toBe('in-doubt')
    expect((await checkOf(stations[1]!)).state).toBe('in-doubt')
  })
})

describe('a decision about a verdict', () => {
  it('lowers it with a reason and an end, and the horizon knows when it ends', async () => {
    const station = await givenStation(keeper, { kind })
    await recorded(member, fullCount(station.kit, now()))
    const path = `/api/v1/kits/${station.kit.id}/decisions/${uuidv7()}`
    const body = {
      kind: 'lowered',
      toVerdict: 'not-fit',
      reason: 'smells of smoke',
      untilAt: '2026-06-05T12:00:00Z',
    }
    expect((await keeper.put(path, body)).body).toMatchObject({ decidedBy: 'Keeper', toVerdict: 'not-fit' })
    expect((await keeper.put(path, body)).status).toBe(200)
    expect((await keeper.put(path, { ...body, reason: 'another' })).body.code).toBe('id-taken')
    expect(await kitPage(station)).toMatchObject({
      period: {
        verdict: 'not-fit',
        reasons: [{ text: expect.stringMatching(/^Keeper lowered the verdict.*: smells of smoke$/) }],
      },
      holdsUntil: '2026-06-05T12:00:00.000Z',
      nextVerdict: 'proven',
      decisions: [{ reason: 'smells of smoke' }],
    })
    app.clock.advance(10, 'seconds')
    expect((await keeper.post(`${path}/withdraw`, { reason: 'it was the soup' })).status).toBe(200)
    expect((await kitPage(station)).period.verdict).toBe('proven')
    expect((await keeper.post(`${path}/withdraw`, { reason: 'twice' })).status).toBe(409)
  })

  it('cannot raise a verdict, begin in the past or come from a volunteer', async () => {
    const station = await givenStation(keeper, { kind })
    const path = `/api/v1/kits/${station.kit.id}/decisions/${uuidv7()}`
    const lowered = { kind: 'lowered', toVerdict: 'not-fit', reason: 'x' }
    expect((await keeper.put(path, { ...lowered, toVerdict: 'proven' })).status).toBe(422)
    expect((await keeper.put(path, { ...lowered, untilAt: '2026-05-01T00:00:00Z' })).status).toBe(422)
    expect((await keeper.put(path, { kind: 'risk-accepted', reason: 'x' })).status).toBe(422)
    expect((await member.put(path, lowered)).status).toBe(403)
    const other = await app.givenMember(await app.givenGroup('More'), { roles: ['quartermaster'] })
    expect((await other.put(path, lowered)).status).toBe(404)
  })

  it('shows an accepted risk as what it is', async () => {
    const station = await givenStation(keeper, { kind })
    const path = `/api/v1/kits/${station.kit.id}/decisions/${newTestId()}`
    await keeper.put(path, { kind: 'risk-accepted', reason: 'for the ride', untilAt: '2026-06-07T00:00:00Z' })
    const { period } = await kitPage(station)
    expect(period.verdict).toBe('not-proven')
    expect(period.reasons.at(-1)).toMatchObject({
      level: 'note',
      text: expect.stringMatching(/^Keeper accepted a risk.*: for the ride$/),
    })
  })
})
