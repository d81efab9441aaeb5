import argon2 from 'argon2'
import { DEMO_SIGN_INS } from '../demo/sign-ins.ts'
import type { BenchProduct } from './bench-product.ts'
import { load, type Target } from './load.ts'
import { median, type BenchRow } from './report.ts'
import { BENCH_GROUP, BENCH_MEMBER } from './thousand-kits.ts'

const SETTING = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }

/** A1: one sign-in against one hash. A2: the board while 16 clients only sign in. */
export async function benchSignIn(product: BenchProduct): Promise<BenchRow[]> {
  const hash = await argon2.hash('a passphrase of the bench', SETTING)
  const hashes = await timesOf(20, () => argon2.verify(hash, 'a passphrase of the bench'))
  const logins = await timesOf(20, () => signIn(product, 0))

  const headers = await product.signedIn(BENCH_MEMBER, BENCH_GROUP)
  const board: Target = {
    url: product.url,
    pid: product.pid,
    headers,
    next: () => ({ path: '/api/v1/board' }),
  }
  const quiet = await load(board, { clients: 4, requests: 1200 })
  let going = true
  const crowd = Promise.all(
    Array.from({ length: 16 }, async (_, place) => {
      while (going)
        await signIn(product, place).catch(() => new Promise((resolve) => setTimeout(resolve, 50)))
    }),
  )
  const busy = await load(board, { clients: 4, requests: 1200 })
  going = false
  await crowd
  const ms = (value: number) => `${value.toFixed(1)} ms`
  return [
    {
      id: 'A1',
      what: 'one sign-in, idle',
      measured: ms(median(logins)),
      floor: ms(median(hashes)),
      ratio: median(logins) / median(hashes),
      goal: '<= 1.8x one hash',
    },
    {
      id: 'A2',
      what: 'board req/s beside 16 sign-ins',
      measured: busy.perSecond.toFixed(0),
      floor: quiet.perSecond.toFixed(0),
      ratio: busy.perSecond / quiet.perSecond,
      goal: '>= 0.6x',
    },
    {
      id: 'A2',
      what: 'board p95 beside 16 sign-ins',
      measured: ms(busy.p95Ms),
      floor: ms(quiet.p95Ms),
      ratio: busy.p95Ms / quiet.p95Ms,
      goal: '<= 2x',
    },
  ]
}

async function signIn(product: BenchProduct, place: number): Promise<void> {
  const { address, password } = DEMO_SIGN_INS[place % DEMO_SIGN_INS.length]!
  const response = await fetch(`${product.url}/api/v1/sign-in`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json', Origin: product.ctx.config.publicUrl },
    body: JSON.stringify({ email: address, password, ownDevice: false }),
  })
  await response.arrayBuffer()
  if (!response.ok) throw new Error(`${response.status} at sign-in`)
}

async function timesOf(count: number, work: () => Promise<unknown>): Promise<number[]> {
  const times: number[] = []
  for (let n = 0; n < count; n += 1) {
    const began = performance.now()
    await work()
    times.push(performance.now() - began)
  }
  return times
}
