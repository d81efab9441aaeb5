/** Members, their rights and their end, each with the next request (promises P15 and P22). */
import { v7 as uuidv7 } from 'uuid'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { auditEntries } from '../../support/audit-entries.ts'
import { givenCheapPassword } from '../../support/given-password.ts'
import { mailedLink, mailsTo } from '../../support/mailed-link.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

interface Person {
  id: string
  version: number
  name: string
  roles: string[]
  signIn: string
}

let app: TestApp
let group: TestGroup
let admin: TestMember

beforeAll(async () => {
  app = await startTestApp()
})
afterAll(() => app.close())
beforeEach(async () => {
  group = await app.givenGroup('Ridge Group')
  admin = await app.givenMember(group, { roles: ['administrator'], name: 'Ada Admin' })
  await givenCheapPassword(app, admin)
})

const invitation = (email: string | null, changes: object = {}) => ({
  name: 'Nora Newcomer',
  email,
  phone: '(555) 555-0101',
  callSign: 'qx0 nnc',
  licenceClass: 'General',
  licenceExpiresOn: '2030-02-28',
  roles: ['volunteer'],
  ...changes,
})
let count = 0
const freshEmail = () => `newcomer${(count += 1)}@example.org`

async function invite(changes: object = {}): Promise<{ person: Person; email: string }> {
  const email = freshEmail()
  const { body } = await admin.put(`/api/v1/people/${uuidv7()}`, invitation(email, changes)).expect(200)
  return { person: body as Person, email }
}
const read = async (id: string) => (await admin.get(`/api/v1/people/${id}`).expect(200)).body as Person
const setRoles = (id: string, roles: string[], version: number) =>
  admin.post(`/api/v1/people/${id}/roles`, { roles }).set('If-Match', `"${version}"`)
const remove = (id: string, version: number) =>
  admin.post(`/api/v1/people/${id}/remove`, { reason: 'Moved away' }).set('If-Match', `"${version}"`)

describe('invitation', () => {
  it('adds a member, mails a link, and lets them in once they chose a password', async () => {
    const { person, email } = await invite()
    expect(person).toMatchObject({ signIn: 'invited', roles: ['volunteer'], callSign: 'QX0NNC', version: 1 })
    const { link, token } = await mailedLink(app, email)
    expect(link).toContain('/invitation#')
    const newPassword = 'thistle banner under gravel'
    await app.request().post('/api/v1/one-time-links/use', { token, newPassword }).expect(204)
    await app.request().post('/api/v1/sign-in', { email, password: newPassword }).expect(200)
    expect(await read(person.id)).toMatchObject({ signIn: 'active' })
    expect((await auditEntries(app, 'invitation-accepted')).at(-1)).toMatchObject({ member_id: person.id })
  })

  it('works for 24 hours', async () => {
    const { email } = await invite()
    const { token } = await mailedLink(app, email)
    app.clock.advance(24, 'hours')
    await app.request().post('/api/v1/one-time-links/check', { token }).expect(422)
    app.clock.advance(-24, 'hours')
  })

  it('is the same success when sent twice, with one mail', async () => {
    const id = uuidv7()
    const email = freshEmail()
    const first = await admin.put(`/api/v1/people/${id}`, invitation(email)).expect(200)
    const second = await admin.put(`/api/v1/people/${id}`, invitation(email)).expect(200)
    expect(second.body).toEqual(first.body)
    expect(await mailsTo(app, email)).toHaveLength(1)
    await admin
      .put(`/api/v1/people/${id}`, invitation(email, { name: 'Other' }))
      .expect(409)
      .expect(/id-taken/)
  })

  it('adds somebody without an address who never signs in', async () => {
    const { body } = await admin.put(`/api/v1/people/${uuidv7()}`, invitation(null)).expect(200)
    expect(body).toMatchObject({ email: null, signIn: 'no-sign-in' })
  })

  it('refuses an address that another member of the group has, in whatever case', async () => {
    const { email } = await invite()
    const answer = await admin.put(`/api/v1/people/${uuidv7()}`, invitation(email.toUpperCase())).expect(409)
    expect(answer.body).toMatchObject({ code: 'already-exists', errors: [{ pointer: '#/email' }] })
  })

  it('does not tell that another group knows an address', async () => {
    const stranger = await app.givenMember(await app.givenGroup('Valley Group'))
    await admin.put(`/api/v1/people/${uuidv7()}`, invitation(stranger.email)).expect(200)
  })

  it('is sent again on request, and the one before stops working', async () => {
    const { person, email } = await invite()
    const before = await mailedLink(app, email)
    await admin.post(`/api/v1/people/${person.id}/invitations`, {}).expect(200)
    const { token } = await mailedLink(app, email)
    await app.request().post('/api/v1/one-time-links/check', { token: before.token }).expect(422)
    await app.request().post('/api/v1/one-time-links/check', { token }).expect(200)
  })

  it('is not sent again to who has chosen a password or has no address', async () => {
    await admin.post(`/api/v1/people/${admin.memberId}/invitations`, {}).expect(409)
    const { body } = await admin.put(`/api/v1/people/${uuidv7()}`, invitation(null)).expect(200)
    await admin.post(`/api/v1/people/${(body as Person).id}/invitations`, {}).expect(409)
  })

  it.each([
    ['two addresses', { email: 'a@example.org, b@example.org' }, '#/email'],
    ['a line break in the address', { email: 'a@example.org\r\nBcc: b@example.org' }, '#/email'],
    ['a quoted local part', { email: '"a b"@example.org' }, '#/email'],
    ['an address of 300 characters', { email: `${'a'.repeat(288)}@example.org` }, '#/email'],
    ['nested comments', { email: `${'('.repeat(100)}a@example.org` }, '#/email'],
    ['letters of another alphabet in the address', { email: 'а@example.org' }, '#/email'],
    ['a call sign of look-alike letters', { callSign: 'QX0АВС' }, '#/callSign'],
    ['a day that does not exist', { licenceExpiresOn: '2027-02-30' }, '#/licenceExpiresOn'],
    ['an unknown role', { roles: ['owner'] }, '#/roles/0'],
    ['no role', { roles: [] }, '#/roles'],
    ['a role twice', { roles: ['volunteer', 'volunteer'] }, '#/roles'],
    ['a line break in the name', { name: 'A\r\nB' }, '#/name'],
    ['NUL in the name', { name: 'A\u0000B' }, '#/name'],
    ['words for a telephone number', { phone: 'call me' }, '#/phone'],
    ['a group of their choice', { groupId: uuidv7() }, '#/groupId'],
    ['a version of their choice', { version: 9 }, '#/version'],
  ])('refuses %s', async (_what, changes, pointer) => {
    const body = invitation(freshEmail(), changes)
    const answer = await admin.put(`/api/v1/people/${uuidv7()}`, body).expect(422)
    expect((answer.body as { errors: { pointer: string }[] }).errors.map((error) => error.pointer)).toContain(
      pointer,
    )
  })

  it('keeps names of any script and of markup as text, in the mail too', async () => {
    const name = '<b>Zoë</b> O’Brien "Q" %0d%0a שלום'
    const { person, email } = await invite({ name })
    expect(person.name).toBe(name)
    const [mail] = await mailsTo(app, email)
    expect(mail?.html_body).toContain('&#60;b&#62;Zoë&#60;/b&#62;')
    expect(mail?.headers).toEqual({})
  })
})

describe('roles', () => {
  it('hold with the member’s next request', async () => {
    const member = await app.givenMember(group, { roles: ['volunteer'] })
    await member.get('/api/v1/people').expect(403)
    await setRoles(member.memberId, ['administrator', 'volunteer'], 1).expect(200)
    await member.get('/api/v1/people').expect(200)
    await setRoles(member.memberId, ['observer'], 2).expect(200)
    await member.get('/api/v1/people').expect(403)
    await member.get('/api/v1/members').expect(403)
  })

  it('are audited with what they were and are', async () => {
    const member = await app.givenMember(group, { roles: ['volunteer'], name: 'Vera' })
    await setRoles(member.memberId, ['quartermaster'], 1).expect(200)
    expect((await auditEntries(app, 'roles-changed')).at(-1)).toMatchObject({
      member_id: admin.memberId,
      subject_id: member.memberId,
      summary: 'made Vera quartermaster',
      before: { roles: ['volunteer'] },
      after: { roles: ['quartermaster'] },
    })
  })

  it('need the version they were read at', async () => {
    const member = await app.givenMember(group)
    const path = `/api/v1/people/${member.memberId}/roles`
    await admin.post(path, { roles: ['observer'] }).expect(428)
    await setRoles(member.memberId, ['observer'], 1).expect(200).expect('ETag', '"2"')
    const { body } = await setRoles(member.memberId, ['volunteer'], 1).expect(412)
    expect(body).toMatchObject({ code: 'version-stale', current: { roles: ['observer'], version: 2 } })
  })

  it('leave the group an administrator who can sign in', async () => {
    const { person } = await invite({ roles: ['administrator'] })
    await setRoles(admin.memberId, ['volunteer'], 1)
      .expect(409)
      .expect(/last administrator/)
    const second = await app.givenMember(group, { roles: ['administrator'] })
    await givenCheapPassword(app, second)
    await setRoles(admin.memberId, ['volunteer'], 1).expect(200)
    expect(person.roles).toEqual(['administrator'])
  })
})

describe('removal', () => {
  it('ends the member’s sessions at once and keeps their record', async () => {
    const member = await app.givenMember(group, { name: 'Vera' })
    await remove(member.memberId, 1).expect(200)
    expect((await member.get('/api/v1/session')).body).toEqual({ member: null })
    await member.get('/api/v1/members').expect(401)
    expect(await read(member.memberId)).toMatchObject({ removedAt: app.clock.now().toISOString() })
    expect((await auditEntries(app, 'member-removed')).at(-1)).toMatchObject({
      summary: 'removed Vera: Moved away',
      member_id: admin.memberId,
    })
  })

  it('is refused for the last administrator, by themselves too', async () => {
    await remove(admin.memberId, 1)
      .expect(409)
      .expect(/last administrator/)
  })

  it('leaves one of two administrators who remove each other at the same moment', async () => {
    const second = await app.givenMember(group, { roles: ['administrator'] })
    await givenCheapPassword(app, second)
    const answers = await Promise.all([
      remove(second.memberId, 1),
      second.post(`/api/v1/people/${admin.memberId}/remove`, { reason: 'Moved away' }).set('If-Match', '"1"'),
    ])
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1)
  })

  it('frees the address for somebody else', async () => {
    const { person, email } = await invite()
    await remove(person.id, 1).expect(200)
    await admin.put(`/api/v1/people/${uuidv7()}`, invitation(email)).expect(200)
  })

  it('is final: a removed member is not changed', async () => {
    const member = await app.givenMember(group)
    await remove(member.memberId, 1).expect(200)
    await setRoles(member.memberId, ['administrator'], 2).expect(409)
  })
})

describe('change of a member', () => {
  const change = (person: Person, changes: object) => {
    const { roles: _, ...rest } = invitation('x@example.org')
    return admin
      .post(`/api/v1/people/${person.id}`, { ...rest, ...changes })
      .set('If-Match', `"${person.version}"`)
  }

  it('invites at the new address who has not chosen a password yet', async () => {
    const { person, email } = await invite()
    const old = await mailedLink(app, email)
    const renewed = freshEmail()
    await change(person, { email: renewed }).expect(200)
    await app.request().post('/api/v1/one-time-links/check', { token: old.token }).expect(422)
    const { token } = await mailedLink(app, renewed)
    await app.request().post('/api/v1/one-time-links/check', { token }).expect(200)
  })

  it('ends the sessions of a member whose address changes', async () => {
    const member = await app.givenMember(group)
    await change(await read(member.memberId), { email: freshEmail() }).expect(200)
    expect((await member.get('/api/v1/session')).body).toEqual({ member: null })
  })

  it('leaves no member without an address who signs in', async () => {
    await change(await read(admin.memberId), { email: null }).expect(422)
  })

  it('writes nothing when nothing differs', async () => {
    const { person, email } = await invite()
    const before = (await auditEntries(app)).length
    const { body } = await change(person, { email }).expect(200)
    expect(body).toMatchObject({ version: 1 })
    expect(await auditEntries(app)).toHaveLength(before)
  })
})

describe('list of people', () => {
  it('pages, sorts, searches and filters', async () => {
    for (const name of ['Bela', 'Cyra', 'Dov']) await app.givenMember(group, { name, roles: ['observer'] })
    const names = async (query: string) => {
      const { body } = await admin.get(`/api/v1/people?${query}`).expect(200)
      const { rows, total } = body as { rows: Person[]; total: number }
      return { names: rows.map(({ name }) => name), total }
    }
    expect(await names('size=2')).toEqual({ names: ['Ada Admin', 'Bela'], total: 4 })
    expect(await names('size=2&page=2')).toEqual({ names: ['Cyra', 'Dov'], total: 4 })
    expect(await names('descending=true&size=1')).toEqual({ names: ['Dov'], total: 4 })
    expect(await names('search=cY')).toEqual({ names: ['Cyra'], total: 1 })
    expect(await names('search=%25')).toEqual({ names: [], total: 0 })
    expect(await names('role=administrator')).toEqual({ names: ['Ada Admin'], total: 1 })
  })

  it.each([
    'page=0',
    'page=-1',
    'size=201',
    'size=1e9',
    'page=1.5',
    'page=x',
    'sort=password',
    'page=1&page=2',
    'x=1',
  ])('refuses %s', async (query) => {
    await admin.get(`/api/v1/people?${query}`).expect(400)
  })

  it('shows members to the crew by name and call sign only', async () => {
    const volunteer = await app.givenMember(group, { phone: '(555) 555-0102', callSign: 'QX0VOL' })
    const { body } = await volunteer.get('/api/v1/members').expect(200)
    expect(Object.keys((body as { rows: object[] }).rows[0]!)).toEqual(['id', 'name', 'callSign'])
    expect(JSON.stringify(body)).not.toContain('@example.org')
    expect(JSON.stringify(body)).not.toContain('555')
  })

  it('answers for a member of another group as for nobody', async () => {
    const stranger = await app.givenMember(await app.givenGroup('Valley Group'))
    const foreign = await admin.get(`/api/v1/people/${stranger.memberId}`).expect(404)
    const none = await admin.get(`/api/v1/people/${uuidv7()}`).expect(404)
    expect({ ...foreign.body, requestId: '' }).toEqual({ ...none.body, requestId: '' })
    await remove(stranger.memberId, 1).expect(404)
    await setRoles(stranger.memberId, ['observer'], 1).expect(404)
    expect((await stranger.get('/api/v1/session')).body).toMatchObject({ member: { roles: ['volunteer'] } })
  })
})
