/** Signing in by password (promises P17, P18, P20). */
import argon2 from 'argon2'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { Credential } from '#server/entities/Credential.ts'
import { Member } from '#server/entities/Member.ts'
import { SESSION_COOKIE } from '#server/middleware/session-cookie.ts'
import { auditEntries } from '../../support/audit-entries.ts'
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

  it('takes the address in capitals and with spaces around it', async () => {
    await signIn({ email: ` ${member.email.toUpperCase()} `, password: PASSWORD }).expect(200)
  })

  it.each([
    ['cut', PASSWORD.slice(0, -1)],
    ['with a tail', `${PASSWORD}x`],
    ['in other case', PASSWORD.toUpperCase()],
    ['with a space in front', ` ${PASSWORD}`],
    ['with NUL behind', `${PASSWORD}\u0000`],
    ['empty', ''],
    ['129 characters long', 'x'.repeat(129)],
    ['a lone surrogate', '\ud800'],
    ['SQL', "' OR '1'='1"],
  ])('refuses a password that is %s', async (_what, password) => {
    const { status, headers } = await signIn({ email: member.email, password })
    expect([401, 422]).toContain(status)
    expect(headers['set-cookie']).toBeUndefined()
  })

  it.each([[{ $ne: '' }], [['x']], [1], [null], [true]])('refuses %j as a password', async (password) => {
    await signIn({ email: member.email, password }).expect(422)
    await signIn({ email: password, password: PASSWORD }).expect(422)
  })

  it('refuses what it does not know beside the two', async () => {
    const { body } = await signIn({ email: member.email, password: PASSWORD, role: 'administrator' }).expect(
      422,
    )
    expect(body).toMatchObject({ errors: [{ pointer: '#/role' }] })
  })

  it('takes a password of 128 characters whole', async () => {
    const long = `${'é'.repeat(127)}x`
    const other = await app.givenMember(group)
    await givenPassword(app, other, long)
    await signIn({ email: other.email, password: `${'é'.repeat(127)}y` }).expect(401)
    await signIn({ email: other.email, password: long.normalize('NFD') }).expect(200)
  })

  it('answers an unknown address and a wrong password alike', async () => {
    const wrong = await signIn({ email: member.email, password: 'x' }).expect(401)
    const unknown = await signIn({ email: 'nobody@example.org', password: 'x' }).expect(401)
    expect({ ...unknown.body, requestId: '' }).toEqual({ ...wrong.body, requestId: '' })
    expect(Object.keys(unknown.headers)).toEqual(Object.keys(wrong.headers))
  })

  it('answers for an invited member who has no password yet as for nobody', async () => {
    const invited = await app.givenMember(group)
    await signIn({ email: invited.email, password: PASSWORD })
      .expect(401)
      .expect(/sign-in-refused/)
  })

  it('does not let a removed member in', async () => {
    await app.inGroup(group, (tx) =>
      tx.repository(Member).update({ id: member.memberId }, { removedAt: tx.now }),
    )
    await signIn({ email: member.email, password: PASSWORD }).expect(401)
  })

  it('makes a new session at each sign-in and ends the one before in that browser', async () => {
    const before = member.cookie
    member.keepCookie(await signIn({ email: member.email, password: PASSWORD }, member).expect(200))
    expect(member.cookie).not.toBe(before)
    const old = app.request()
    old.cookie = before
    expect((await old.get('/api/v1/session')).body).toEqual({ member: null })
    expect((await member.get('/api/v1/session')).body).toMatchObject({ member: { id: member.memberId } })
  })

  it('finds the group by the password where one address belongs to members of two', async () => {
    const elsewhere = await app.givenGroup('Valley Group')
    const other = await app.givenMember(elsewhere, { email: member.email })
    await givenPassword(app, other, 'another orchard beyond the ferry')
    const { body } = await signIn({
      email: member.email,
      password: 'another orchard beyond the ferry',
    }).expect(200)
    expect(body).toMatchObject({ member: { id: other.memberId, group: { name: 'Valley Group' } } })
    const own = await signIn({ email: member.email, password: PASSWORD }).expect(200)
    expect(own.body).toMatchObject({ member: { id: member.memberId, group: { name: 'Ridge Group' } } })
  })

  it('strengthens a hash of weaker settings', async () => {
    const weak = await argon2.hash(PASSWORD, {
      type: argon2.argon2id,
      memoryCost: 8192,
      timeCost: 1,
      parallelism: 1,
    })
    const credentials = { memberId: member.memberId }
    await app.inGroup(group, (tx) => tx.repository(Credential).update(credentials, { passwordHash: weak }))
    await signIn({ email: member.email, password: PASSWORD }).expect(200)
    const kept = await app.inGroup(group, (tx) => tx.repository(Credential).findOneBy(credentials))
    expect(kept?.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,p=1,t=2\$/)
    await signIn({ email: member.email, password: PASSWORD }).expect(200)
  })

  it('is audited, taken or refused, without a word of what was typed', async () => {
    const typed = 'a word that was typed'
    await signIn({ email: member.email, password: typed }).expect(401)
    await signIn({ email: 'nobody-at-all@example.org', password: typed }).expect(401)
    const { headers } = await signIn({ email: member.email, password: PASSWORD }).expect(200)
    const entries = (await auditEntries(app)).slice(-3)
    expect(entries).toMatchObject([
      { action: 'sign-in-refused', group_id: group.id, subject_id: member.memberId, member_id: null },
      { action: 'sign-in-refused', group_id: null, subject_id: null, actor: 'Signed out' },
      {
        action: 'signed-in',
        group_id: group.id,
        member_id: member.memberId,
        request_id: headers['x-request-id'],
      },
    ])
    expect(entries.map((entry) => entry.address)).toEqual(['127.0.0.1', '127.0.0.1', '127.0.0.1'])
    const all = JSON.stringify(await auditEntries(app))
    for (const secret of [
      typed,
      PASSWORD,
      'nobody-at-all',
      'argon2',
      String(headers['set-cookie']).slice(20, 60),
    ])
      expect(all).not.toContain(secret)
  })
})
