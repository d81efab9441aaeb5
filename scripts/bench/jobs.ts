import { v7 as uuidv7 } from 'uuid'
import { systemActor } from '#server/caller.ts'
import { inGroup } from '#server/group-transaction.ts'
import { queueMail } from '#server/services/queue-mail.ts'
import pg from 'pg'
import type { BenchProduct } from './bench-product.ts'
import { percentile, type BenchRow } from './report.ts'
import { BENCH_GROUP } from './thousand-kits.ts'

const MAILS = 40
/** The first ones pay for code that has not run and connections that are not open yet. */
const WARM_UP = 5

/** Q2: from the transaction that queues a mail until a worker of the product has taken it up. */
export async function benchJobs(product: BenchProduct): Promise<BenchRow[]> {
  const client = new pg.Client({ connectionString: product.database.ownerUrl })
  await client.connect()
  const times: number[] = []
  try {
    for (let n = 0; n < WARM_UP + MAILS; n += 1) {
      const began = performance.now()
      const id = await inGroup(product.ctx, { groupId: BENCH_GROUP, actor: systemActor('bench') }, (tx) =>
        queueMail(tx, { recipient: 'bench@example.org', subject: uuidv7(), text: 'x', html: 'x' }),
      )
      await untilTaken(client, id)
      if (n >= WARM_UP) times.push(performance.now() - began)
      await new Promise((resolve) => setTimeout(resolve, 37 * (n % 5)))
    }
  } finally {
    await client.end()
  }
  const p95 = percentile(times, 0.95)
  return [
    {
      id: 'Q2',
      what: 'job queued until its handler starts, p95',
      measured: `${p95.toFixed(0)} ms`,
      floor: '',
      ratio: null,
      goal: '<= 50 ms',
    },
  ]
}

async function untilTaken(client: pg.Client, id: string): Promise<void> {
  for (let tries = 0; tries < 2000; tries += 1) {
    const { rows } = await client.query<{ tries: number }>('SELECT tries FROM mail WHERE id = $1', [id])
    if ((rows[0]?.tries ?? 0) > 0) return
    await new Promise((resolve) => setTimeout(resolve, 5))
  }
  throw new Error('No worker took the mail within 10 s')
}
