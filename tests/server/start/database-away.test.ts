/** PostgreSQL goes away and comes back (promise P29); a proxy before it stands in for the fault. */
import { setTimeout as pause } from 'node:timers/promises'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { DatabaseProxy } from '../../support/database-proxy.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { createTestDatabase, type TestDatabase } from '../../support/test-database.ts'

let database: TestDatabase
let proxy: DatabaseProxy
let app: TestApp
let member: TestMember

beforeAll(async () => {
  database = await createTestDatabase()
  proxy = await DatabaseProxy.start(database.appUrl)
  app = await startTestApp({ databaseUrl: proxy.url })
  member = await app.givenMember(await app.givenGroup('Ridge Group'))
})
afterEach(async () => {
  await proxy.cut()
  await proxy.open()
  await untilServing()
})
afterAll(async () => {
  await app.close()
  await proxy.cut()
  await database.drop()
})

const profile = {
  name: 'Vera',
  phone: null,
  callSign: null,
  licenceClass: null,
  licenceExpiresOn: null,
  temperatureUnit: 'F',
  lengthUnit: 'm',
  wantsReminders: true,
}

/** A read, a write and a sign-in, each with the time it took. */
async function useEverything(): Promise<{ statuses: number[]; slowestMs: number }> {
  const startedAt = performance.now()
  const answers = await Promise.all([
    member.get('/api/v1/profile'),
    member.get('/api/v1/session'),
    member.post('/api/v1/profile', profile).set('If-Match', '"1"'),
    app.request().post('/api/v1/sign-in', { email: 'a@example.org', password: 'x' }),
    app.request().get('/readyz'),
  ])
  for (const { body, headers, status } of answers.filter((each) => each.status === 503)) {
    expect(body).toMatchObject({ code: 'unavailable', status })
    expect(Number(headers['retry-after'])).toBeGreaterThan(0)
  }
  return { statuses: answers.map(({ status }) => status), slowestMs: performance.now() - startedAt }
}

const ALL_AWAY = [503, 503, 503, 503, 503]

describe('without the database', () => {
  it('everything answers 503 within 3 s, and the process says that it lives', async () => {
    await proxy.cut()
    const { statuses, slowestMs } = await useEverything()
    expect(statuses).toEqual(ALL_AWAY)
    expect(slowestMs).toBeLessThan(3000)
    await app.request().get('/healthz').expect(200)
  })

  it('everything works again within 5 s of its return', async () => {
    await proxy.cut()
    await useEverything()
    await proxy.open()
    const startedAt = performance.now()
    await untilServing()
    expect(performance.now() - startedAt).toBeLessThan(5000)
    await member.get('/api/v1/profile').expect(200)
    await app.request().get('/readyz').expect(200)
  })

  it('requests under way end in 503, and nothing of them is half stored', async () => {
    const before = await member.get('/api/v1/profile').expect(200)
    const waiting = Array.from({ length: 10 }, () =>
      member.post('/api/v1/profile', { ...profile, name: 'Half' }).set('If-Match', before.headers.etag ?? ''),
    )
    const answers = Promise.all(waiting.map((test) => test.then(({ status }) => status)))
    await pause(3)
    await proxy.cut()
    for (const status of await answers) expect([200, 412, 503]).toContain(status)
    await proxy.open()
    await untilServing()
    const { body } = await member.get('/api/v1/profile').expect(200)
    const { name, version } = body as { name: string; version: number }
    expect(name === 'Half' ? version : before.body.version).toBe(version)
  })
})

describe('with a database that hangs', () => {
  it('everything answers 503 and nothing waits for it', { timeout: 30_000 }, async () => {
    await member.get('/api/v1/profile').expect(200)
    proxy.freeze()
    const { statuses, slowestMs } = await useEverything()
    expect(statuses).toEqual(ALL_AWAY)
    expect(slowestMs).toBeLessThan(4000)
    await app.request().get('/healthz').expect(200)
    proxy.thaw()
    await untilServing()
  })
})

async function untilServing(): Promise<void> {
  for (let tries = 0; tries < 200; tries += 1) {
    const { status } = await app.request().get('/readyz')
    if (status === 200) return
    await pause(25)
  }
}
