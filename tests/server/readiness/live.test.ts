import { request, type IncomingMessage } from 'node:http'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { raiseRevision } from '#server/services/board-rows.ts'
import { boardHub } from '#server/live/board-hub.ts'
import type { BoardEvent } from '#shared/contracts/live.ts'
import { fullCount, givenStation, recorded, type Station } from '../../support/evidence.ts'
import { givenKitKind, position } from '../../support/registry.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let keeper: TestMember
let stations: Station[]

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Live')
  keeper = await app.givenMember(group, { roles: ['quartermaster'] })
  const kind = await givenKitKind(keeper, {
    positions: [position('adapter-pouch')],
    promise: { bands: [], modes: [], watts: null, hours: null },
  })
  stations = [await givenStation(keeper, { kind }), await givenStation(keeper, { kind })]
})
afterAll(() => app.close())

/** An open event stream and what it has said so far. */
class Follower {
  readonly events: BoardEvent[] = []
  ended = false

  constructor(
    readonly response: IncomingMessage,
    private readonly close: () => void,
  ) {
    let text = ''
    response.setEncoding('utf8')
    response.on('data', (chunk: string) => {
      text += chunk
      for (let end = text.indexOf('\n\n'); end !== -1; end = text.indexOf('\n\n')) {
        this.#take(text.slice(0, end))
        text = text.slice(end + 2)
      }
    })
    response.on('close', () => (this.ended = true))
  }

  #take(frame: string): void {
    const [name, data] = frame.split('\n')
    if (name === 'event: board') this.events.push(JSON.parse(data!.slice('data: '.length)) as BoardEvent)
  }

  stop(): void {
    this.close()
  }
}

const open: Follower[] = []

function follow(by: TestMember): Promise<Follower> {
  return new Promise((resolve, reject) => {
    const asked = request(`${app.url}/api/v1/live`, { headers: { cookie: by.cookie } }, (response) => {
      const follower = new Follower(response, () => asked.destroy())
      open.push(follower)
      resolve(follower)
    })
    asked.on('error', reject).end()
  })
}

async function until(isSo: () => boolean | Promise<boolean>, what: string): Promise<void> {
  for (let tries = 0; tries < 200; tries += 1) {
    if (await isSo()) return
    await new Promise((resolve) => setTimeout(resolve, 25))
  }
  throw new Error(`Waited in vain until ${what}`)
}

/** Connections that listen and have said so for every channel. */
async function listeners(): Promise<number> {
  const [row] = (await app.ctx.db.query(
    `SELECT count(*)::int AS n FROM pg_stat_activity WHERE datname = current_database() AND state = 'idle'
       AND application_name = 'halyard-live' AND query NOT IN ('', 'LISTEN halyard_board')`,
  )) as { n: number }[]
  return row!.n
}

const listens = () => until(async () => (await listeners()) === 1, 'it listens')

// Nobody follows any more: the next test begins with a connection of its own.
afterEach(async () => {
  for (const follower of open.splice(0)) follower.stop()
  await until(async () => (await listeners()) === 0, 'it no longer listens')
})

const count = (station: Station) => {
  app.clock.advance(1, 'seconds')
  return recorded(keeper, fullCount(station.kit, app.clock.now().toISOString()))
}

describe('live updates', () => {
  it('begin with the revision, so that a screen that was away catches up', async () => {
    const follower = await follow(keeper)
    expect(follower.response.headers).toMatchObject({
      'content-type': 'text/event-stream; charset=utf-8',
      'cache-control': 'no-store',
    })
    await until(() => follower.events.length > 0, 'the first event came')
    const { revision } = (await keeper.get('/api/v1/board')).body
    expect(follower.events[0]).toEqual({ revision, kitIds: [] })
  })

  it('tell every screen of the group which kit changed, and no other group', async () => {
    const other = await app.givenMember(await app.givenGroup('Neighbours'))
    const observer = await app.givenMember(group, { roles: ['observer'] })
    const followers = await Promise.all([follow(keeper), follow(observer), follow(other)])
    await until(() => followers.every(({ events }) => events.length > 0), 'all have begun')
    await listens()
    await count(stations[0]!)
    const named = (follower: Follower) =>
      follower.events.some(({ kitIds }) => kitIds.includes(stations[0]!.kit.id))
    await until(() => named(followers[0]!) && named(followers[1]!), 'both were told')
    expect(followers[2]!.events.every(({ kitIds }) => kitIds.length === 0)).toBe(true)
  })

  it('tell changes that come close together as one', async () => {
    const follower = await follow(keeper)
    await listens()
    await until(() => follower.events.length > 0, 'it has begun')
    const ids = stations.map(({ kit }) => kit.id)
    await app.inGroup(group, async (tx) => {
      for (const id of ids) await raiseRevision(tx, [id])
    })
    const named = () => follower.events.filter(({ kitIds }) => kitIds.length > 0)
    await until(() => named().length > 0, 'it was told')
    const { revision } = (await keeper.get('/api/v1/board')).body
    expect(named()).toEqual([{ revision, kitIds: ids }])
  })

  it('end when the session ends', async () => {
    const leaving = await app.givenMember(group)
    const [own, others] = [await follow(leaving), await follow(keeper)]
    await listens()
    expect((await leaving.post('/api/v1/sign-out')).status).toBe(204)
    await until(() => own.ended, 'the stream has ended')
    expect(others.ended).toBe(false)
  })

  it('need a session', async () => {
    expect((await app.request().get('/api/v1/live')).status).toBe(401)
  })

  it('go on when the connection that listens was lost', async () => {
    const follower = await follow(keeper)
    await listens()
    await until(() => follower.events.length > 0, 'it has begun')
    const before = follower.events.length
    await app.ctx.db.query(
      `SELECT pg_terminate_backend(pid) FROM pg_stat_activity
       WHERE datname = current_database() AND application_name = 'halyard-live'`,
    )
    await until(() => follower.events.length > before, 'it listens again')
    await count(stations[0]!)
    await until(() => follower.events.some(({ kitIds }) => kitIds.length > 0), 'the change was told')
  })

  it('end in order when the process stops', async () => {
    const follower = await follow(keeper)
    await until(() => follower.events.length > 0, 'it has begun')
    boardHub(app.ctx).stop()
    await until(() => follower.ended, 'the stream has ended')
  })
})
