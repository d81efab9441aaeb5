/** Multipart framing (promises P23, P25): 400, 413 or 415, at once, and the process lives on. */
import { connect } from 'node:net'
import { v7 as uuidv7 } from 'uuid'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { TEST_ORIGIN } from '../../support/test-client.ts'
import { send, upload } from '../../support/uploads.ts'

let app: TestApp
let member: TestMember

beforeAll(async () => {
  app = await startTestApp()
  member = await app.givenMember(await app.givenGroup('Ridge Group'))
})
afterAll(() => app.close())
afterEach(async () => {
  const { status } = await upload(app, member, { kind: 'touchstone', bytes: SWEEP, name: 'a.s1p' })
  expect(status).toBe(200)
})

const SWEEP = '# MHz S RI R 50\n7 0.1 0\n'
const B = 'frontier'
const TYPE = `multipart/form-data; boundary=${B}`
const part = (headers: string, content = SWEEP) => `--${B}\r\n${headers}\r\n\r\n${content}\r\n`
const FILE = 'Content-Disposition: form-data; name="file"; filename="a.s1p"'
const END = `--${B}--\r\n`

const refused = async (body: string | Uint8Array, type: string | null = TYPE) => {
  const startedAt = performance.now()
  const { status } = await send(app, member, {
    kind: 'touchstone',
    body: body as BodyInit,
    headers: type === null ? { 'Content-Type': '' } : { 'Content-Type': type },
  })
  expect(performance.now() - startedAt).toBeLessThan(5000)
  return status
}

describe('a multipart body', () => {
  it.each([
    ['empty', ''],
    ['of white space', ' \r\n'],
    ['without an end', part(FILE)],
    ['cut in a part', `--${B}\r\n${FILE}\r\n\r\n# MHz`],
    ['cut in a heading', `--${B}\r\nContent-Disposition: form`],
    ['of another boundary', part(FILE).replaceAll(B, 'other') + END],
    ['only an end', END],
    ['without a file', part('Content-Disposition: form-data; name="note"') + END],
    ['with the file in another field', part(FILE.replace('"file"', '"photo"')) + END],
    ['with two files', part(FILE) + part(FILE) + END],
    ['with 200 files', part(FILE).repeat(200) + END],
    ['with 5,000 fields', part('Content-Disposition: form-data; name="x"', '1').repeat(5000) + END],
    [
      'with a field beside the file',
      part(FILE) + part('Content-Disposition: form-data; name="x"', '1') + END,
    ],
    ['with a nested name', part('Content-Disposition: form-data; name="file[__proto__][x]"') + END],
    [
      'with __proto__ as name',
      part('Content-Disposition: form-data; name="__proto__"; filename="a.s1p"') + END,
    ],
    ['without a disposition', part('Content-Type: text/plain') + END],
    ['with a heading of 100 KiB', part(`X-Long: ${'x'.repeat(100 * 1024)}`, '') + END],
    ['with 5,000 headings', part(`${'X-A: 1\r\n'.repeat(5000)}X-B: 2`, '') + END],
    ['of bare line feeds', (part(FILE) + END).replaceAll('\r\n', '\n')],
  ])('%s is refused', async (_, body) => expect(await refused(body)).toBe(400))

  it.each([
    ['without a type', null],
    ['as JSON', 'application/json'],
    ['as a form', 'application/x-www-form-urlencoded'],
    ['as mixed multipart', `multipart/mixed; boundary=${B}`],
  ])('%s is of no kind that is taken', async (_, type) => {
    expect(await refused(part(FILE) + END, type)).toBe(415)
  })

  it.each([
    ['no boundary', 'multipart/form-data'],
    ['an empty boundary', 'multipart/form-data; boundary='],
    ['a boundary of 500 characters', `multipart/form-data; boundary=${'x'.repeat(500)}`],
  ])('with %s is refused', async (_, type) => expect(await refused(part(FILE) + END, type)).toBe(400))

  it('in a packed encoding is refused', async () => {
    const { status } = await send(app, member, {
      kind: 'touchstone',
      body: part(FILE) + END,
      headers: { 'Content-Type': TYPE, 'Content-Encoding': 'gzip' },
    })
    expect(status).toBe(415)
  })

  it('of more than the kind may hold is refused', async () => {
    expect(await refused(part(FILE, 'x'.repeat(2 * 1024 * 1024 + 1)) + END)).toBe(413)
    expect(
      await refused(part('Content-Disposition: form-data; name="x"', 'x'.repeat(8 * 1024 * 1024)) + END),
    ).toBe(413)
  })

  it('whose file name comes twice or encoded is taken, the name being only shown', async () => {
    const twice = `${FILE}; filename*=UTF-8''b%00%2F..%2Fc.s1p`
    const { status, body } = await send(app, member, {
      kind: 'touchstone',
      body: part(twice) + END,
      headers: { 'Content-Type': TYPE },
    })
    expect(status).toBe(200)
    expect(body.name).not.toMatch(/[/\\\u0000]/)
  })

  it.each([
    ['a length of 10 GiB', 'Content-Length: 10737418240\r\n', ''],
    ['endless chunks', 'Transfer-Encoding: chunked\r\n', `100000\r\n${'x'.repeat(0x100000)}\r\n`.repeat(3)],
  ])('that announces %s is answered at once with 413 (P25)', async (_, header, body) => {
    expect(await raw(`${header}Content-Type: ${TYPE}\r\n`, body)).toMatch(/^HTTP\/1\.1 413 /)
  })

  it('cut by the network stores nothing and harms nothing', async () => {
    await raw(`Content-Length: 5000\r\nContent-Type: ${TYPE}\r\n`, part(FILE), { hangUp: true })
    const [{ n }] = await app.ctx.db.query<[{ n: number }]>('SELECT count(*)::int AS n FROM attachment')
    expect(n).toBe(0)
  })
})

/** What the server says to a request of the test's own framing, before the request has ended. */
function raw(headers: string, body: string, { hangUp = false } = {}): Promise<string> {
  const { port } = new URL(app.url)
  return new Promise((resolve, reject) => {
    const socket = connect(Number(port), '127.0.0.1')
    let said = ''
    socket.setTimeout(4000, () => socket.destroy(new Error('no answer')))
    socket.on('data', (chunk) => (said += chunk.toString()))
    socket.on('close', () => resolve(said))
    socket.on('error', (error) => (said ? resolve(said) : reject(error)))
    socket.write(
      `PUT /api/v1/attachments/${uuidv7()}?kind=touchstone HTTP/1.1\r\nHost: 127.0.0.1\r\nOrigin: ${TEST_ORIGIN}\r\n` +
        `Cookie: ${member.cookie}\r\n${headers}\r\n${body}`,
    )
    if (hangUp) setTimeout(() => socket.destroy(), 100)
  })
}
