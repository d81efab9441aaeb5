/** Sessions listed, ended and renewed (promise P20). */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { auditEntries } from '../../support/audit-entries.ts'
import { givenCheapPassword, PASSWORD } from '../../support/given-password.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'
import type { TestClient } from '../../support/test-client.ts'

const NEW_PASSWORD = 'thistle banner under gravel'

let app: TestApp
let group: TestGroup
let member: TestMember

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Ridge Group')
})
afterAll(() => app.close())
beforeEach(async () => {
  await app.ctx.db.query('DELETE FROM rate_limit')
  member = await app.givenMember(group, { roles: ['administrator'] })
  await givenCheapPassword(app, member)
})

async function signIn(password = PASSWORD, expected = 200): Promise<TestClient> {
  const browser = app.request()
  browser.keepCookie(
    await browser.post('/api/v1/sign-in', { email: member.email, password }).expect(expected),
  )
  return browser
}
const isSignedIn = async (browser: TestClient) => {
  const { body } = await browser.get('/api/v1/session').expect(200)
  return (body as { member: object | null }).member !== null
}
const lastAction = async () => (await auditEntries(app)).at(-1)

describe('sign-out', () => {
  it('ends the session on the server, so that a copy of the cookie is worth nothing', async () => {
    const copy = app.request(member)
    const answer = await member.post('/api/v1/sign-out').expect(204)
    expect(String(answer.headers['set-cookie'])).toContain('Expires=Thu, 01 Jan 1970')
    expect(await isSignedIn(copy)).toBe(false)
    expect(await lastAction()).toMatchObject({ action: 'signed-out', member_id: member.memberId })
  })

  it('leaves the sessions on other devices', async () => {
    const other = await signIn()
    await member.post('/api/v1/sign-out').expect(204)
    expect(await isSignedIn(other)).toBe(true)
  })

  it('is the same success when nobody is signed in', async () => {
    await app.request().post('/api/v1/sign-out').expect(204)
  })

  it('ends every session when asked everywhere', async () => {
    const other = await signIn()
    const stranger = await app.givenMember(group)
    await member.post('/api/v1/sign-out-everywhere').expect(204)
    expect([await isSignedIn(member), await isSignedIn(other)]).toEqual([false, false])
    expect(await isSignedIn(stranger)).toBe(true)
  })
})

describe('list of sessions', () => {
  it('shows one’s own only, latest use first, and which is this one', async () => {
    await app.givenMember(group)
    app.clock.advance(1, 'minutes')
    const other = await signIn()
    const { body } = await other.get('/api/v1/sessions').expect(200)
    expect(body).toMatchObject({
      total: 2,
      rows: [
        { current: true, ownDevice: false, endsAt: new Date(+app.clock.now() + 8 * 3_600_000).toISOString() },
        { current: false, ownDevice: true, device: 'Test browser', address: '127.0.0.1' },
      ],
    })
    expect(JSON.stringify(body)).not.toContain(member.cookie?.slice(20, 60))
  })

  it('ends one of them', async () => {
    const other = await signIn()
    const { body } = await member.get('/api/v1/sessions').expect(200)
    const { rows } = body as { rows: { id: string; current: boolean }[] }
    const ended = rows.find((row) => !row.current)
    await member.delete(`/api/v1/sessions/${ended?.id}`).expect(204)
    expect([await isSignedIn(member), await isSignedIn(other)]).toEqual([true, false])
    await member.delete(`/api/v1/sessions/${ended?.id}`).expect(404)
  })

  it('does not reach the session of another member', async () => {
    const other = await app.givenMember(group)
    const { body } = await other.get('/api/v1/sessions').expect(200)
    await member.delete(`/api/v1/sessions/${(body as { rows: { id: string }[] }).rows[0]?.id}`).expect(404)
    expect(await isSignedIn(other)).toBe(true)
  })
})

describe('giving the password again', () => {
  it('brings back the rights that had been held back, under a new session id', async () => {
    app.clock.advance(2, 'hours')
    await member.get('/api/v1/people').expect(403)
    const before = app.request(member)
    const answer = await member.post('/api/v1/session/password', { password: PASSWORD }).expect(200)
    expect(answer.body).toMatchObject({ member: { roles: ['administrator'] } })
    expect(String(answer.headers['set-cookie'])).toContain('Max-Age=7776000')
    member.keepCookie(answer)
    await member.get('/api/v1/people').expect(200)
    expect(await isSignedIn(before)).toBe(false)
    expect(await lastAction()).toMatchObject({ action: 'password-confirmed' })
  })

  it('changes nothing with a wrong one, and counts it', async () => {
    app.clock.advance(2, 'hours')
    for (let n = 0; n < 10; n += 1) {
      const { body } = await member.post('/api/v1/session/password', { password: 'wrong' }).expect(422)
      expect(body).toMatchObject({ errors: [{ pointer: '#/password' }] })
    }
    await member.post('/api/v1/session/password', { password: PASSWORD }).expect(429)
    await member.get('/api/v1/people').expect(403)
    expect((await auditEntries(app, 'password-refused')).length).toBeGreaterThanOrEqual(10)
  })

  it('is for who is signed in', async () => {
    await app.request().post('/api/v1/session/password', { password: PASSWORD }).expect(401)
  })
})

describe('change of password', () => {
  it('ends all other sessions and the old password', async () => {
    const other = await signIn()
    const copy = app.request(member)
    const body = { password: PASSWORD, newPassword: NEW_PASSWORD }
    member.keepCookie(await member.put('/api/v1/password', body).expect(204))
    expect([await isSignedIn(member), await isSignedIn(other), await isSignedIn(copy)]).toEqual([
      true,
      false,
      false,
    ])
    await signIn(PASSWORD, 401)
    await signIn(NEW_PASSWORD, 200)
    const entry = (await auditEntries(app, 'password-changed')).at(-1)
    expect(entry).toMatchObject({ subject_id: member.memberId, before: null, after: null })
  })

  it('tells the member by mail', async () => {
    await member.put('/api/v1/password', { password: PASSWORD, newPassword: NEW_PASSWORD }).expect(204)
    const rows = await app.inGroup(group, (tx) =>
      tx.sql<{ subject: string }>({ name: '', text: 'SELECT subject FROM mail WHERE recipient = $1' }, [
        member.email,
      ]),
    )
    expect(rows).toEqual([{ subject: 'Your password for Halyard was changed' }])
  })

  it.each([
    ['of 14 characters', 'thistle banner'],
    ['of 129 characters', 'x'.repeat(129)],
    ['among the commonest', 'passwordpassword1'],
    ['made of the group’s name', 'Ridge Group Ridge Group'],
    ['made of the product’s name', 'halyard-halyard-2026'],
  ])('refuses a new password %s', async (_what, newPassword) => {
    const { body } = await member.put('/api/v1/password', { password: PASSWORD, newPassword }).expect(422)
    expect(body).toMatchObject({ errors: [{ pointer: '#/newPassword' }] })
    await signIn(PASSWORD, 200)
  })

  it('needs the present password', async () => {
    const body = { password: 'not the one', newPassword: NEW_PASSWORD }
    expect((await member.put('/api/v1/password', body).expect(422)).body).toMatchObject({
      errors: [{ pointer: '#/password' }],
    })
    await signIn(PASSWORD, 200)
  })
})
