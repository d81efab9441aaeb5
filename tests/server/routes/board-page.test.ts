import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import express from 'express'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { AppContext } from '#server/context.ts'
import { createDataSource } from '#server/data-source.ts'
import { readSession } from '#server/middleware/session.ts'
import { boardPage } from '#server/routes/board-page.ts'
import { givenStation } from '../../support/evidence.ts'
import { startTestApp, type TestApp, type TestMember } from '../../support/test-app.ts'

const EVERYBODYS = 'the page of everybody'

let app: TestApp
let member: TestMember
let folder: string
let servers: Server[] = []

beforeAll(async () => {
  app = await startTestApp()
  folder = mkdtempSync(join(tmpdir(), 'halyard-board-page-'))
  writeFileSync(join(folder, 'index.html'), '<title>Halyard</title><div id="app"></div><p>After</p>')
  const group = await app.givenGroup('Page')
  member = await app.givenMember(group, { roles: ['quartermaster'] })
  await givenStation(member)
})
afterAll(async () => {
  for (const server of servers) await new Promise((resolve) => server.close(resolve))
  rmSync(folder, { recursive: true })
  await app.close()
})

async function serve(ctx: AppContext): Promise<string> {
  const page = boardPage(ctx, { folder, session: readSession(ctx) })
  const server = createServer(express().use(page, (_req, res) => void res.send(EVERYBODYS)))
  servers = [...servers, server]
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}`
}

async function ask(path: string, cookie = member.cookie!, ctx = app.ctx) {
  const answer = await fetch((await serve(ctx)) + path, { headers: { Cookie: cookie } })
  return { status: answer.status, headers: answer.headers, text: await answer.text() }
}

describe('the page of the board', () => {
  it('has the sentence of one’s own group in it, and is kept by nobody', async () => {
    const { text, headers } = await ask('/')
    expect(text).toContain('<h1><b>None of 1 station can go.</b> 1 cannot be used now.</h1>')
    expect(text).toMatch(/^<title>Halyard<\/title><div id="app"><header .*<\/main><\/div><p>After<\/p>$/)
    expect(headers.get('Cache-Control')).toBe('no-store')
  })

  it('says so where the data are a demonstration', async () => {
    expect((await ask('/')).text).not.toContain('Demonstration')
    const group = await app.givenGroup('Shown', { demo: true })
    const shown = await app.givenMember(group, { roles: ['observer'] })
    const { text } = await ask('/', shown.cookie)
    expect(text).toContain('Demonstration data: nothing here is real.')
    expect(text).toContain('<b>No stations yet.</b>')
  })

  it('is the page of everybody without a session, after it has ended, and on any other address', async () => {
    const group = await app.givenGroup('Left')
    const gone = await app.givenMember(group)
    await gone.post('/api/v1/sign-out')
    for (const [path, cookie] of [
      ['/', 'theme=night'],
      ['/', gone.cookie!],
      ['/', `${gone.cookie!.slice(0, -4)}AAAA`],
      ['/items', member.cookie!],
    ] as const)
      expect((await ask(path, cookie)).text).toBe(EVERYBODYS)
  })

  it('does not say of another instant what is so now', async () => {
    expect((await ask('/?asOf=2026-01-01T00:00:00Z')).text).toBe(EVERYBODYS)
  })

  it('comes without its sentence where the database does not answer', async () => {
    const db = createDataSource({ url: 'postgres://halyard_app@127.0.0.1:1/none', size: 1 })
    const { status, text } = await ask('/', member.cookie, { ...app.ctx, db })
    expect([status, text]).toEqual([200, EVERYBODYS])
  })

  it('comes in time where the database is slow to answer', async () => {
    const { db } = app.ctx
    const runners = Array.from({ length: 6 }, () => db.createQueryRunner())
    await Promise.all(runners.map((runner) => runner.connect()))
    const before = performance.now()
    expect((await ask('/')).text).toBe(EVERYBODYS)
    expect(performance.now() - before).toBeLessThan(2000)
    await Promise.all(runners.map((runner) => runner.release()))
  })
})

describe('what the board’s page asks for first', () => {
  const linkOf = async (path: string, cookie?: string) => (await ask(path, cookie)).headers.get('Link')

  it('is named with the page to a browser that has a session', async () => {
    expect(await linkOf('/')).toBe(
      '</api/v1/session>; rel=preload; as=fetch; crossorigin, ' +
        '</api/v1/board?size=200>; rel=preload; as=fetch; crossorigin',
    )
  })

  it('has the filters of the address, without what is needed', async () => {
    const link = await linkOf('/?verdict=proven&need=40m,60W')
    expect(link).toContain('</api/v1/board?verdict=proven&size=200>')
  })

  it('is named on no other page, and to nobody without a session', async () => {
    expect(await linkOf('/items')).toBeNull()
    expect(await linkOf('/', 'theme=night')).toBeNull()
  })

  it('cannot be given another address or header by what the address holds', async () => {
    const link = await linkOf('/?search=%3E%2C%20%3Chttps%3A%2F%2Fexample.org%3E%0D%0AX: 1')
    expect(link?.match(/[<>]/g)).toHaveLength(4)
    expect(link).not.toMatch(/example\.org>|\r|\n/)
  })
})
