/** Bad input at every operation of the document (promises P23, P24): refused by the right answer, never by a fault. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { ROLES } from '#shared/contracts/roles.ts'
import { idsOfNothing } from '../../support/group-records.ts'
import { BODIES } from '../../support/operation-bodies.ts'
import { readOperations, type Operation } from '../../support/operations.ts'
import { sampleOf } from '../../support/sample-of-schema.ts'
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

interface Sent {
  path?: string
  query?: string
  body?: unknown
}

interface Problem {
  status: number
  code: string
  pointers: string[]
}

const ids = idsOfNothing()

/** What an operation answers; a body or a path that are not given are good ones. */
async function send(operation: Operation, { path, query = '', body }: Sent = {}): Promise<Problem> {
  if (operation.access.scope !== 'group') await app.ctx.db.query('DELETE FROM rate_limit')
  const ending = new AbortController()
  const url = path ?? operation.path.replace(/\{(\w+)\}/g, (_, name: string) => ids(name))
  const startedAt = performance.now()
  const response = await fetch(`${app.url}${url}${query}`, {
    method: operation.method,
    signal: ending.signal,
    headers: {
      Origin: TEST_ORIGIN,
      Cookie: await cookieFor(operation),
      ...(operation.versioned && { 'If-Match': '"1"' }),
      ...(operation.body && { 'Content-Type': 'application/json' }),
    },
    ...(operation.body && { body: JSON.stringify(body ?? bodyOf(operation)) }),
  })
  expect(performance.now() - startedAt).toBeLessThan(5000)
  return readProblem(response).finally(() => ending.abort())
}

/** Some operations end the session they are called in. */
async function cookieFor({ access }: Operation): Promise<string> {
  if (access.scope !== 'self') return member.cookie ?? ''
  return (await app.givenMember({ id: member.groupId, name: '' }, { roles: ROLES })).cookie ?? ''
}

async function readProblem(response: Response): Promise<Problem> {
  if (response.status < 400) return { status: response.status, code: '', pointers: [] }
  expect(response.headers.get('Content-Type')).toBe('application/problem+json; charset=utf-8')
  const problem = (await response.json()) as Record<string, unknown> & { errors?: { pointer: string }[] }
  expect(problem).toMatchObject({
    type: `/problems/${String(problem.code)}`,
    status: response.status,
    title: expect.any(String) as string,
    requestId: response.headers.get('X-Request-Id'),
  })
  expect(JSON.stringify(problem)).not.toMatch(/node_modules|SELECT |INSERT |\.ts:\d/)
  const pointers = problem.errors?.map(({ pointer }) => pointer) ?? []
  return { status: response.status, code: String(problem.code), pointers }
}

function bodyOf(operation: Operation): Record<string, unknown> {
  const made = BODIES[operation.name]?.(ids) ?? (operation.body && sampleOf(operation.body, ids))
  return made as Record<string, unknown>
}

const withBody = () => operations.filter(({ body }) => body)
const withId = () => operations.filter(({ params }) => params.some((name) => name.endsWith('Id')))

const NASTY = [
  `'"; DROP TABLE member; --`,
  '{{7*7}} ${7*7} <%= 7*7 %>',
  '$(id) `id` | id',
  '../../../../etc/passwd',
  '<script>alert(1)</script><img src=x onerror=alert(1)>',
  'javascript:alert(1)',
  '=1+1',
  '\u202Eright to left',
  `e${'\u0301'.repeat(500)}`,
  'x'.repeat(20_000),
]

const UNPRINTABLE = ['NUL \u0000', 'bell \u0007', 'half \ud800', 'half \udc00', 'line\r\nfeed']

describe('every operation', () => {
  it('refuses an unknown field and names it', { timeout: 120_000 }, async () => {
    for (const operation of withBody()) {
      const answer = await send(operation, { body: { ...bodyOf(operation), unexpected: 1 } })
      expect([operation.name, answer.status]).toEqual([operation.name, 422])
      expect([operation.name, ...answer.pointers]).toContain('#/unexpected')
    }
  })

  it('refuses fields that the server alone sets', { timeout: 120_000 }, async () => {
    const own = {
      groupId: ids('other'),
      createdBy: ids('other'),
      version: 9,
      createdAt: '2020-01-01T00:00:00Z',
    }
    for (const operation of withBody()) {
      const answer = await send(operation, { body: { ...bodyOf(operation), ...own } })
      expect([operation.name, answer.status]).toEqual([operation.name, 422])
    }
  })

  it('refuses a wrong type in every field and names it', { timeout: 120_000 }, async () => {
    for (const operation of withBody()) {
      const good = bodyOf(operation)
      for (const field of Object.keys(good)) {
        const answer = await send(operation, { body: { ...good, [field]: { wrong: [] } } })
        expect([operation.name, field, answer.status]).toEqual([operation.name, field, 422])
        expect(answer.pointers.some((pointer) => pointer.startsWith(`#/${field}`))).toBe(true)
      }
    }
  })

  it('refuses unprintable text in every field of text', { timeout: 240_000 }, async () => {
    for (const operation of withBody()) {
      const good = bodyOf(operation)
      for (const field of Object.keys(good).filter((each) => typeof good[each] === 'string')) {
        for (const text of UNPRINTABLE) {
          const answer = await send(operation, { body: { ...good, [field]: text } })
          const isText = field === 'notes' && text.includes('\n')
          if (!isText)
            expect([operation.name, field, text, answer.status]).toEqual([operation.name, field, text, 422])
        }
      }
    }
  })

  it('has no fault with any text', { timeout: 240_000 }, async () => {
    for (const operation of withBody()) {
      const good = bodyOf(operation)
      for (const field of Object.keys(good).filter((each) => typeof good[each] === 'string')) {
        for (const text of NASTY) {
          const { status } = await send(operation, { body: { ...good, [field]: text } })
          expect([operation.name, field, text, status < 500]).toEqual([operation.name, field, text, true])
        }
      }
    }
  })

  it('knows no record by a bad id', { timeout: 120_000 }, async () => {
    const bad = ['x', '%20', '%00', '..%2F..', `${ids('other')}x`, `'%20OR%201=1`]
    for (const operation of withId()) {
      for (const id of bad) {
        const path = operation.path.replace(/\{(\w+)\}/g, (_, name: string) =>
          name.endsWith('Id') ? id : ids(name),
        )
        const { status } = await send(operation, { path })
        expect([operation.name, id, status]).toEqual([operation.name, id, 404])
      }
    }
  })

  it('refuses bad pages of a list', { timeout: 120_000 }, async () => {
    const lists = operations.filter(({ optionalQuery }) => optionalQuery.includes('page'))
    expect(lists.length).toBeGreaterThan(5)
    const bad = [
      'page=0',
      'page=-1',
      'page=1.5',
      'page=1e9',
      'page=x',
      'page=%D9%A1',
      'page=1&page=2',
      'page[]=1',
    ]
    const sizes = [
      'size=0',
      'size=-1',
      'size=201',
      'size=1e9',
      'sort=nothing',
      'descending=perhaps',
      'cursor=x',
    ]
    for (const operation of lists) {
      for (const query of [...bad, ...sizes]) {
        const { status } = await send(operation, { query: `?${query}` })
        expect([operation.name, query, status]).toEqual([operation.name, query, 400])
      }
    }
  })

  it('searches for any text without a fault', { timeout: 120_000 }, async () => {
    for (const operation of operations.filter(({ optionalQuery }) => optionalQuery.includes('search'))) {
      for (const text of [...NASTY.map((each) => each.slice(0, 80)), '%', '_', '\\'].map(
        encodeURIComponent,
      )) {
        const { status } = await send(operation, { query: `?search=${text}` })
        expect([operation.name, text, status]).toEqual([operation.name, text, 200])
      }
    }
  })

  it('answers 405 with Allow to a method it does not take', async () => {
    for (const path of new Set(operations.map((each) => each.path))) {
      const response = await fetch(`${app.url}${path}`, { method: 'PATCH', headers: { Origin: TEST_ORIGIN } })
      const methods = operations.filter((each) => each.path === path).map(({ method }) => method)
      expect([path, response.status]).toEqual([path, 405])
      expect(response.headers.get('Allow')?.split(', ')).toEqual(expect.arrayContaining(methods))
    }
  })

  it('needs a version it was read at, where it changes a record', async () => {
    for (const operation of operations.filter(({ versioned }) => versioned)) {
      const { status, code } = await send({ ...operation, versioned: false })
      expect([operation.name, status, code]).toEqual([operation.name, 428, 'version-missing'])
    }
  })
})

describe('an address where nothing is', () => {
  it.each([
    '/api',
    '/api/',
    '/api/v1',
    '/api/v2/session',
    '/api/v1/session/',
    '/API/v1/session',
    '/api/v1//session',
  ])('answers 404 for %s', async (path) => {
    expect(await send({ ...operations[0]!, method: 'GET', body: undefined }, { path })).toMatchObject({
      status: 404,
      code: 'not-found',
    })
  })

  it.each(['/%', '/%zz', '/api/v1/kits/%', '/api/v1/kits/%E0%A4%A'])('answers 400 for %s', async (path) => {
    expect((await send({ ...operations[0]!, method: 'GET', body: undefined }, { path })).status).toBe(400)
  })
})
