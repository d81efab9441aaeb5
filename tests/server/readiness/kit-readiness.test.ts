import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { kitReadiness, type KitReadiness } from '#shared/contracts/kit-readiness.ts'
import {
  fullCount,
  givenStation,
  heatTest,
  inspection,
  newTestId,
  recorded,
  type Station,
} from '../../support/evidence.ts'
import { givenItem, givenPlace, moved, to, type Item } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let member: TestMember
let thermometer: Item
let station: Station

const START = '2026-06-01T12:00:00.000Z'
const TESTED = '2026-06-01T12:20:00.000Z'

beforeAll(async () => {
  app = await startTestApp({ now: START })
  group = await app.givenGroup('Kit page')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  member = await app.givenMember(group, { name: 'Tester' })
  thermometer = await givenItem(keeper, 'thermometer')
  station = await givenStation(keeper, { details: { transformer: { bands: ['40 m', '20 m'] } } })
  app.clock.set(TESTED)
  await recorded(member, fullCount(station.kit, TESTED))
})
afterAll(() => app.close())

async function kitPage(query = ''): Promise<KitReadiness> {
  const answer = await member.get(`/api/v1/kits/${station.kit.id}/readiness${query}`)
  if (answer.status !== 200) throw new Error(`${answer.status} ${answer.text}`)
  return answer.body as KitReadiness
}

describe('the readiness of one kit', () => {
  it('answers exactly what its contract says', async () => {
    const page = await kitPage()
    expect(kitReadiness.strict().parse(page)).toEqual(page)
  })

  it('shows each position with its items and what the policy asks of them', async () => {
    const { positions, kitChecks, kind } = await kitPage()
    expect(kind).toMatchObject({ id: station.kind.id, station: true })
    expect(positions.map(({ name, items }) => [name, items.length])).toEqual([
      ['radio', 1],
      ['transformer', 1],
      ['battery', 1],
    ])
    const [radio] = positions[0]!.items
    expect(radio).toMatchObject({ id: station.items.radio!.id, tag: station.items.radio!.tag })
    expect(radio!.checks).toMatchObject([{ procedure: 'radio-check', state: 'never', vital: true }])
    expect(kitChecks).toMatchObject([
      { procedure: 'count', state: 'current', testedOn: '2026-06-01', dueOn: '2026-12-01' },
    ])
  })

  it('leads from its reasons and checks to the tests behind them', async () => {
    const { tests, kitChecks } = await kitPage()
    expect(tests.map(({ id }) => id)).toContain(kitChecks[0]!.testId)
    expect(tests[0]).toMatchObject({ procedure: 'count', subject: { type: 'kit' }, operatorName: 'Tester' })
  })

  it('lists what would bring it back', async () => {
    const { period, fixes } = await kitPage()
    expect(period.verdict).not.toBe('proven')
    expect(fixes.length).toBeGreaterThan(0)
    for (const { reasons } of fixes) {
      for (const text of reasons) expect(period.reasons.map((reason) => reason.text)).toContain(text)
    }
  })

  it('says what was known then, without today’s positions', async () => {
    const before = await kitPage('?asOf=2026-06-01T12:10:00Z')
    expect(before).toMatchObject({ computedFor: 'past', positions: [], kitChecks: [] })
    expect(before.period.to).toBe(TESTED)
    expect(before.period.reasons.map(({ text }) => text).join()).toContain('no count on record')
    expect((await kitPage()).period.reasons.map(({ text }) => text).join()).not.toContain('no count')
  })

  it('says what will be asked then', async () => {
    const later = await kitPage('?asOf=2027-01-01T00:00:00Z')
    expect(later.computedFor).toBe('future')
    expect(later.kitChecks).toMatchObject([{ procedure: 'count', state: 'overdue' }])
  })

  it('is not found before the kit was on record, in another group, and by observers not at all', async () => {
    const path = `/api/v1/kits/${station.kit.id}/readiness`
    expect((await member.get(`${path}?asOf=2020-01-01T00:00:00Z`)).status).toBe(404)
    const other = await app.givenMember(await app.givenGroup('Neighbours'))
    expect((await other.get(path)).status).toBe(404)
    const observer = await app.givenMember(group, { roles: ['observer'] })
    expect((await observer.get(path)).status).toBe(403)
  })
})

describe('what is due', () => {
  const due = async (query = '') => (await member.get(`/api/v1/due-checks${query}`)).body

  it('names kit, item, reason and day, overdue ones first', async () => {
    const { rows, total, overdue } = await due('?size=200')
    expect(rows).toHaveLength(total)
    expect(overdue).toBe(0)
    const radio = rows.find(({ procedure }: { procedure: string }) => procedure === 'radio-check')
    expect(radio).toMatchObject({
      subject: { type: 'item', designation: station.items.radio!.designation, category: 'radio' },
      state: 'never',
      dueOn: null,
      kit: { designation: station.kit.designation },
      raised: false,
    })
  })

  it('counts spares too, with the place they lie in', async () => {
    const shelf = await givenPlace(keeper, { name: 'Shelf' })
    const spare = await givenItem(keeper, 'antenna')
    await moved(keeper, spare, to(shelf))
    const { rows } = await due(`?placeId=${shelf.id}`)
    expect(rows).toMatchObject([
      {
        subject: { id: spare.id },
        procedure: 'antenna-sweep',
        state: 'never',
        kit: null,
        place: 'Shelf',
        vital: false,
      },
    ])
  })

  it('moves with the clock, and is filtered and paged', async () => {
    app.clock.set('2026-12-02T05:00:00Z')
    member = await app.givenMember(group)
    const all = await due('?size=200')
    expect(all.rows[0]).toMatchObject({ procedure: 'count', state: 'overdue', dueOn: '2026-12-01' })
    expect(all.overdue).toBe(1)
    const overdue = await due('?state=overdue')
    expect([overdue.total, overdue.overdue]).toEqual([1, 1])
    expect((await due('?procedure=radio-check,count')).total).toBe(2)
    expect((await due(`?search=${station.items.radio!.designation.toLowerCase()}`)).total).toBe(1)
    const pages = [await due('?size=2&page=1'), await due('?size=2&page=2')]
    expect(pages.flatMap(({ rows }) => rows)).toEqual(all.rows.slice(0, 4))
  })
})

describe('the form of a test', () => {
  const form = (itemId: string, procedure = 'heat-test') =>
    member.get(`/api/v1/items/${itemId}/test-form?procedure=${procedure}`)

  it('carries the limits in force, the cautions, the reading times and the kit', async () => {
    const { body } = await form(station.items.transformer!.id)
    expect(body).toMatchObject({
      item: { designation: station.items.transformer!.designation, kit: { id: station.kit.id } },
      heat: {
        powerW: 50,
        minutes: 10,
        stopC: 85,
        readingMinutes: [0, 1, 2, 3, 5, 8, 10],
        coolingMinutes: [5],
      },
      bands: ['40 m', '20 m'],
      judgedBy: { policyNumber: 1, rule: { intervalMonths: 12, source: 'common practice, no source' } },
      bandRules: {},
      lastMethod: null,
      lastInstrument: null,
      recent: [],
    })
    expect(body.methods[0].cautions.join(' ')).toContain('hundreds of volts')
    expect(body.instruments).toMatchObject([{ id: thermometer.id, calibratedUntilOn: null }])
  })

  it('offers what the member used last, and the newest results', async () => {
    const common = { performedAt: app.clock.now().toISOString(), instrumentId: thermometer.id }
    const test = await recorded(member, heatTest(station.items.transformer!.id, common, { band: '40 m' }))
    const { body } = await form(station.items.transformer!.id)
    expect(body.lastMethod).toBe(test.method)
    expect(body.lastInstrument).toMatchObject({ id: thermometer.id })
    expect(body.recent).toMatchObject([{ id: test.id, finding: 'pass' }])
  })

  it('is for procedures that are done to the item', async () => {
    expect((await form(station.items.radio!.id)).status).toBe(422)
    expect((await form(station.items.radio!.id, 'nonsense')).status).toBe(400)
    expect((await form(newTestId())).status).toBe(404)
    expect((await form(station.items.radio!.id, 'inspection')).body.heat).toBeNull()
  })
})

describe('the list of tests', () => {
  const list = async (query: string) => (await member.get(`/api/v1/tests?${query}`)).body

  it('shows those of an item, of a kit with its items, and of an instrument', async () => {
    const radio = station.items.radio!
    await recorded(member, inspection(radio.id, app.clock.now().toISOString()))
    expect((await list(`itemId=${radio.id}`)).rows).toMatchObject([{ procedure: 'inspection' }])
    const ofKit = await list(`kitId=${station.kit.id}`)
    const found = ofKit.rows.map(({ procedure }: { procedure: string }) => procedure)
    expect(found.sort()).toEqual(['count', 'heat-test', 'inspection'])
    expect((await list(`instrumentId=${thermometer.id}`)).total).toBe(1)
    expect((await list('procedure=count&finding=pass')).total).toBe(1)
    expect((await list('search=load%20plan')).total).toBe(1)
  })

  it('comes newest first, or oldest first, page by page', async () => {
    const newest = await list('size=2')
    const oldest = await list('size=200&descending=false')
    expect(newest.rows).toEqual([...oldest.rows].reverse().slice(0, 2))
  })
})
