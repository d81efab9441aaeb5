import { afterEach, describe, expect, it, vi } from 'vitest'
import { z } from 'zod'
import { defineEndpoint } from '#shared/contracts/endpoint.ts'
import { addressOf } from '@/api/address.ts'
import { callApi, setReactions } from '@/api/call-api.ts'
import { ProblemError } from '@/api/problem-error.ts'

const access = { scope: 'public' } as const
const readThing = defineEndpoint({
  name: 'read-thing',
  method: 'get',
  path: '/api/v1/things/:thingId',
  summary: 'One thing',
  access,
  params: z.object({ thingId: z.string() }),
  query: z.object({ search: z.string().optional(), size: z.number().optional() }),
  response: z.object({ name: z.string() }),
})
const changeThing = defineEndpoint({
  name: 'change-thing',
  method: 'post',
  path: '/api/v1/things/:thingId',
  summary: 'Change a thing',
  access,
  versioned: true,
  params: z.object({ thingId: z.string() }),
  body: z.strictObject({ name: z.string() }),
})

const json = (value: unknown, status = 200) =>
  new Response(JSON.stringify(value), {
    status,
    headers: { 'Content-Type': status < 400 ? 'application/json' : 'application/problem+json' },
  })
const problem = (code: string, status: number, more: object = {}) =>
  json({ type: `/problems/${code}`, title: 'No', status, code, requestId: 'r-1', ...more }, status)

function answering(...answers: (Response | Error)[]) {
  const fetchMock = vi.fn<typeof fetch>()
  for (const answer of answers) {
    if (answer instanceof Error) fetchMock.mockRejectedValueOnce(answer)
    else fetchMock.mockResolvedValueOnce(answer)
  }
  vi.stubGlobal('fetch', fetchMock)
  return fetchMock
}

const read = () => callApi(readThing, { params: { thingId: 'a/b' }, query: { search: 'x y' } })
const change = () => callApi(changeThing, { params: { thingId: '1' }, body: { name: 'n' }, version: 4 })
const thrown = async (work: () => Promise<unknown>) =>
  work().then(
    () => undefined,
    (error: unknown) => error as ProblemError,
  )

afterEach(() => {
  vi.unstubAllGlobals()
  vi.useRealTimers()
  setReactions({ askPassword: async () => false, signedOut: () => undefined })
})

describe('a call', () => {
  it('goes to the address of its contract with the parts escaped', async () => {
    const fetchMock = answering(json({ name: 'n' }))
    await expect(read()).resolves.toEqual({ name: 'n' })
    expect(fetchMock.mock.calls[0]?.[0]).toBe('/api/v1/things/a%2Fb?search=x+y')
  })

  it('sends the version that a change was made from', async () => {
    const fetchMock = answering(new Response(null, { status: 204 }))
    await change()
    const init = fetchMock.mock.calls[0]?.[1]
    expect(init?.headers).toMatchObject({ 'If-Match': '"4"', 'Content-Type': 'application/json' })
    expect(init?.body).toBe('{"name":"n"}')
  })

  it('reads an answer that was asked for early instead of asking', async () => {
    const fetchMock = answering()
    const early = Promise.resolve(json({ name: 'early' }))
    await expect(callApi(readThing, { params: { thingId: '1' }, early })).resolves.toEqual({ name: 'early' })
    expect(fetchMock).not.toHaveBeenCalled()
  })

  it('refuses an answer that is not what the contract says', async () => {
    answering(json({ nom: 1 }))
    expect(await thrown(read)).toMatchObject({ code: 'answer-unreadable' })
  })
})

describe('a problem', () => {
  it('carries its fields by pointer, the current record and the wait', async () => {
    const details = { errors: [{ pointer: '#/name', detail: 'Taken.' }], current: { version: 5 } }
    const response = problem('version-stale', 412, details)
    response.headers.set('Retry-After', '7')
    answering(response)
    const error = await thrown(change)
    expect(error).toMatchObject({
      code: 'version-stale',
      status: 412,
      retryAfterSeconds: 7,
      requestId: 'r-1',
    })
    expect(error?.fields.get('#/name')).toBe('Taken.')
    expect(error?.current).toEqual({ version: 5 })
  })

  it('says that there is no connection', async () => {
    answering(new TypeError('Failed to fetch'))
    const error = await thrown(read)
    expect(error).toMatchObject({ code: 'no-connection', status: 0, isTemporary: true })
  })

  it('says that it took too long after 15 seconds, and that sending again is safe', async () => {
    const timeOut = new AbortController()
    const waits = vi.spyOn(AbortSignal, 'timeout').mockReturnValue(timeOut.signal)
    const hanging = vi.fn<typeof fetch>(
      (_input, init) =>
        new Promise((_resolve, reject) =>
          init?.signal?.addEventListener('abort', () => reject(new DOMException('late', 'TimeoutError'))),
        ),
    )
    vi.stubGlobal('fetch', hanging)
    const waiting = thrown(change)
    timeOut.abort()
    const error = await waiting
    expect(waits).toHaveBeenCalledWith(15_000)
    expect(error).toMatchObject({ code: 'timed-out', isTemporary: true })
    expect(error?.detail).toContain('nothing is stored twice')
    waits.mockRestore()
  })

  it('is known for what it is when a proxy answers with a page', async () => {
    answering(new Response('<h1>Bad gateway</h1>', { status: 502, headers: { 'Content-Type': 'text/html' } }))
    expect(await thrown(read)).toMatchObject({ code: 'answer-unreadable', status: 502 })
  })
})

describe('what the application does about it', () => {
  it('asks for the password once and repeats the call', async () => {
    const fetchMock = answering(problem('password-needed', 403), new Response(null, { status: 204 }))
    const askPassword = vi.fn(async () => true)
    setReactions({ askPassword, signedOut: () => undefined })
    await change()
    expect(askPassword).toHaveBeenCalledOnce()
    expect(fetchMock).toHaveBeenCalledTimes(2)
  })

  it('gives up when the password is not given', async () => {
    const fetchMock = answering(problem('password-needed', 403))
    expect(await thrown(change)).toMatchObject({ code: 'password-needed' })
    expect(fetchMock).toHaveBeenCalledOnce()
  })

  it('hears that nobody is signed in', async () => {
    answering(problem('sign-in-needed', 401))
    const signedOut = vi.fn()
    setReactions({ askPassword: async () => false, signedOut })
    expect(await thrown(read)).toBeInstanceOf(ProblemError)
    expect(signedOut).toHaveBeenCalledOnce()
  })
})

describe('addresses', () => {
  it('leave out what is absent and refuse what is missing', () => {
    expect(addressOf('/a/:id', { id: 1 }, { b: undefined, c: '', d: null, e: false })).toBe('/a/1?e=false')
    expect(() => addressOf('/a/:id', {}, undefined)).toThrow(RangeError)
  })
})
