import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { answerNeed, type NeedAnswer } from '#shared/contracts/board-need.ts'
import { fullCount, givenStation, recorded, type Station } from '../../support/evidence.ts'
import { givenKitKind, givenPlace, into, moved, position, to, type Place } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

let app: TestApp
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
  const group = await app.givenGroup('Needed')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  observer = await app.givenMember(group, { roles: ['observer'] })
  cage = await givenPlace(keeper, { name: 'Cage' })
  // Nothing but the count is asked of a kit of pouches.
  const kind = await givenKitKind(keeper, {
    positions: [position('adapter-pouch')],
    promise: { bands: [], modes: ['voice'], watts: null, hours: null },
  })
  const kit = { homePlaceId: cage.id, placeId: cage.id, designation: 'K-01' }
  counted = await givenStation(keeper, { kind, kit })
  uncounted = await givenStation(keeper, { kind, kit: { designation: 'K-02' } })
  app.clock.set(COUNTED_AT)
  await recorded(keeper, fullCount(counted.kit, COUNTED_AT))
})
afterAll(() => app.close())

async function answer(query: object, by = observer): Promise<NeedAnswer> {
  const reply = await by.get('/api/v1/board/need').query(query)
  expect(reply.status, reply.text).toBe(200)
  return answerNeed.response.strict().parse(reply.body)
}

describe('the answer to a need', () => {
  it('names who can, who nearly can with what is missing, and counts the rest', async () => {
    expect(await answer({ mode: 'voice' })).toMatchObject({
      lead: '1 station can do that;',
      can: [counted.kit.id],
      near: [{ kitId: uncounted.kit.id, designation: 'K-02' }],
      others: 0,
      computedFor: 'now',
      asOf: COUNTED_AT,
    })
    expect((await answer({ mode: 'voice' })).rest).toMatch(/^K-02 could if it were proven: .+\.$/)
    expect(await answer({ bands: '40 m,20 m' })).toMatchObject({
      lead: 'None can do that.',
      near: [],
      others: 2,
    })
  })

  it('knows the place where the kit is now', async () => {
    expect((await answer({ at: cage.id })).can).toEqual([counted.kit.id])
    const elsewhere = await givenPlace(keeper, { name: 'Elsewhere' })
    const { can, near } = await answer({ at: elsewhere.id })
    expect(can).toEqual([])
    expect(near.map(({ missing }) => missing)).toContain('it were at Elsewhere: at Cage now')
  })

  it('is what was known at a past instant, and what holds at a coming one if nobody does anything', async () => {
    const past = await answer({ mode: 'voice', asOf: '2026-06-01T12:10:00Z' })
    expect(past).toMatchObject({ lead: 'None could do that;', can: [], computedFor: 'past' })
    const future = await answer({ mode: 'voice', asOf: LAPSES_AT })
    expect(future).toMatchObject({ lead: 'None will be able to do that;', computedFor: 'future' })
    expect((await answer({ mode: 'voice', asOf: '2026-12-02T04:59:59Z' })).can).toEqual([counted.kit.id])
  })

  it('is not sent again while the board has not changed, and is not another group’s', async () => {
    const first = await observer.get('/api/v1/board/need?watts=5')
    const { etag } = first.headers
    const again = await observer.get('/api/v1/board/need?watts=5').set('If-None-Match', etag!)
    expect([again.status, again.text]).toEqual([304, ''])
    const other = await app.givenMember(await app.givenGroup('Other'), { roles: ['observer'] })
    const foreign = await other.get('/api/v1/board/need?watts=5').set('If-None-Match', etag!)
    expect([foreign.status, foreign.body.can, foreign.body.near]).toEqual([200, [], []])
  })

  it('follows the board to its next revision', async () => {
    const before = await observer.get('/api/v1/board/need?mode=voice')
    const pouch = uncounted.items['adapter-pouch']!
    const from = into(uncounted.kit, 'adapter-pouch')
    await moved(keeper, pouch, to(cage), { from })
    const after = await observer
      .get('/api/v1/board/need?mode=voice')
      .set('If-None-Match', before.headers.etag!)
    expect(after.status).toBe(200)
    expect(after.body.rest).toContain('K-02 could if it were fit')
  })

  it.each([
    ['watts=-1', '#/watts'],
    ['watts=many', '#/watts'],
    ['hours=1e9', '#/hours'],
    ['bands=41 m', '#/bands'],
    ['mode=shouting', '#/mode'],
    ['at=home', '#/at'],
    ['asOf=soon', '#/asOf'],
  ])('is refused for %s, by name', async (query, pointer) => {
    const reply = await observer.get(`/api/v1/board/need?${query}`)
    expect(reply.status).toBe(400)
    expect(JSON.stringify(reply.body.errors)).toContain(pointer)
  })
})
