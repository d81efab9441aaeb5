import type { BenchProduct } from './bench-product.ts'
import { compare, load, type Target } from './load.ts'
import type { BenchRow } from './report.ts'
import { BENCH_GROUP, BENCH_MEMBER } from './thousand-kits.ts'
import { walBytes } from './wal.ts'

const SIZE = { clients: 8, requests: 800, rounds: 7 }

/** R1, R2, R4 and R5: the board page of a group with 1,000 kits. */
export async function benchBoard(product: BenchProduct): Promise<BenchRow[]> {
  const headers = await product.signedIn(BENCH_MEMBER, BENCH_GROUP)
  const board = (extra: Record<string, string> = {}): Target => ({
    url: product.url,
    pid: product.pid,
    headers: { ...headers, ...extra },
    next: () => ({ path: '/api/v1/board' }),
  })
  const floor = (path: string): Target => ({
    url: product.floorUrl,
    pid: product.floorPid,
    next: () => ({ path }),
  })

  const packed = await compare(board({ 'Accept-Encoding': 'gzip' }), floor('/board'), SIZE)
  const plain = await compare(board(), floor('/slim'), SIZE)
  const etag = await etagOf(product, headers)
  const unchanged = await compare(board({ 'If-None-Match': etag }), floor('/board'), SIZE)
  const wal = await walBytes(product.database.ownerUrl, async () => {
    await load(board(), { clients: 1, requests: 1000 })
  })
  const ms = (value: number) => `${value.toFixed(1)} ms`
  const row = (
    id: string,
    what: string,
    values: Pick<BenchRow, 'measured' | 'floor' | 'ratio' | 'goal'>,
  ) => ({ id, what, ...values })
  return [
    row('R1', 'board, gzip, p50', {
      measured: ms(packed.product.p50Ms),
      floor: ms(packed.floor.p50Ms),
      ratio: packed.p50,
      goal: '<= 1.0x (a)',
    }),
    row('R1', 'board, gzip, p95', {
      measured: ms(packed.product.p95Ms),
      floor: ms(packed.floor.p95Ms),
      ratio: packed.p95,
      goal: '<= 1.25x (a)',
    }),
    row('R1', 'board, gzip, Node CPU', {
      measured: `${packed.product.cpuUs.toFixed(0)} us`,
      floor: `${packed.floor.cpuUs.toFixed(0)} us`,
      ratio: packed.cpu,
      goal: '<= 1.35x (a)',
    }),
    row('R2', 'board, plain, p50', {
      measured: ms(plain.product.p50Ms),
      floor: ms(plain.floor.p50Ms),
      ratio: plain.p50,
      goal: '<= 1.75x a_slim',
    }),
    row('R2', 'board, plain, Node CPU', {
      measured: `${plain.product.cpuUs.toFixed(0)} us`,
      floor: `${plain.floor.cpuUs.toFixed(0)} us`,
      ratio: plain.cpu,
      goal: '<= 1.9x a_slim',
    }),
    row('R4', 'board not changed, p50', {
      measured: ms(unchanged.product.p50Ms),
      floor: ms(unchanged.floor.p50Ms),
      ratio: unchanged.p50,
      goal: '<= 0.33x (a)',
    }),
    row('R5', 'WAL of 1,000 GETs', {
      measured: `${(wal / 1024).toFixed(1)} KiB`,
      floor: '',
      ratio: null,
      goal: '<= 16 KiB',
    }),
  ]
}

async function etagOf(product: BenchProduct, headers: Record<string, string>): Promise<string> {
  const response = await fetch(`${product.url}/api/v1/board`, { headers })
  await response.arrayBuffer()
  return response.headers.get('ETag') ?? ''
}
