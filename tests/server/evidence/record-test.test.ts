import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import {
  fullCount,
  givenStation,
  heatTest,
  inspection,
  newTestId,
  recorded,
  stoppedHeatTest,
  type Station,
} from '../../support/evidence.ts'
import { givenItem, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let volunteer: TestMember
let thermometer: Item
let station: Station

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Evidence')
  keeper = await app.givenMember(group, { roles: ['quartermaster'], name: 'Keeper' })
  volunteer = await app.givenMember(group, { name: 'Volunteer' })
  thermometer = await givenItem(keeper, 'thermometer')
  station = await givenStation(keeper)
})
afterAll(() => app.close())
beforeEach(() => app.clock.advance(1, 'minutes'))

const now = () => app.clock.now().toISOString()
const common = () => ({ performedAt: now(), instrumentId: thermometer.id })
const put = (body: object, testId = newTestId()) => volunteer.put(`/api/v1/tests/${testId}`, body)
const transformer = () => station.items.transformer!

describe('recording a heat test', () => {
  it('answers the finding, the rule that it was judged by and what it did to the kit', async () => {
    const test = await recorded(volunteer, stoppedHeatTest(transformer().id, common()))
    expect(test).toMatchObject({
      procedure: 'heat-test',
      subject: { type: 'item', id: transformer().id, category: 'transformer' },
      finding: 'fail',
      findings: [{ band: '10 m', measure: 'peakC', powerW: 50, text: 'reached 85 °C after 8.2 min at 50 W' }],
      operator: { name: 'Volunteer' },
      recordedBy: { name: 'Volunteer' },
      instrument: { id: thermometer.id },
      performedOn: '2026-06-01',
      claimedAhead: false,
      judgedBy: { policyNumber: 1, rule: { limits: { maxC: 85, powerW: 50 } } },
      supersededBy: null,
      proposedRecalls: [],
    })
    expect(test.effects).toHaveLength(1)
    expect(test.effects[0]).toMatchObject({ kitId: station.kit.id, designation: station.kit.designation })
  })

  it('answers the same when it is read', async () => {
    const test = await recorded(volunteer, heatTest(transformer().id, common()))
    const read = await volunteer.get(`/api/v1/tests/${test.id}`)
    expect(read.body).toEqual(test)
  })

  it('stands in the history of the thing and of its kit', async () => {
    await recorded(volunteer, heatTest(transformer().id, common(), { band: '20 m' }))
    const entries = await app.inGroup(group, (tx) =>
      tx.sql<{ summary: string; actor: string; kit_id: string }>({
        name: '',
        text: `SELECT summary, actor, kit_id FROM audit_event WHERE action = 'test-recorded' ORDER BY id DESC LIMIT 1`,
      }),
    )
    expect(entries[0]).toEqual({
      summary: `recorded the heat test of ${transformer().designation}: pass, 20 m: 62 °C after 10 min at 50 W`,
      actor: 'Volunteer',
      kit_id: station.kit.id,
    })
  })

  it('refuses a run that shows nothing, and names the field', async () => {
    const whole = heatTest(transformer().id, common())
    const readings = whole.inputs.readings.filter(({ atS }) => atS <= 120)
    const answer = await put({ ...whole, inputs: { ...whole.inputs, readings, keyUpAtS: 120 } })
    expect(answer.status).toBe(422)
    expect(answer.body.errors).toMatchObject([{ pointer: '#/inputs/keyUpAtS' }])
    const stood = whole.inputs.readings.map((reading, index) =>
      index === 2 ? { ...reading, atS: 60 } : reading,
    )
    const backwards = await put({ ...whole, inputs: { ...whole.inputs, readings: stood } })
    expect(backwards.body.errors).toMatchObject([{ pointer: '#/inputs/readings/2/atS' }])
  })
})

describe('what a test needs', () => {
  it('is refused without a method or without an instrument', async () => {
    const body = heatTest(transformer().id, common())
    for (const [field, bad] of [
      ['method', { ...body, method: ' ' }],
      ['instrumentId', { ...body, instrumentId: undefined }],
      ['instrumentId', { ...body, instrumentId: uuidv7() }],
      ['instrumentId', { ...body, instrumentId: transformer().id }],
      ['operatorId', { ...body, operatorId: uuidv7() }],
      ['itemId', { ...body, itemId: station.items.radio!.id }],
    ] as const) {
      const answer = await put(bad)
      expect([answer.status, answer.body.errors?.[0].pointer]).toEqual([422, `#/${field}`])
    }
  })

  it('is no instrument where a method is enough', async () => {
    const test = await recorded(volunteer, inspection(station.items.radio!.id, now()))
    expect(test.instrument).toBeNull()
  })

  it('does not take a voltage for a capacity, and says why', async () => {
    const tester = await givenItem(keeper, 'battery-tester')
    const answer = await put({
      procedure: 'battery-capacity',
      itemId: station.items.battery!.id,
      performedAt: now(),
      instrumentId: tester.id,
      method: 'Rested overnight',
      inputs: { restingV: 12.9, cutOffV: 10.5, temperatureC: 20 },
    })
    expect(answer.status).toBe(422)
    expect(answer.body.errors[0]).toMatchObject({
      pointer: '#/inputs/measuredAh',
      detail: expect.stringContaining('voltage says nothing about capacity'),
    })
  })

  it('is a thing of the own group: another one is not found', async () => {
    const other = await app.givenMember(await app.givenGroup('Others'), { roles: ['quartermaster'] })
    const foreign = await givenItem(other, 'radio')
    expect((await put(inspection(foreign.id, now()))).status).toBe(404)
    expect((await put(inspection(uuidv7(), now()))).status).toBe(404)
  })

  it('stays out of the reach of observers', async () => {
    const observer = await app.givenMember(group, { roles: ['observer'] })
    const answer = await observer.put(`/api/v1/tests/${newTestId()}`, inspection(transformer().id, now()))
    expect(answer.status).toBe(403)
  })
})

describe('the clock of a device', () => {
  it('may run a little ahead', async () => {
    const ahead = new Date(app.clock.now().getTime() + 4 * 60_000).toISOString()
    const test = await recorded(volunteer, inspection(station.items.radio!.id, ahead))
    expect(test).toMatchObject({ claimedAhead: false, claimedAt: ahead, performedAt: now() })
  })

  it('is marked when it runs further ahead, and the test counts from its receipt', async () => {
    const ahead = new Date(app.clock.now().getTime() + 40 * 86_400_000).toISOString()
    const test = await recorded(volunteer, inspection(station.items.radio!.id, ahead))
    expect(test).toMatchObject({
      claimedAhead: true,
      claimedAt: ahead,
      performedAt: now(),
      recordedAt: now(),
      performedOn: '2026-06-01',
    })
  })

  it('may lie in the past: the rule of that day judges', async () => {
    const test = await recorded(volunteer, inspection(station.items.radio!.id, '2025-12-31T23:30:00-05:00'))
    expect(test).toMatchObject({ performedOn: '2025-12-31', performedAt: '2026-01-01T04:30:00.000Z' })
  })
})

describe('correcting a test', () => {
  const correct = (testId: string, reason = 'wrong band') => ({
    ...heatTest(transformer().id, common(), { band: '40 m' }),
    supersedes: { testId, reason },
  })

  it('adds a test that names the one it replaces, which counts no more', async () => {
    const wrong = await recorded(volunteer, stoppedHeatTest(transformer().id, common(), '40 m'))
    app.clock.advance(1, 'minutes')
    const right = await recorded(volunteer, correct(wrong.id))
    expect(right.supersedes).toEqual({ testId: wrong.id, reason: 'wrong band' })
    const before = (await volunteer.get(`/api/v1/tests/${wrong.id}`)).body
    expect(before).toMatchObject({
      finding: 'fail',
      supersededBy: { testId: right.id, reason: 'wrong band' },
    })
    const list = (await volunteer.get(`/api/v1/tests?itemId=${transformer().id}&size=200`)).body
    const ids = list.rows.map(({ id }: { id: string }) => id)
    expect(ids).toContain(right.id)
    expect(ids).not.toContain(wrong.id)
  })

  it('happens once, also when two do it at the same moment', async () => {
    const wrong = await recorded(volunteer, heatTest(transformer().id, common(), { band: '40 m' }))
    const answers = await Promise.all([1, 2, 3, 4].map(() => put(correct(wrong.id))))
    const codes = answers.map(({ status, body }) => (status === 200 ? 'stored' : body.code))
    expect(codes.sort()).toEqual(['already-superseded', 'already-superseded', 'already-superseded', 'stored'])
    expect((await put(correct(wrong.id))).status).toBe(409)
  })

  it('needs a reason, and a test of the same procedure and thing', async () => {
    const other = await recorded(volunteer, inspection(transformer().id, now()))
    expect((await put(correct(other.id))).body.errors[0].pointer).toBe('#/supersedes/testId')
    expect((await put(correct(uuidv7()))).body.errors[0].pointer).toBe('#/supersedes/testId')
    expect((await put(correct(other.id, ''))).body.errors[0].pointer).toBe('#/supersedes/reason')
  })
})

describe('what a test changes on things', () => {
  it('makes an item unserviceable by inspection, and serviceable again', async () => {
    const radio = station.items.radio!
    const broken = await recorded(volunteer, inspection(radio.id, now(), 'no audio'))
    expect(broken.effects[0]!.after).toBe('not-fit')
    const shown = (await volunteer.get(`/api/v1/items/${radio.id}`)).body
    expect(shown).toMatchObject({ condition: 'unserviceable', conditionReason: 'no audio' })
    app.clock.advance(1, 'minutes')
    await recorded(volunteer, inspection(radio.id, now()))
    expect((await volunteer.get(`/api/v1/items/${radio.id}`)).body).toMatchObject({
      condition: 'serviceable',
      conditionReason: '',
    })
  })

  it('leaves the thing alone when a later inspection is on record', async () => {
    await recorded(volunteer, inspection(station.items.radio!.id, '2026-05-01T12:00:00Z', 'old news'))
    expect((await volunteer.get(`/api/v1/items/${station.items.radio!.id}`)).body.condition).toBe(
      'serviceable',
    )
  })

  it('marks what a count did not see, and closes the kit with a new seal', async () => {
    const { kit, items } = await givenStation(keeper)
    const count = fullCount(kit, now(), '0476')
    const radio = items.radio!
    const positions = count.inputs.positions.map((line, index) =>
      index === 0 ? { ...line, found: 0, missingItemIds: [radio.id] } : line,
    )
    const test = await recorded(volunteer, { ...count, inputs: { ...count.inputs, positions } })
    expect(test.finding).toBe('fail')
    expect((await volunteer.get(`/api/v1/items/${radio.id}`)).body).toMatchObject({
      condition: 'missing',
      conditionReason: 'not seen at the count of 1 Jun 2026',
    })
    expect((await volunteer.get(`/api/v1/kits/${kit.id}`)).body).toMatchObject({
      sealNumber: '0476',
      sealMatches: true,
    })
    app.clock.advance(1, 'minutes')
    await recorded(volunteer, fullCount({ ...kit, sealNumber: '0476' }, now(), '0477'))
    expect((await volunteer.get(`/api/v1/items/${radio.id}`)).body.condition).toBe('serviceable')
  })

  it('asks a count for every position', async () => {
    const count = fullCount(station.kit, now())
    const inputs = { ...count.inputs, positions: count.inputs.positions.slice(1) }
    const answer = await put({ ...count, inputs })
    expect(answer.body.errors[0].pointer).toBe('#/inputs/positions')
  })
})

describe('the partner of a pair', () => {
  const pair = (partnerId: string) => ({
    procedure: 'pair-loss' as const,
    itemId: transformer().id,
    ...common(),
    method: 'Two units back to back, wattmeter',
    inputs: { partnerId, meters: 'two', bands: [{ band: '10 m', inW: 50, outW: 40 }] },
  })

  it('is kept with the test when it is another transformer of the group', async () => {
    const partner = await givenItem(keeper, 'transformer')
    expect((await recorded(volunteer, pair(partner.id))).inputs).toMatchObject({ partnerId: partner.id })
  })

  it('is never the unit itself, nor another kind of thing, nor of another group', async () => {
    const other = await app.givenMember(await app.givenGroup('Neighbours'), { roles: ['quartermaster'] })
    const theirs = await givenItem(other, 'transformer')
    for (const id of [transformer().id, station.items.radio!.id, theirs.id]) {
      const answer = await put(pair(id))
      expect(answer.status).toBe(422)
      expect(answer.body.errors).toMatchObject([{ pointer: '#/inputs/partnerId' }])
    }
  })
})
