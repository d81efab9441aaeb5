import { readFileSync } from 'node:fs'
import { Agent, request } from 'node:http'
import { median, percentile } from './report.ts'

export interface Target {
  readonly url: string
  /** The process that serves it. */
  readonly pid: number
  readonly method?: string
  readonly headers?: Readonly<Record<string, string>>
  /** A fresh path and body for every request. */
  readonly next: () => { readonly path: string; readonly body?: string }
}

export interface LoadResult {
  readonly p50Ms: number
  readonly p95Ms: number
  /** CPU of the serving process a request, microseconds. */
  readonly cpuUs: number
  readonly perSecond: number
}

/** Keeps `clients` requests in flight until `requests` were answered; any answer but 2xx or 304 is an error. */
export async function load(
  target: Target,
  { clients, requests }: { clients: number; requests: number },
): Promise<LoadResult> {
  const agent = new Agent({ keepAlive: true, maxSockets: clients })
  const times: number[] = []
  let left = requests
  const cpuBefore = cpuMs(target.pid)
  const startedAt = performance.now()
  const client = async () => {
    while (left > 0) {
      left -= 1
      const began = performance.now()
      await one(agent, target)
      times.push(performance.now() - began)
    }
  }
  await Promise.all(Array.from({ length: clients }, client))
  const seconds = (performance.now() - startedAt) / 1000
  agent.destroy()
  return {
    p50Ms: median(times),
    p95Ms: percentile(times, 0.95),
    cpuUs: ((cpuMs(target.pid) - cpuBefore) * 1000) / requests,
    perSecond: requests / seconds,
  }
}

function one(agent: Agent, target: Target): Promise<void> {
  const { path, body } = target.next()
  return new Promise((resolve, reject) => {
    const sent = request(
      `${target.url}${path}`,
      {
        agent,
        method: target.method ?? 'GET',
        headers: { ...target.headers, ...(body && { 'Content-Type': 'application/json' }) },
      },
      (answer) => {
        let text = ''
        answer.on('data', (chunk: Buffer) =>
          text.length < 500 ? (text += chunk.toString('latin1')) : undefined,
        )
        answer.on('end', () => {
          const status = answer.statusCode ?? 0
          if ((status >= 200 && status < 300) || status === 304) resolve()
          else reject(new Error(`${status} from ${path}: ${text.slice(0, 300)}`))
        })
      },
    )
    sent.on('error', reject)
    sent.end(body)
  })
}

/** User and system time of a process so far, from the kernel, in ms (10 ms ticks). */
export function cpuMs(pid: number): number {
  const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ')[1]!.split(' ')
  return (Number(fields[11]) + Number(fields[12])) * 10
}

/** Rounds of product and floor in turn, the order changing each round; the ratios are medians of those within a round. */
export async function compare(
  product: Target,
  floor: Target,
  size: { clients: number; requests: number; rounds: number },
): Promise<{ product: LoadResult; floor: LoadResult; p50: number; p95: number; cpu: number }> {
  const rounds: { product: LoadResult; floor: LoadResult }[] = []
  await load(product, { ...size, requests: size.clients * 20 })
  await load(floor, { ...size, requests: size.clients * 20 })
  for (let round = 0; round < size.rounds; round += 1) {
    const first = round % 2 === 0 ? product : floor
    const one = await load(first, size)
    const other = await load(first === product ? floor : product, size)
    rounds.push(first === product ? { product: one, floor: other } : { product: other, floor: one })
  }
  const ratio = (of: (result: LoadResult) => number) =>
    median(rounds.map((round) => of(round.product) / of(round.floor)))
  const middle = rounds[Math.floor(rounds.length / 2)]!
  return {
    ...middle,
    p50: ratio(({ p50Ms }) => p50Ms),
    p95: ratio(({ p95Ms }) => p95Ms),
    cpu: ratio(({ cpuUs }) => cpuUs),
  }
}
