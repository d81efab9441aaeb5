import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { ROLES } from '#shared/contracts/roles.ts'
import { allRows } from '../../support/all-rows.ts'
import { auditEntries } from '../../support/audit-entries.ts'
import { givenRecords } from '../../support/group-records.ts'
import { readOperations, tryOperation, type Operation } from '../../support/operations.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { TEST_ORIGIN } from '../../support/test-client.ts'

let app: TestApp
let member: TestMember
let operations: Operation[]

beforeAll(async () => {
  app = await startTestApp()
  member = await app.givenMember(await app.givenGroup('Ridge Group'), { roles: ROLES })
  operations = await readOperations(app)
})
afterAll(() => app.close())

/** A change that would succeed, with these headers and the member's cookie. */
async function signOutEverywhere(headers: Record<string, string>): Promise<number> {
  const caller = await app.givenMember({ id: member.groupId, name: '' })
  const response = await fetch(`${app.url}/api/v1/sign-out-everywhere`, {
    method: 'POST',
    headers: { Cookie: caller.cookie ?? '', ...headers },
  })
  return response.status
}

describe('a change (P21)', () => {
  it.each([
    ['our own origin', { Origin: TEST_ORIGIN }],
    ['our own origin, whatever else is said', { Origin: TEST_ORIGIN, 'Sec-Fetch-Site': 'cross-site' }],
    ['no origin from a page of ours', { 'Sec-Fetch-Site': 'same-origin' }],
  ])('is taken with %s', async (_what, headers) => {
    expect(await signOutEverywhere(headers)).toBe(204)
  })

  it.each<[string, Record<string, string>]>([
    ['neither header', {}],
    ['a foreign origin', { Origin: 'https://elsewhere.example.com' }],
    [
      'a foreign origin that says same-origin',
      { Origin: 'https://e.example', 'Sec-Fetch-Site': 'same-origin' },
    ],
    ['the origin null', { Origin: 'null' }],
    ['an empty origin', { Origin: '' }],
    ['our host with another port', { Origin: 'http://127.0.0.1:8081' }],
    ['our host with another protocol', { Origin: 'https://127.0.0.1:8080' }],
    ['our origin with a tail', { Origin: `${TEST_ORIGIN}.example.com` }],
    ['our origin with a path', { Origin: `${TEST_ORIGIN}/` }],
    ['another subdomain', { 'Sec-Fetch-Site': 'same-site' }],
    ['a foreign page', { 'Sec-Fetch-Site': 'cross-site' }],
    ['an address typed by hand', { 'Sec-Fetch-Site': 'none' }],
    ['a foreign origin and our Host', { Origin: 'http://evil.example', Host: '127.0.0.1:8080' }],
  ])('is refused with %s', async (_what, headers) => {
    expect(await signOutEverywhere(headers)).toBe(403)
  })

  it('is refused so for every operation that changes anything', async () => {
    const changing = operations.filter(({ method, name }) => method !== 'GET' && name !== 'stop-reminders')
    for (const { method, path, name } of changing) {
      const answer = await fetch(app.url + path, {
        method,
        headers: { Origin: 'https://elsewhere.example.com', Cookie: member.cookie ?? '' },
      })
      const { code } = (await answer.json()) as { code: string }
      expect([name, answer.status, code]).toEqual([name, 403, 'origin-refused'])
    }
  })

  it('that was refused is in the audit log', async () => {
    // Of refusals to nobody in particular only so many a minute are kept.
    app.clock.advance(1, 'minutes')
    await signOutEverywhere({ Origin: 'https://elsewhere.example.com' })
    expect((await auditEntries(app, 'refused')).at(-1)).toMatchObject({
      group_id: null,
      address: '127.0.0.1',
      summary: 'was refused POST /api/v1/sign-out-everywhere: origin-refused',
    })
  })

  it('is never made by GET', { timeout: 60_000 }, async () => {
    const ids = await givenRecords(app, { operations, by: member })
    const before = await allRows(app)
    for (const operation of operations.filter(({ method }) => method === 'GET'))
      await tryOperation(app, operation, { cookie: member.cookie, ids })
    expect(await allRows(app)).toEqual(before)
  })

  it('is offered to no other site: there is no CORS', async () => {
    const foreign = { Origin: 'https://elsewhere.example.com' }
    for (const method of ['GET', 'OPTIONS']) {
      const { headers } = await fetch(`${app.url}/api/v1/session`, { method, headers: foreign })
      expect([...headers.keys()].filter((name) => name.startsWith('access-control-'))).toEqual([])
    }
  })

  it.each([
    'application/x-www-form-urlencoded',
    'text/plain',
    'multipart/form-data; boundary=x',
    'text/json',
  ])('is not taken from a form: %s', async (type) => {
    await member
      .post('/api/v1/sign-in')
      .set('Content-Type', type)
      .send('{"email":"a@example.org"}')
      .expect(415)
  })
})

describe('a refusal for want of a right', () => {
  it('is in the audit log under the member’s name', async () => {
    const observer = await app.givenMember(
      { id: member.groupId, name: '' },
      { roles: ['observer'], name: 'Olga' },
    )
    const { headers } = await observer.get('/api/v1/people').expect(403)
    expect((await auditEntries(app, 'refused')).at(-1)).toMatchObject({
      group_id: member.groupId,
      member_id: observer.memberId,
      actor: 'Olga',
      request_id: headers['x-request-id'],
      summary: 'was refused GET /api/v1/people: not-allowed',
    })
  })
})
