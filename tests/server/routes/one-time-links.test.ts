/** Links in mail (promise P22). */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { Member } from '#server/entities/Member.ts'
import { asOwner, auditEntries } from '../../support/audit-entries.ts'
import { givenCheapPassword, PASSWORD } from '../../support/given-password.ts'
import { mailedLink, mailsTo } from '../../support/mailed-link.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'
import { TEST_ORIGIN } from '../../support/test-client.ts'

const NEW_PASSWORD = 'thistle banner under gravel'

let app: TestApp
let group: TestGroup
let member: TestMember

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Ridge & Valley <Group>')
})
afterAll(() => app.close())
beforeEach(async () => {
  await app.ctx.db.query('DELETE FROM rate_limit')
  member = await app.givenMember(group)
  await givenCheapPassword(app, member)
})

const ask = (email: string) => app.request().post('/api/v1/password-resets', { email })
const check = (token: string) => app.request().post('/api/v1/one-time-links/check', { token })
const use = (token: string, newPassword = NEW_PASSWORD) =>
  app.request().post('/api/v1/one-time-links/use', { token, newPassword })
const signIn = (password: string) => app.request().post('/api/v1/sign-in', { email: member.email, password })

async function resetToken(): Promise<string> {
  await ask(member.email).expect(202)
  return (await mailedLink(app, member.email)).token
}

describe('password reset', () => {
  it('mails a link under the configured address, whatever the Host', async () => {
    await ask(member.email)
      .set('Host', 'elsewhere.example.com')
      .set('X-Forwarded-Host', 'elsewhere')
      .expect(202)
    const { link, token } = await mailedLink(app, member.email)
    expect(link).toBe(`${TEST_ORIGIN}/reset-password#${token}`)
    expect(Buffer.from(token, 'base64url')).toHaveLength(32)
  })

  it('writes a mail with text and HTML in which names are text', async () => {
    await ask(member.email).expect(202)
    const [mail] = await mailsTo(app, member.email)
    expect(mail?.text_body).toContain('Ridge & Valley <Group>')
    expect(mail?.html_body).toContain('Ridge &#38; Valley &#60;Group&#62;')
    expect(mail?.html_body).not.toContain('<Group>')
  })

  it('keeps nothing at rest that the link could be made of', async () => {
    const token = await resetToken()
    const rows = await asOwner(app, 'SELECT one_time_link::text AS row FROM one_time_link')
    expect(JSON.stringify(rows)).not.toContain(token)
    expect(JSON.stringify(await auditEntries(app))).not.toContain(token)
  })

  it('answers for an unknown address as for a known one', async () => {
    const known = await ask(member.email).expect(202)
    const unknown = await ask('nobody@example.org').expect(202)
    expect(unknown.body).toEqual(known.body)
    expect(await mailsTo(app, 'nobody@example.org')).toEqual([])
  })

  it('takes as long for an unknown address as for a known one', async () => {
    const timed = async (email: string) => {
      const startedAt = performance.now()
      await ask(email).expect(202)
      return performance.now() - startedAt
    }
    await timed(member.email)
    const known = [await timed(member.email), await timed(member.email)]
    const unknown = [await timed('a@example.org'), await timed('b@example.org')]
    expect(Math.min(...unknown) / Math.min(...known)).toBeGreaterThan(0.5)
  })

  it('fills nobody’s mailbox: three an hour, and the same answer', async () => {
    for (let n = 0; n < 5; n += 1) await ask(member.email).expect(202)
    expect(await mailsTo(app, member.email)).toHaveLength(3)
  })

  it('is stopped after twenty an hour from an address', async () => {
    for (let n = 0; n < 20; n += 1) await ask(`nobody${n}@example.org`).expect(202)
    await ask('nobody@example.org').expect(429).expect('Retry-After', /^\d+$/)
  })

  it('sets the password, ends all sessions, and works once', async () => {
    const token = await resetToken()
    await use(token).expect(204)
    expect((await member.get('/api/v1/session')).body).toEqual({ member: null })
    await signIn(PASSWORD).expect(401)
    await signIn(NEW_PASSWORD).expect(200)
    await use(token, 'another gravel under thistle')
      .expect(422)
      .expect(/link-invalid/)
    await check(token).expect(422)
    await signIn(NEW_PASSWORD).expect(200)
    expect((await auditEntries(app, 'password-reset')).at(-1)).toMatchObject({ member_id: member.memberId })
  })

  it('works once though used twice at the same moment', async () => {
    const token = await resetToken()
    const answers = await Promise.all([use(token), use(token, 'another gravel under thistle')])
    expect(answers.map(({ status }) => status).toSorted()).toEqual([204, 422])
  })

  it('is looked at as often as a mail program likes, by POST alone', async () => {
    const token = await resetToken()
    const { body } = await check(token).expect(200)
    expect(body).toEqual({
      purpose: 'password-reset',
      memberName: expect.any(String) as string,
      email: member.email,
      groupName: 'Ridge & Valley <Group>',
    })
    await check(token).expect(200)
    await app.request().get('/api/v1/one-time-links/use').expect(405)
    await use(token).expect(204)
  })

  it('works for 30 minutes', async () => {
    const token = await resetToken()
    app.clock.advance(1799, 'seconds')
    await check(token).expect(200)
    app.clock.advance(1, 'seconds')
    await check(token).expect(422)
    await use(token).expect(422)
    await signIn(PASSWORD).expect(200)
  })

  it('stops working when a newer one is mailed', async () => {
    const first = await resetToken()
    const second = await resetToken()
    await use(first).expect(422)
    await use(second).expect(204)
  })

  it('stops working when the membership ends', async () => {
    const token = await resetToken()
    await app.inGroup(group, (tx) =>
      tx.repository(Member).update({ id: member.memberId }, { removedAt: tx.now }),
    )
    await check(token).expect(422)
    await use(token).expect(422)
  })

  it('stays good when the new password is refused', async () => {
    const token = await resetToken()
    const { body } = await use(token, 'passwordpassword').expect(422)
    expect(body).toMatchObject({ code: 'request-invalid', errors: [{ pointer: '#/newPassword' }] })
    await use(token).expect(204)
  })

  it('belongs to its member, whoever is signed in where it is used', async () => {
    const token = await resetToken()
    const stranger = await app.givenMember(await app.givenGroup('Elsewhere'), { roles: ['administrator'] })
    await stranger.post('/api/v1/one-time-links/use', { token, newPassword: NEW_PASSWORD }).expect(204)
    await signIn(NEW_PASSWORD).expect(200)
    expect((await auditEntries(app, 'password-reset')).at(-1)).toMatchObject({
      group_id: group.id,
      member_id: member.memberId,
    })
  })

  it.each(['', 'x', 'A'.repeat(43), `${'A'.repeat(42)}\n`, "' OR 1=1 --"])(
    'refuses %j as a link',
    async (token) => {
      await check(token).expect(422)
      await use(token).expect(422)
    },
  )
})
