/** "Every JSON body" of the promises (P23-P25). */
import { connect } from 'node:net'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'
import { TEST_ORIGIN } from '../../support/test-client.ts'

let app: TestApp
let member: TestMember

beforeAll(async () => {
  app = await startTestApp()
  member = await app.givenMember(await app.givenGroup('Ridge Group'), { roles: ['administrator'] })
})
afterAll(() => app.close())

const JSON_TYPE = 'application/json'
const PATH = '/api/v1/session/password'

interface Sent {
  status: number
  code: string
  pointers: string[]
}

async function send(body: string | Uint8Array, headers: Record<string, string> = {}): Promise<Sent> {
  const response = await fetch(app.url + PATH, {
    method: 'POST',
    headers: { Origin: TEST_ORIGIN, Cookie: member.cookie ?? '', 'Content-Type': JSON_TYPE, ...headers },
    body: body as BodyInit,
  })
  expect(response.headers.get('Content-Type')).toContain('application/problem+json')
  const problem = (await response.json()) as { status: number; code: string; errors?: { pointer: string }[] }
  expect(problem).toMatchObject({ status: response.status, type: `/problems/${problem.code}` })
  expect(JSON.stringify(problem)).not.toMatch(/node_modules|at \w+ \(|SELECT|\.ts:/)
  return {
    status: problem.status,
    code: problem.code,
    pointers: problem.errors?.map(({ pointer }) => pointer) ?? [],
  }
}

const password = (value: unknown) => JSON.stringify({ password: value })

describe('a JSON body', () => {
  it.each<[string, string | Uint8Array]>([
    ['broken', '{"password":'],
    ['empty', ''],
    ['of white space', ' \n'],
    ['a bare word', 'password'],
    ['null', 'null'],
    ['a number', '1'],
    ['a string', '"password"'],
    ['an array', '[{"password":"x"}]'],
    ['two documents', '{"password":"x"}{"password":"x"}'],
    ['with a comment', '{"password":"x"} // sic'],
    ['with NaN', '{"password":NaN}'],
    ['with a trailing comma', '{"password":"x",}'],
    ['in single quotes', "{'password':'x'}"],
    ['of bad UTF-8', Buffer.from('7b2270617373776f7264223a22ff227d', 'hex')],
    ['of cut UTF-8', Buffer.from('7b2270617373776f7264223a22e282227d', 'hex')],
    ['in UTF-16', Buffer.from('﻿{"password":"x"}', 'utf16le')],
    ['with a line break in a string', '{"password":"a\nb"}'],
    ['of 1,000 levels', '['.repeat(1000)],
    ['of 1,000 whole levels', `{"password":${'['.repeat(1000)}${']'.repeat(1000)}}`],
    ['of 50,000 whole levels', `{"a":${'['.repeat(50_000)}${']'.repeat(50_000)}}`],
    ['of 40,000 elements', `{"password":[${'1,'.repeat(40_000)}1]}`],
    ['of 5,000 fields', `{${Array.from({ length: 5000 }, (_, n) => `"k${n}":1`).join()}}`],
    ['with a field name of 50,000 characters', `{"${'k'.repeat(50_000)}":1}`],
  ])('%s is refused with 400', async (_what, body) => {
    const startedAt = performance.now()
    expect(await send(body)).toMatchObject({ status: 400, code: 'request-malformed' })
    expect(performance.now() - startedAt).toBeLessThan(2000)
  })

  it.each<[string, Record<string, string>]>([
    ['another type', { 'Content-Type': 'text/html' }],
    ['a type that only looks like JSON', { 'Content-Type': 'application/jsonx' }],
    ['a type that is nearly JSON', { 'Content-Type': 'application/vnd.api+json' }],
    ['no type', { 'Content-Type': '' }],
    ['an unknown charset', { 'Content-Type': `${JSON_TYPE}; charset=x-unknown` }],
    ['another charset', { 'Content-Type': `${JSON_TYPE}; charset=utf-16` }],
    ['a charset of one byte', { 'Content-Type': `${JSON_TYPE}; charset=iso-8859-1` }],
    ['gzip', { 'Content-Encoding': 'gzip' }],
    ['br', { 'Content-Encoding': 'br' }],
    ['an unknown encoding', { 'Content-Encoding': 'x-unknown' }],
  ])('with %s is refused with 415', async (_what, headers) => {
    expect(await send(password('x'), headers)).toMatchObject({ status: 415, code: 'content-type-refused' })
  })

  it('over 100 KiB is refused with 413', async () => {
    expect(await send(password('x'.repeat(102_400)))).toMatchObject({ status: 413, code: 'body-too-large' })
  })

  it.each([
    ['that says it has 10 GiB', 'Content-Length: 10737418240\r\n\r\n{"password":'],
    ['that is chunked over 100 KiB', `Transfer-Encoding: chunked\r\n\r\n20000\r\n${'x'.repeat(0x20000)}\r\n`],
  ])('%s is refused with 413 at once and the connection closed', async (_what, rest) => {
    const startedAt = performance.now()
    const answer = await raw(
      `POST ${PATH} HTTP/1.1\r\nHost: x\r\nOrigin: ${TEST_ORIGIN}\r\nCookie: ${member.cookie}\r\nContent-Type: ${JSON_TYPE}\r\n${rest}`,
    )
    expect(answer).toMatch(/^HTTP\/1\.1 413 /)
    expect(answer.toLowerCase()).toContain('connection: close')
    expect(performance.now() - startedAt).toBeLessThan(2000)
  })

  it.each<[string, string, string]>([
    ['an unknown field', '{"password":"x","role":"administrator"}', '#/role'],
    ['__proto__', '{"password":"x","__proto__":{"isAdmin":true}}', '#/__proto__'],
    ['constructor', '{"password":"x","constructor":{"prototype":{"isAdmin":true}}}', '#/constructor'],
    ['a dotted name', '{"password":"x","a.b":1}', '#/a.b'],
    ['a name with a slash', '{"password":"x","a/b~c":1}', '#/a~1b~0c'],
    ['a missing field', '{}', '#/password'],
    ['a number for text', '{"password":1}', '#/password'],
    ['1e309 for text', '{"password":1e309}', '#/password'],
    ['a number of 90,000 digits', `{"password":${'9'.repeat(90_000)}}`, '#/password'],
    ['nested prototypes', '{"password":{"__proto__":{"isAdmin":true}}}', '#/password'],
    ['NUL', '{"password":"a\\u0000"}', '#/password'],
    ['a lone surrogate', '{"password":"\\ud800"}', '#/password'],
  ])('with %s is refused with 422 that names the field', async (_what, body, pointer) => {
    const answer = await send(body)
    expect(answer).toMatchObject({ status: 422, code: 'request-invalid' })
    expect(answer.pointers).toContain(pointer)
    expect(Object.prototype).not.toHaveProperty('isAdmin')
  })

  it('is read in UTF-8 with or without saying so', async () => {
    for (const type of [JSON_TYPE, `${JSON_TYPE};charset=utf-8`, `${JSON_TYPE}; charset="UTF-8"`])
      expect(await send('{}', { 'Content-Type': type })).toMatchObject({ status: 422 })
  })
})

/** Sends bytes as they are and gives back what comes until the server closes. */
function raw(request: string): Promise<string> {
  return new Promise((resolve, reject) => {
    const { port } = new URL(app.url)
    const socket = connect(Number(port), '127.0.0.1', () => socket.write(request))
    let answer = ''
    socket.on('data', (chunk) => (answer += chunk.toString('latin1')))
    socket.on('close', () => resolve(answer))
    socket.on('error', (error) => (answer ? resolve(answer) : reject(error)))
  })
}
