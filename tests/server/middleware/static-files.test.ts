/** The built client and the headers that bind it (promise P27). */
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import express, { type ErrorRequestHandler } from 'express'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { PROBLEMS } from '#shared/contracts/problems.ts'
import { AppError } from '#server/errors.ts'
import { securityHeaders } from '#server/middleware/security-headers.ts'
import { staticFiles } from '#server/middleware/static-files.ts'
import { rawRequest } from '../../support/raw-request.ts'

const statusOfProblem: ErrorRequestHandler = (error, _req, res, next) => {
  if (error instanceof AppError) res.sendStatus(PROBLEMS[error.code].status)
  else next(error)
}

let folder: string
let server: Server
let url: string

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'halyard-static-'))
  const client = join(folder, 'client')
  mkdirSync(join(client, 'assets'), { recursive: true })
  mkdirSync(join(client, '.vite'))
  writeFileSync(join(folder, 'secret.txt'), 'hidden words')
  writeFileSync(join(client, 'index.html'), '<!doctype html><title>Page</title>')
  writeFileSync(join(client, '.vite/manifest.json'), '{"hidden": "words"}')
  writeFileSync(join(client, 'assets/a-1.js'), 'plain')
  writeFileSync(join(client, 'assets/a-1.js.br'), 'brotli')
  writeFileSync(join(client, 'assets/a-1.js.gz'), 'gzip')
  const app = express().use(securityHeaders(), staticFiles(client), statusOfProblem)
  server = createServer(app)
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
})
afterAll(async () => {
  await new Promise((resolve) => server.close(resolve))
  rmSync(folder, { recursive: true })
})

const get = (path: string, headers: Record<string, string> = {}) =>
  fetch(url + path, { headers: { Accept: 'text/html', ...headers } })

describe('the client’s files', () => {
  it('run only scripts of this site, in no frame, over TLS only', async () => {
    const { headers } = await get('/')
    const policy = headers.get('Content-Security-Policy') ?? ''
    for (const directive of [
      "script-src 'self'",
      "object-src 'none'",
      "base-uri 'none'",
      "frame-ancestors 'none'",
      "form-action 'self'",
      "connect-src 'self'",
      "require-trusted-types-for 'script'",
    ])
      expect(policy.split(';')).toContain(directive)
    expect(policy).not.toContain('unsafe-eval')
    expect(headers.get('Strict-Transport-Security')).toBe('max-age=63072000; includeSubDomains')
    expect(headers.get('X-Content-Type-Options')).toBe('nosniff')
  })

  it('are kept for ever where the name comes from the content, and asked for anew where it does not', async () => {
    expect((await get('/assets/a-1.js')).headers.get('Cache-Control')).toBe(
      'public, max-age=31536000, immutable',
    )
    const page = await get('/')
    expect(page.headers.get('Cache-Control')).toBe('no-cache')
    const again = await rawRequest(url, { 'If-None-Match': page.headers.get('ETag')! }, '/')
    expect(again.status).toBe(304)
  })

  it.each([
    ['br, gzip', 'br', 'brotli'],
    ['gzip', 'gzip', 'gzip'],
    ['identity', null, 'plain'],
  ])('are sent packed as the browser takes them: %s', async (accepted, encoding, content) => {
    const { headers, body } = await rawRequest(`${url}/assets/a-1.js`, { 'Accept-Encoding': accepted })
    expect(headers['content-encoding'] ?? null).toBe(encoding)
    expect(headers.vary).toContain('Accept-Encoding')
    expect(body).toBe(content)
  })

  it('include the page for every address of a page, and for nothing else', async () => {
    expect((await get('/kits/some-id')).status).toBe(200)
    expect((await get('/assets/gone-2.js')).status).toBe(404)
    expect((await get('/API/v1/none')).status).toBe(404)
    expect((await get('/kits/some-id', { Accept: 'application/json' })).status).toBe(404)
  })

  it.each([
    '/../secret.txt',
    '/%2e%2e/secret.txt',
    '/..%2fsecret.txt',
    '/assets/..%5c..%5csecret.txt',
    '/assets/%252e%252e/%252e%252e/secret.txt',
    '//secret.txt',
    '/.vite/manifest.json',
    '/%2evite/manifest.json',
    '/assets/a-1.js%00.html',
    '/%ff',
  ])('are a list: %s leads nowhere', async (path) => {
    const { status, body } = await rawRequest(url, {}, path)
    expect([400, 404]).toContain(status)
    expect(body).not.toMatch(/hidden/)
  })
})
