import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { SESSION_COOKIE } from '#server/middleware/session-cookie.ts'
import { givenPassword, PASSWORD } from '../../support/given-password.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let member: TestMember

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Ridge Group', { timeZone: 'America/Denver' })
})
afterAll(() => app.close())
beforeEach(async () => {
  await app.ctx.db.query('DELETE FROM rate_limit')
  member = await app.givenMember(group, { roles: ['quartermaster'], callSign: 'QX0ABC' })
  await givenPassword(app, member)
})

const signIn = (body: object, client = app.request()) => client.post('/api/v1/sign-in', body)

describe('sign-in', () => {
  it('opens a session that says who is signed in', async () => {
    const browser = app.request()
    const answer = await signIn({ email: member.email, password: PASSWORD, ownDevice: true }, browser).expect(
      200,
    )
    browser.keepCookie(answer)
    const { body } = await browser.get('/api/v1/session').expect(200)
    expect(body).toEqual(answer.body)
    expect(body.member).toMatchObject({
      id: member.memberId,
      callSign: 'QX0ABC',
      roles: ['quartermaster'],
      heldRoles: ['quartermaster'],
      units: { temperature: 'C', length: 'm' },
      group: { name: 'Ridge Group', timeZone: 'America/Denver', demo: false },
    })
  })

  it('sets a cookie that only this site’s server reads', async () => {
    const answer = await signIn({ email: member.email, password: PASSWORD, ownDevice: true }).expect(200)
    const cookie = String(answer.headers['set-cookie'])
    expect(cookie.startsWith(`${SESSION_COOKIE}=`)).toBe(true)
    for (const part of ['HttpOnly', 'Secure', 'SameSite=Lax', 'Path=/', 'Max-Age=7776000'])
      expect(cookie).toContain(part)
    expect(cookie).not.toContain('Domain')
  })

  it('lets the browser forget a session on a device that is not one’s own', async () => {
    const answer = await signIn({ email: member.email, password: PASSWORD }).expect(200)
    expect(String(answer.headers['set-cookie'])).not.toContain('Max-Age')
  })
})
