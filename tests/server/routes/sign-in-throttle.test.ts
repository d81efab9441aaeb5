import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { createApp } from '#server/app.ts'
import { createHttpServer, listen } from '#server/http-server.ts'
import { givenCheapPassword, givenPassword, PASSWORD } from '../../support/given-password.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { TestClient } from '../../support/test-client.ts'

let app: TestApp
let member: TestMember

// One proxy is believed, so that a test can come from any address.
beforeAll(async () => {
  app = await startTestApp({ config: { trustProxy: 1 } })
})
afterAll(() => app.close())
beforeEach(async () => {
  await app.ctx.db.query('DELETE FROM rate_limit')
  member = await app.givenMember(await app.givenGroup('Ridge Group'))
  await givenCheapPassword(app, member)
})

interface Try {
  from?: string
  email?: string
  password?: string
  at?: TestClient
}

async function attempt({ from = '192.0.2.1', email, password = 'x', at = app.request() }: Try = {}) {
  return at.post('/api/v1/sign-in', { email: email ?? member.email, password }).set('X-Forwarded-For', from)
}

async function wrong(times: number, options: Try = {}): Promise<number[]> {
  const answers: number[] = []
  for (let n = 0; n < times; n += 1) answers.push((await attempt(options)).status)
  return answers
}

const all = (status: number, times: number) => Array<number>(times).fill(status)

describe('guessing a password (P18)', () => {
  it('is stopped after ten wrong ones for an account from an address', async () => {
    expect(await wrong(10)).toEqual(all(401, 10))
    const answer = await attempt({ password: PASSWORD })
    expect(answer.status).toBe(429)
    expect(answer.body).toMatchObject({ code: 'too-many-tries', status: 429 })
    const retryAfter = Number(answer.headers['retry-after'])
    expect(retryAfter).toBeGreaterThan(0)
    expect(retryAfter).toBeLessThanOrEqual(900)
  })

  it('is stopped in the same way for an address that nobody has', async () => {
    const email = 'nobody@example.org'
    expect(await wrong(11, { email })).toEqual([...all(401, 10), 429])
  })

  it('is stopped though all come at once', async () => {
    const answers = await Promise.all(Array.from({ length: 20 }, () => attempt()))
    const judged = answers.filter(({ status }) => status === 401)
    expect(judged.length).toBeLessThanOrEqual(10)
    expect(answers.every(({ status }) => [401, 429].includes(status))).toBe(true)
  })

  it('is not begun anew by writing the address otherwise', async () => {
    await wrong(5)
    await wrong(3, { email: member.email.toUpperCase() })
    await wrong(2, { email: `  ${member.email} ` })
    expect((await attempt()).status).toBe(429)
  })

  it('is not begun anew by forwarding headers beyond the proxy that is believed', async () => {
    await wrong(10)
    const answers = await Promise.all(
      ['198.51.100.7, 192.0.2.1', '::1, 192.0.2.1'].map((from) => attempt({ from })),
    )
    expect(answers.map(({ status }) => status)).toEqual([429, 429])
  })

  it('is not begun anew by another address of the same IPv6 line', async () => {
    for (let n = 1; n <= 10; n += 1) await attempt({ from: `2001:db8:1:2::${n}` })
    expect((await attempt({ from: '2001:db8:1:2:ffff::1' })).status).toBe(429)
    expect((await attempt({ from: '2001:db8:1:3::1' })).status).toBe(401)
  })

  it('is not begun anew by a restart of the server', async () => {
    await wrong(10)
    const restarted = createHttpServer(createApp(app.ctx))
    await listen(restarted, { host: '127.0.0.1', port: 0 })
    expect((await attempt({ at: new TestClient(restarted) })).status).toBe(429)
    restarted.close()
  })

  it('is stopped after forty from an address, whatever the accounts', async () => {
    for (let account = 0; account < 4; account += 1) await wrong(10, { email: `a${account}@example.org` })
    expect((await attempt({ email: 'fresh@example.org' })).status).toBe(429)
    expect((await attempt({ from: '192.0.2.2', password: PASSWORD })).status).toBe(200)
  })

  it('is stopped after forty for an account, whatever the addresses', async () => {
    for (let n = 1; n <= 4; n += 1) await wrong(10, { from: `203.0.113.${n}` })
    expect((await attempt({ from: '203.0.113.9' })).status).toBe(429)
  })

  it('does not shut out the owner at an address they signed in from before', async () => {
    expect((await attempt({ password: PASSWORD })).status).toBe(200)
    for (let n = 1; n <= 4; n += 1) await wrong(10, { from: `203.0.113.${n}` })
    expect((await attempt({ password: PASSWORD })).status).toBe(200)
  })

  it('shuts the owner out for 15 minutes at most, though it goes on all the time', async () => {
    vi.useFakeTimers({ toFake: ['Date'] })
    try {
      for (let n = 1; n <= 5; n += 1) await wrong(10, { from: `203.0.113.${n}` })
      expect((await attempt({ password: PASSWORD })).status).toBe(429)
      vi.setSystemTime(Date.now() + 14 * 60_000)
      await wrong(5, { from: '203.0.113.50' })
      vi.setSystemTime(Date.now() + 60_000)
      expect((await attempt({ password: PASSWORD })).status).toBe(200)
    } finally {
      vi.useRealTimers()
    }
  })

  it('forgets the wrong tries of an address once the right one was given there', async () => {
    await wrong(9)
    expect((await attempt({ password: PASSWORD })).status).toBe(200)
    expect(await wrong(10)).toEqual(all(401, 10))
  })

  it('does not count right passwords', async () => {
    for (let n = 0; n < 12; n += 1) expect((await attempt({ password: PASSWORD })).status).toBe(200)
  })

  it('takes as long for an unknown address as for a known one', async () => {
    member = await app.givenMember(await app.givenGroup('Valley Group'))
    await givenPassword(app, member)
    await attempt()
    const known: number[] = []
    const unknown: number[] = []
    for (let n = 0; n < 9; n += 1) {
      known.push(await timed({ from: `192.0.2.${n}` }))
      unknown.push(await timed({ from: `192.0.2.${n}`, email: `nobody${n}@example.org` }))
    }
    // The fastest of each: what else the machine does only adds to a time.
    const ratio = Math.min(...unknown) / Math.min(...known)
    expect(ratio).toBeGreaterThan(0.5)
    expect(ratio).toBeLessThan(1.5)
  })
})

async function timed(options: Try): Promise<number> {
  const startedAt = performance.now()
  expect((await attempt(options)).status).toBe(401)
  return performance.now() - startedAt
}
