import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import { refreshBoard } from '#server/services/refresh-board.ts'
import { fullCount, givenStation, recorded, type Station } from '../../support/evidence.ts'
import { givenKitKind, givenPlace, position, to } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let observer: TestMember
let counted: Station
let uncounted: Station
const COUNTED_AT = '2026-06-01T12:00:00.000Z'

beforeAll(async () => {
  app = await startTestApp({ now: COUNTED_AT })
  group = await app.givenGroup('Board')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  observer = await app.givenMember(group, { roles: ['observer'] })
  // Nothing but the count is asked of a kit of pouches.
  const kind = await givenKitKind(keeper, {
    positions: [position('adapter-pouch')],
    promise: { bands: [], modes: [], watts: null, hours: null },
  })
  const place = await givenPlace(keeper, { name: 'Cage' })
  counted = await givenStation(keeper, { kind, kit: { placeId: place.id, designation: 'K-01' } })
  uncounted = await givenStation(keeper, { kind, kit: { designation: 'K-02' } })
  app.clock.advance(1, 'hours')
  await recorded(keeper, fullCount(counted.kit, app.clock.now().toISOString()))
})
afterAll(() => app.close())

async function board(query = ''): Promise<BoardAnswer> {
  const answer = await observer.get(`/api/v1/board${query}`)
  if (answer.status !== 200) throw new Error(`${answer.status} ${answer.text}`)
  return answer.body as BoardAnswer
}

describe('the board now', () => {
  it('shows every kit with its verdict, best first', async () => {
    const answer = await board()
    expect(answer.rows.map(({ designation, verdict }) => [designation, verdict])).toEqual([
      ['K-01', 'proven'],
      ['K-02', 'not-proven'],
    ])
    expect(answer.total).toBe(2)
    expect(answer.computedFor).toBe('now')
    expect(answer.rows[0]).toMatchObject({ place: 'Cage', kindCode: counted.kind.code, station: true })
  })
})
