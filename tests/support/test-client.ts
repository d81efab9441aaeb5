import { createHmac } from 'node:crypto'
import type { Server } from 'node:http'
import request, { type Test } from 'supertest'
import { SESSION_COOKIE } from '#server/middleware/session-cookie.ts'

export const TEST_ORIGIN = 'http://127.0.0.1:8080'
export const TEST_SECRET = 'a-secret-of-the-tests-and-of-nothing-else'

/** A browser: sends our own Origin and, when signed in, its cookie, which supertest would keep to https. */
export class TestClient {
  constructor(
    readonly server: Server,
    public cookie?: string,
  ) {}

  get(path: string): Test {
    return this.#send(request(this.server).get(path))
  }

  post(path: string, body?: object): Test {
    return this.#send(request(this.server).post(path), body)
  }

  put(path: string, body?: object): Test {
    return this.#send(request(this.server).put(path), body)
  }

  delete(path: string, body?: object): Test {
    return this.#send(request(this.server).delete(path), body)
  }

  /** Takes over the session that an answer sets; a cleared cookie signs this browser out. */
  keepCookie(answer: { headers: Record<string, unknown> }): void {
    const set = answer.headers['set-cookie']
    const own = (Array.isArray(set) ? (set as string[]) : []).find((line) =>
      line.startsWith(`${SESSION_COOKIE}=`),
    )
    if (own) this.cookie = own.split(';')[0]?.endsWith('=') ? undefined : own.split(';')[0]
  }

  #send(test: Test, body?: object): Test {
    test.set('Origin', TEST_ORIGIN)
    if (this.cookie) test.set('Cookie', this.cookie)
    return body ? test.send(body) : test
  }
}

/** The cookie that the server would have set for a session. */
export function cookieOf(sid: string): string {
  const signature = createHmac('sha256', TEST_SECRET).update(sid).digest('base64').replace(/=+$/, '')
  return `${SESSION_COOKIE}=${encodeURIComponent(`s:${sid}.${signature}`)}`
}
