import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import { at, fresh } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let keeper: TestMember
let volunteer: TestMember

beforeAll(async () => {
  app = await startTestApp()
  const group = await app.givenGroup('Consumables')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  volunteer = await app.givenMember(group)
})
afterAll(() => app.close())

async function givenLot(fields: object = {}) {
  const path = `/api/v1/consumables/${uuidv7()}`
  const body = { name: fresh('Tape'), unit: 'm', minimum: '5' }
  await keeper.put(path, body).expect(200)
  const lot = (await keeper.put(`${path}/lots/${uuidv7()}`, fields).expect(200)).body
  return { path, lotPath: `${path}/lots/${lot.id}`, lot, body }
}

const change = (lotPath: string, difference: string, by = volunteer) =>
  by.put(`${lotPath}/changes/${uuidv7()}`, { difference, reason: 'Used' })

describe('stock', () => {
  it('travels as differences and is added exactly', async () => {
    const { path, lotPath } = await givenLot({ name: '2026', useByOn: '2027-03-31' })
    for (const difference of ['0.1', '+0.2', '10.000', '-0.3']) await change(lotPath, difference).expect(200)
    const shown = (await keeper.get(path)).body
    expect(shown).toMatchObject({ quantity: '10', minimum: '5', belowMinimum: false, useByOn: '2027-03-31' })
    expect(shown.lots).toMatchObject([{ name: '2026', quantity: '10' }])
    const changes = (await keeper.get(`${path}/changes?size=3`)).body
    expect(changes.rows.map((row: { difference: string }) => row.difference)).toHaveLength(3)
    expect(changes.next).toBe(changes.rows[2].id)
    const rest = (await keeper.get(`${path}/changes?size=3&before=${changes.next}`)).body
    expect(rest).toMatchObject({
      rows: [{ difference: '0.1', changedBy: { id: volunteer.memberId } }],
      next: null,
    })
  })

  it('adds up what ten people take at once, and gives nobody what is not there (P8)', async () => {
    const { lotPath, path } = await givenLot()
    await change(lotPath, '7', keeper).expect(200)
    const answers = await Promise.all(Array.from({ length: 10 }, () => change(lotPath, '-1')))
    expect(answers.filter((answer) => answer.status === 200)).toHaveLength(7)
    const refused = answers.find((answer) => answer.status === 409)!
    expect(refused.body).toMatchObject({ code: 'state-conflict' })
    expect(refused.body.detail).toMatch(/^Only 0 m of Tape-\d+ are left\.$/)
    expect((await keeper.get(path)).body).toMatchObject({ quantity: '0', belowMinimum: true })
  })

  it('stores a change once when it arrives five times at once', async () => {
    const { lotPath, lot } = await givenLot()
    const changePath = `${lotPath}/changes/${uuidv7()}`
    const body = { difference: '2.5', reason: 'Bought' }
    const answers = await Promise.all(Array.from({ length: 5 }, () => volunteer.put(changePath, body)))
    expect(answers.map((answer) => answer.body.lot?.quantity)).toEqual(Array(5).fill('2.5'))
    const other = await volunteer.put(changePath, { ...body, difference: '3' })
    expect(other.body.code).toBe('id-taken')
    expect(lot.quantity).toBe('0')
  })

  it.each(['0', '-0.000', '1.2345', '1e3', 'NaN', '', '1,5', '1234567890'])(
    'refuses %j as a difference',
    async (difference) => {
      const { lotPath } = await givenLot()
      const answer = await change(lotPath, difference)
      expect(answer.status).toBe(422)
      expect(answer.body.errors[0].pointer).toBe('#/difference')
    },
  )

  it('refuses a number where a decimal in quotes belongs', async () => {
    const { lotPath } = await givenLot()
    const answer = await volunteer.put(`${lotPath}/changes/${uuidv7()}`, { difference: 0.1, reason: 'Used' })
    expect(answer.status).toBe(422)
  })

  it('refuses a lot of another consumable', async () => {
    const [one, other] = [await givenLot(), await givenLot()]
    const answer = await change(`${one.path}/lots/${other.lot.id}`, '1')
    expect(answer.status).toBe(404)
  })
})

describe('lots', () => {
  it('are added once, and one name once', async () => {
    const { path, lotPath } = await givenLot({ name: 'A' })
    expect((await keeper.put(lotPath, { name: 'A' })).status).toBe(200)
    expect((await keeper.put(lotPath, { name: 'B' })).body.code).toBe('id-taken')
    const twice = await keeper.put(`${path}/lots/${uuidv7()}`, { name: 'A' })
    expect(twice.body).toMatchObject({ code: 'already-exists', errors: [{ pointer: '#/name' }] })
  })

  it('carry a condition that anyone of the crew can set, at the version they read', async () => {
    const { path, lotPath } = await givenLot({ name: '2023' })
    const set = () => at(1, volunteer.post(`${lotPath}/condition`, { condition: 'leaking' }))
    const answer = await set()
    expect(answer.body).toMatchObject({ version: 2, lots: [{ condition: 'leaking' }] })
    expect((await set()).body.code).toBe('version-stale')
    const history = (await keeper.get(`/api/v1/history/consumable/${path.split('/').at(-1)}`)).body
    expect(history.rows[0].summary).toMatch(/^noted Tape-\d+ \(lot 2023\): leaking$/)
  })

  it('of a retired consumable take no change', async () => {
    const { path, lotPath } = await givenLot()
    await at(1, keeper.post(`${path}/retire`, { reason: 'Not used' })).expect(200)
    expect((await change(lotPath, '1')).body.code).toBe('state-conflict')
  })
})

describe('the list of consumables', () => {
  it('shows what runs short', async () => {
    const { lot, lotPath, body } = await givenLot()
    const short = async () => (await keeper.get('/api/v1/consumables?short=true&size=200')).body.rows
    const names = (rows: { name: string }[]) => rows.map((row) => row.name)
    expect(names(await short())).toContain(body.name)
    await change(lotPath, '5').expect(200)
    expect(names(await short())).not.toContain(body.name)
    expect(lot.condition).toBe('')
  })
})
