import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { boardAnswer, type BoardAnswer } from '#shared/contracts/board.ts'
import { raiseRevision } from '#server/services/board-rows.ts'
import { refreshBoard } from '#server/services/refresh-board.ts'
import { fullCount, givenStation, recorded, type Station } from '../../support/evidence.ts'
import {
  at as atVersion,
  givenKitKind,
  givenPlace,
  into,
  moved,
  position,
  to,
  type Place,
} from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let observer: TestMember
let cage: Place
let counted: Station
let uncounted: Station

const CREATED_AT = '2026-06-01T12:00:00.000Z'
const COUNTED_AT = '2026-06-01T12:30:00.000Z'
/** The count holds for six months: to the end of 1 December in New York. */
const LAPSES_AT = '2026-12-02T05:00:00.000Z'

beforeAll(async () => {
  app = await startTestApp({ now: CREATED_AT })
  group = await app.givenGroup('Board')
  keeper = await app.givenMember(group, { roles: ['quartermaster', 'net-coordinator'] })
  observer = await app.givenMember(group, { roles: ['observer'] })
  cage = await givenPlace(keeper, { name: 'Cage' })
  // Nothing but the count is asked of a kit of pouches.
  const kind = await givenKitKind(keeper, {
    positions: [position('adapter-pouch')],
    promise: { bands: [], modes: [], watts: null, hours: null },
  })
  const parts = { homePlaceId: cage.id, placeId: cage.id, designation: 'K-01' }
  counted = await givenStation(keeper, { kind, kit: parts })
  uncounted = await givenStation(keeper, { kind, kit: { designation: 'K-02' } })
  app.clock.set(COUNTED_AT)
  await recorded(keeper, fullCount(counted.kit, COUNTED_AT))
})
afterAll(() => app.close())

async function board(query = '', by = observer): Promise<BoardAnswer> {
  const answer = await by.get(`/api/v1/board${query}`)
  if (answer.status !== 200) throw new Error(`${answer.status} ${answer.text}`)
  return answer.body as BoardAnswer
}

const verdicts = (answer: BoardAnswer) =>
  answer.rows.map(({ designation, verdict }) => `${designation} ${verdict}`)

describe('the board now', () => {
  it('shows every kit with its verdict, best first', async () => {
    const answer = await board()
    expect(verdicts(answer)).toEqual(['K-01 proven', 'K-02 not-proven'])
    expect(answer).toMatchObject({ total: 2, next: null, computedFor: 'now', asOf: COUNTED_AT })
  })

  it('answers exactly what its contract says', async () => {
    const answer = await board()
    expect(boardAnswer.strict().parse(answer)).toEqual(answer)
  })

  it('says of each kit why, until when, where and what comes then', async () => {
    const [proven, other] = (await board()).rows
    expect(proven).toEqual({
      kitId: counted.kit.id,
      designation: 'K-01',
      kindCode: counted.kind.code,
      kindName: counted.kind.name,
      station: true,
      verdict: 'proven',
      availability: 'available',
      availabilityReason: '',
      expectedReturnOn: null,
      reasonTop: '',
      reasonCount: 0,
      holdsUntil: LAPSES_AT,
      homePlace: 'Cage',
      place: 'Cage',
      bandCodes: '',
      watts: null,
      hours: null,
      horizon: [
        { until: LAPSES_AT, verdict: 'proven', cause: expect.stringContaining('count') },
        { until: null, verdict: 'not-proven', cause: '' },
      ],
    })
    expect(other).toMatchObject({ reasonTop: 'K-02: no count on record', reasonCount: 1, holdsUntil: null })
  })

  it('counts all stations, and knows the oldest evidence and the next change', async () => {
    const answer = await board('?verdict=not-fit')
    expect(answer.rows).toEqual([])
    expect(answer.counts).toEqual([
      { station: true, availability: 'available', verdict: 'not-proven', n: 1 },
      { station: true, availability: 'available', verdict: 'proven', n: 1 },
    ])
    expect(answer.oldestVital).toEqual({ kitId: counted.kit.id, designation: 'K-01', on: '2026-06-01' })
    expect(answer.nextChange).toMatchObject({ designation: 'K-01', at: LAPSES_AT, verdict: 'not-proven' })
  })

  it('filters by verdict, availability, kind, place, station and words', async () => {
    const shown = async (query: string) => (await board(query)).rows.map(({ designation }) => designation)
    expect(await shown('?verdict=proven,proven-with-limits')).toEqual(['K-01'])
    expect(await shown('?availability=assigned')).toEqual([])
    expect(await shown(`?kind=${counted.kind.id}`)).toEqual(['K-01', 'K-02'])
    expect(await shown(`?place=${cage.id}`)).toEqual(['K-01'])
    expect(await shown('?station=false')).toEqual([])
    expect(await shown('?search=no%20count')).toEqual(['K-02'])
    expect(await shown('?search=cage')).toEqual(['K-01'])
    expect(await shown('?search=%25')).toEqual([])
    expect((await board('?search=k-0')).total).toBe(2)
  })

  it('pages by a cursor that cannot be made up', async () => {
    const first = await board('?size=1')
    expect(verdicts(first)).toEqual(['K-01 proven'])
    expect(first.total).toBe(2)
    const second = await board(`?size=1&after=${first.next}`)
    expect(verdicts(second)).toEqual(['K-02 not-proven'])
    expect(second.next).toBeNull()
    for (const after of ['x', 'WzEsMl0', Buffer.from('[0,1e400,"x"]').toString('base64url')]) {
      expect((await observer.get(`/api/v1/board?after=${after}`)).status).toBe(400)
    }
  })

  it('is not sent again while nothing changed, to nobody of another group', async () => {
    const { headers } = await observer.get('/api/v1/board')
    const again = await observer.get('/api/v1/board').set('If-None-Match', headers.etag!)
    expect([again.status, again.text, again.headers.etag]).toEqual([304, '', headers.etag])
    const other = await app.givenMember(await app.givenGroup('Neighbours'))
    const foreign = await other.get('/api/v1/board').set('If-None-Match', headers.etag!)
    expect([foreign.status, foreign.body.rows]).toEqual([200, []])
  })
})

describe('what the board shows besides readiness', () => {
  const shown = async () => (await board()).rows[0]!
  const change = async (path: string, version: number, body: object) => {
    const answer = await atVersion(version, keeper.post(path, body))
    expect([answer.status, answer.body.detail]).toEqual([200, undefined])
  }

  const sets = async (body: object) => {
    const path = `/api/v1/kits/${counted.kit.id}`
    await change(`${path}/availability`, (await keeper.get(path)).body.version, body)
  }

  it('follows the names of places and kinds, and the day of return, under a new revision', async () => {
    const etag = async () => (await observer.get('/api/v1/board')).headers.etag
    const tags = [await etag()]
    await change(`/api/v1/places/${cage.id}`, cage.version, { name: 'Station cage' })
    tags.push(await etag())
    expect(await shown()).toMatchObject({ place: 'Station cage', homePlace: 'Station cage' })
    const { code, station, promise, positions } = counted.kind
    await change(`/api/v1/kit-kinds/${counted.kind.id}`, counted.kind.version, {
      ...{ code, station, promise, positions },
      name: 'Pouch kit',
    })
    tags.push(await etag())
    expect(await shown()).toMatchObject({ kindName: 'Pouch kit' })
    const out = { availability: 'out-of-service', reason: 'repair' }
    await sets({ ...out, expectedReturnOn: '2026-06-20' })
    tags.push(await etag())
    await sets({ ...out, expectedReturnOn: '2026-06-25' })
    tags.push(await etag())
    expect(await shown()).toMatchObject({ expectedReturnOn: '2026-06-25', availabilityReason: 'repair' })
    await sets({ availability: 'available' })
    expect(new Set(tags).size).toBe(tags.length)
  })
})

describe('the revision', () => {
  it('is never one that a browser can hold from before a backup was restored', async () => {
    const { revision } = await board()
    expect(revision).toBeGreaterThanOrEqual(app.clock.now().getTime())
    await app.inGroup(group, async (tx) => {
      await raiseRevision(tx, [])
      await raiseRevision(tx, [])
    })
    expect((await board()).revision).toBe(revision + 2)
  })
})

describe('the board at another time', () => {
  it('is what was known then', async () => {
    const before = await board(`?asOf=2026-06-01T12:10:00Z`)
    expect(verdicts(before)).toEqual(['K-01 not-proven', 'K-02 not-proven'])
    expect(before).toMatchObject({ computedFor: 'past', asOf: '2026-06-01T12:10:00.000Z', total: 2 })
    expect(before.rows[0]).toMatchObject({ holdsUntil: COUNTED_AT })
    expect(before.nextChange).toMatchObject({ designation: 'K-01', at: COUNTED_AT, verdict: 'proven' })
    expect(before.counts).toEqual([{ station: true, availability: 'available', verdict: 'not-proven', n: 2 }])
    expect(boardAnswer.strict().parse(before)).toEqual(before)
  })

  it('is empty before anything was on record', async () => {
    expect((await board('?asOf=2020-01-01T00:00:00Z')).rows).toEqual([])
  })

  it('is what holds if nobody does anything', async () => {
    expect(verdicts(await board('?asOf=2026-12-02T04:59:59Z'))).toEqual(['K-01 proven', 'K-02 not-proven'])
    const after = await board(`?asOf=${LAPSES_AT}`)
    expect(verdicts(after)).toEqual(['K-01 not-proven', 'K-02 not-proven'])
    expect(after.computedFor).toBe('future')
  })

  it('pages and filters too', async () => {
    const at = `asOf=${LAPSES_AT}`
    const first = await board(`?${at}&size=1`)
    const second = await board(`?${at}&size=1&after=${first.next}`)
    expect([...verdicts(first), ...verdicts(second)]).toEqual(['K-01 not-proven', 'K-02 not-proven'])
    expect((await board(`?${at}&verdict=proven`)).total).toBe(0)
    expect((await observer.get(`/api/v1/board?${at}&after=x`)).status).toBe(400)
  })
})

describe('the board as time goes by', () => {
  it('asks the periods when a kept row has passed its own end, and the kept rows once they are refreshed', async () => {
    app.clock.set(LAPSES_AT)
    const late = await app.givenMember(group, { roles: ['observer'] })
    const before = await late.get('/api/v1/board')
    expect(before.headers.etag).toBeUndefined()
    expect(verdicts(before.body)).toEqual(['K-01 not-proven', 'K-02 not-proven'])
    expect(before.body.computedFor).toBe('now')

    await app.inGroup(group, refreshBoard)
    const after = await late.get('/api/v1/board')
    expect(after.headers.etag).toBeDefined()
    expect(after.body.rows).toEqual(before.body.rows)
    expect(after.body.counts).toEqual(before.body.counts)
    expect(after.body.counts).toEqual([
      { station: true, availability: 'available', verdict: 'not-proven', n: 2 },
    ])
    expect(after.body.revision).toBeGreaterThan(before.body.revision)
  })

  it('is refreshed once when two servers do it at the same moment', async () => {
    const revision = async () => (await board('', await app.givenMember(group))).revision
    const before = await revision()
    await Promise.all([app.inGroup(group, refreshBoard), app.inGroup(group, refreshBoard)])
    expect(await revision()).toBe(before)
  })

  it('loses a kit that is retired, and keeps what was known of it', async () => {
    const late = await app.givenMember(group, { roles: ['quartermaster'] })
    const pouch = uncounted.items['adapter-pouch']!
    await moved(late, pouch, to(cage), { from: into(uncounted.kit, 'adapter-pouch') })
    const retired = await atVersion(
      uncounted.kit.version,
      late.post(`/api/v1/kits/${uncounted.kit.id}/retire`, { reason: 'worn out' }),
    )
    expect(retired.status).toBe(200)
    expect(verdicts(await board('', late))).toEqual(['K-01 not-proven'])
    expect((await board('', late)).counts).toMatchObject([{ verdict: 'not-proven', n: 1 }])
    expect(verdicts(await board('?asOf=2026-06-01T12:40:00Z', late))).toHaveLength(2)
    expect(verdicts(await board('?asOf=2027-01-01T00:00:00Z', late))).toEqual(['K-01 not-proven'])
  })
})
