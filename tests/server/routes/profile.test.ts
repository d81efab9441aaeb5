import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { auditEntries } from '../../support/audit-entries.ts'
import { startTestApp, type TestApp, type TestGroup, type TestMember } from '../../support/test-app.ts'

let app: TestApp
let group: TestGroup
let member: TestMember

beforeAll(async () => {
  app = await startTestApp()
  group = await app.givenGroup('Ridge Group')
})
afterAll(() => app.close())
beforeEach(async () => {
  member = await app.givenMember(group, { name: 'Vera Volunteer' })
})

const profile = (changes: object = {}) => ({
  name: 'Vera Volunteer',
  phone: null,
  callSign: null,
  licenceClass: null,
  licenceExpiresOn: null,
  temperatureUnit: 'C',
  lengthUnit: 'm',
  wantsReminders: true,
  ...changes,
})
const change = (changes: object, version = 1) =>
  member.post('/api/v1/profile', profile(changes)).set('If-Match', `"${version}"`)

describe('profile', () => {
  it('shows one’s own record with its version', async () => {
    const { body } = await member.get('/api/v1/profile').expect(200).expect('ETag', '"1"')
    expect(body).toMatchObject({ id: member.memberId, email: member.email, roles: ['volunteer'], version: 1 })
  })

  it('changes units, and the session tells so', async () => {
    await change({ temperatureUnit: 'F', lengthUnit: 'ft' }).expect(200)
    const { body } = await member.get('/api/v1/session')
    expect(body).toMatchObject({ member: { units: { temperature: 'F', length: 'ft' } } })
  })

  it('keeps a call sign in one form and turns reminders off', async () => {
    const { body } = await change({ callSign: ' qx0vvl/p ', wantsReminders: false }).expect(200)
    expect(body).toMatchObject({ callSign: 'QX0VVL/P', wantsReminders: false, version: 2 })
  })

  it('is audited with what changed', async () => {
    await change({ phone: '(555) 555-0103', name: 'Vera V.' }).expect(200)
    expect((await auditEntries(app, 'profile-changed')).at(-1)).toMatchObject({
      member_id: member.memberId,
      summary: 'changed their own name and phone',
      before: { phone: null, name: 'Vera Volunteer' },
      after: { phone: '(555) 555-0103', name: 'Vera V.' },
    })
  })

  it('tells the second of two changes what the first made of it', async () => {
    await change({ name: 'First' }).expect(200)
    const { body } = await change({ name: 'Second' }).expect(412)
    expect(body).toMatchObject({ code: 'version-stale', current: { name: 'First', version: 2 } })
    await member.post('/api/v1/profile', profile()).expect(428)
  })

  it.each([
    ['roles', { roles: ['administrator'] }],
    ['e-mail', { email: 'other@example.org' }],
    ['group', { groupId: '0' }],
    ['id', { id: '0' }],
    ['notes', { notes: 'x' }],
  ])('does not let a member set their own %s', async (_what, changes) => {
    const { body } = await change(changes).expect(422)
    expect(body).toMatchObject({ errors: [{ pointer: `#/${Object.keys(changes)[0]}` }] })
  })

  it('is for observers too', async () => {
    const observer = await app.givenMember(group, { roles: ['observer'] })
    await observer.get('/api/v1/profile').expect(200)
  })
})
