import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { policyAnswer } from '#shared/contracts/policy.ts'
import { fullCount, givenStation, heatTest, recorded, type Station } from '../../support/evidence.ts'
import { givenItem, givenKitKind, position } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let lead: TestMember
let member: TestMember
let station: Station

beforeAll(async () => {
  app = await startTestApp({ now: '2026-06-01T12:00:00Z' })
  group = await app.givenGroup('Policies')
  lead = await app.givenMember(group, { roles: ['net-coordinator', 'quartermaster'], name: 'Lead' })
  member = await app.givenMember(group)
  const kind = await givenKitKind(lead, {
    positions: [position('adapter-pouch')],
    promise: { bands: [], modes: [], watts: null, hours: null },
  })
  station = await givenStation(lead, { kind })
  await recorded(member, fullCount(station.kit, '2026-06-01T12:00:00Z'))
})
afterAll(() => app.close())

const rule = (fields: object = {}) => ({
  id: uuidv7(),
  category: 'kit',
  procedure: 'count',
  intervalMonths: 1,
  warningDays: 7,
  vital: true,
  reason: 'Borrowed too often.',
  source: 'common practice, no source',
  ...fields,
})

const policy = (fields: object = {}) => ({
  name: 'Second',
  effectiveOn: '2026-06-10',
  reason: 'After the ride',
  rules: [rule()],
  ...fields,
})

const put = (body: object, id = uuidv7()) => lead.put(`/api/v1/policies/${id}`, body)
const heldBy = async () => (await member.get(`/api/v1/kits/${station.kit.id}/readiness`)).body.holdsUntil

describe('the policy', () => {
  it('is there from the first day, with a reason and a source for every rule', async () => {
    const { body } = await member.get('/api/v1/policy')
    expect(policyAnswer.strict().parse(body)).toEqual(body)
    expect(body).toMatchObject({ number: 1, inForce: true, effectiveOn: '2026-06-01', createdBy: '' })
    expect(body.rules.length).toBe(body.ruleCount)
    for (const { reason, source } of body.rules) expect(reason && source).toBeTruthy()
  })

  it('gets a new version that takes effect on its day, and every kit knows at once', async () => {
    expect(await heldBy()).toBe('2026-12-02T05:00:00.000Z')
    const id = uuidv7()
    const answer = await put(policy(), id)
    expect(answer.body).toMatchObject({ id, number: 2, inForce: false, createdBy: 'Lead', ruleCount: 1 })
    expect(await heldBy()).toBe('2026-07-02T04:00:00.000Z')
    expect((await member.get('/api/v1/policy')).body.number).toBe(1)
    expect((await member.get('/api/v1/policies')).body).toMatchObject({
      total: 2,
      rows: [
        { number: 2, inForce: false },
        { number: 1, inForce: true },
      ],
    })
    app.clock.set('2026-06-10T04:00:00Z')
    member = await app.givenMember(group)
    lead = await app.givenMember(group, { roles: ['net-coordinator', 'quartermaster'] })
    expect((await member.get('/api/v1/policy')).body).toMatchObject({ id, inForce: true })
  })

  it('judges a test by the version in force on the day of the test', async () => {
    const early = await recorded(member, fullCount(station.kit, '2026-06-09T12:00:00Z'))
    expect(early.judgedBy).toMatchObject({ policyNumber: 1, rule: { intervalMonths: 6 } })
    const late = await recorded(member, fullCount(station.kit, '2026-06-10T04:00:00Z'))
    expect(late.judgedBy).toMatchObject({ policyNumber: 2, rule: { intervalMonths: 1 } })
    const thermometer = await givenItem(lead, 'thermometer')
    const transformer = await givenItem(lead, 'transformer')
    const used = { performedAt: '2026-06-10T04:00:00Z', instrumentId: thermometer.id }
    const unasked = await recorded(member, heatTest(transformer.id, used))
    expect(unasked).toMatchObject({ finding: 'pass', judgedBy: { policyNumber: 2, rule: null } })
  })

  it('is stored once under its id, and is refused with other content', async () => {
    const id = uuidv7()
    const body = policy({ name: 'Third' })
    const answers = await Promise.all([put(body, id), put(body, id), put(body, id)])
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200])
    expect((await member.get('/api/v1/policies')).body.total).toBe(3)
    expect((await put(policy({ name: 'Other' }), id)).body.code).toBe('id-taken')
  })

  it('never reaches back before today or before the version that it follows', async () => {
    expect((await put(policy({ effectiveOn: '2026-06-09' }))).status).toBe(422)
    expect((await put(policy({ effectiveOn: '2026-07-01', name: 'July' }))).status).toBe(200)
    const before = await put(policy({ effectiveOn: '2026-06-20' }))
    expect([before.status, before.body.code]).toEqual([409, 'state-conflict'])
  })

  it('takes limits that fit the procedure, and rules with a reason and a source', async () => {
    const refused = async (fields: object, pointer: string) => {
      const answer = await put(policy({ effectiveOn: '2026-07-01', rules: [rule(fields)] }))
      expect([answer.status, answer.body.errors[0].pointer]).toEqual([422, pointer])
    }
    await refused({ limits: { maxSwr: 2 } }, '#/rules/0/limits/maxSwr')
    await refused({ procedure: 'antenna-sweep', limits: {} }, '#/rules/0/limits/maxSwr')
    await refused({ source: '' }, '#/rules/0/source')
    await refused({ procedure: 'rain-dance' }, '#/rules/0/procedure')
    const one = rule()
    const twice = await put(policy({ effectiveOn: '2026-07-01', rules: [one, one] }))
    expect(twice.body.errors[0].pointer).toBe('#/rules/1/id')
  })

  it('is changed by those who may, and read by the crew of its group', async () => {
    const current = (await member.get('/api/v1/policy')).body
    expect((await member.put(`/api/v1/policies/${uuidv7()}`, policy())).status).toBe(403)
    const quartermaster = await app.givenMember(group, { roles: ['quartermaster'] })
    expect((await quartermaster.put(`/api/v1/policies/${uuidv7()}`, policy())).status).toBe(403)
    const observer = await app.givenMember(group, { roles: ['observer'] })
    expect((await observer.get('/api/v1/policy')).status).toBe(403)
    const other = await app.givenMember(await app.givenGroup('Others'), { roles: ['administrator'] })
    expect((await other.get(`/api/v1/policies/${current.id}`)).status).toBe(404)
    expect((await other.get('/api/v1/policies')).body.total).toBe(1)
  })
})
