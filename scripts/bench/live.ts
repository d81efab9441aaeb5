import { Agent, request, type IncomingMessage } from 'node:http'
import pg from 'pg'
import type { BenchProduct } from './bench-product.ts'
import { percentile, type BenchRow } from './report.ts'
import { BENCH_GROUP, BENCH_MEMBER } from './thousand-kits.ts'

const STREAMS = 500
const BROADCASTS = 20
/** More at once than the server lets wait for its database are sent away to come again. */
const AT_ONCE = 50

/** E1: from NOTIFY to the clients of 500 streams. The product groups what comes within 100 ms, which is taken off. */
export async function benchLive(product: BenchProduct): Promise<BenchRow[]> {
  const client = new pg.Client({ connectionString: product.database.ownerUrl })
  await client.connect()
  try {
    const headers = await product.signedIn(BENCH_MEMBER, BENCH_GROUP)
    const payload = JSON.stringify({ groupId: BENCH_GROUP, revision: 2, kitIds: [] })
    const notify = (channel: string) => () => client.query('SELECT pg_notify($1, $2)', [channel, payload])
    const floor = await broadcast(`${product.floorUrl}/live`, {}, notify('bench_live'))
    const own = await broadcast(`${product.url}/api/v1/live`, headers, notify('halyard_board'))
    const [ownP95, floorP95] = [percentile(own, 0.95), percentile(floor, 0.95)]
    const spread = percentile(own, 0.95) - percentile(own, 0.01)
    return [
      {
        id: 'E1',
        what: `NOTIFY to ${STREAMS} streams, p95`,
        measured: `${ownP95.toFixed(0)} ms`,
        floor: `${floorP95.toFixed(0)} ms`,
        ratio: null,
        goal: '<= 1.5x beside the 100-250 ms of grouping',
      },
      {
        id: 'E1',
        what: 'first to 95th of a hundred clients',
        measured: `${spread.toFixed(0)} ms`,
        floor: `${floorP95.toFixed(0)} ms`,
        ratio: spread / floorP95,
        goal: '<= 1.5x',
      },
    ]
  } finally {
    await client.end()
  }
}

async function broadcast(
  url: string,
  headers: Record<string, string>,
  notify: () => Promise<unknown>,
): Promise<number[]> {
  const agent = new Agent({ keepAlive: false, maxSockets: STREAMS })
  const streams: IncomingMessage[] = []
  while (streams.length < STREAMS)
    streams.push(...(await Promise.all(Array.from({ length: AT_ONCE }, () => open(url, headers, agent)))))
  const times: number[] = []
  for (let turn = 0; turn < BROADCASTS; turn += 1) {
    const began = performance.now()
    const heard = streams.map((stream) => next(stream).then(() => times.push(performance.now() - began)))
    await notify()
    await Promise.all(heard)
    await new Promise((resolve) => setTimeout(resolve, 300))
  }
  for (const stream of streams) stream.destroy()
  return times
}

function open(url: string, headers: Record<string, string>, agent: Agent): Promise<IncomingMessage> {
  return new Promise((resolve, reject) => {
    const sent = request(url, { headers: { ...headers, Accept: 'text/event-stream' }, agent }, (answer) => {
      if (answer.statusCode !== 200) return reject(new Error(`${answer.statusCode} from ${url}`))
      // Whatever greets a new stream is no broadcast.
      setTimeout(() => resolve(answer), 500)
      answer.resume()
    })
    sent.on('error', reject)
    sent.end()
  })
}

function next(stream: IncomingMessage): Promise<void> {
  return new Promise((resolve) => {
    const hear = (chunk: Buffer) => {
      if (!chunk.includes('data:')) return
      stream.off('data', hear)
      resolve()
    }
    stream.on('data', hear)
  })
}
