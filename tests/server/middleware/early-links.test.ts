import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import express from 'express'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { earlyLinks } from '#server/middleware/early-links.ts'

let server: Server
let url: string

beforeAll(async () => {
  const app = express().use(earlyLinks(), (_req, res) => void res.send('page'))
  server = createServer(app)
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
})
afterAll(() => new Promise((resolve) => server.close(resolve)))

const linkOf = async (path: string, cookie = '__Host-halyard=s%3Aabc') =>
  (await fetch(url + path, { headers: { Cookie: cookie } })).headers.get('Link')

describe('what the board’s page asks for first', () => {
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
