import PgBoss from 'pg-boss'
import type { GroupTx, Statement } from '../group-transaction.ts'
import type { QueueName } from '../jobs/queues.ts'

/** Only used to write jobs through the caller's own transaction; it never connects by itself. */
const writer = new PgBoss({ db: { executeSql: () => Promise.reject(new Error('No transaction given')) } })

const WAKE: Statement = { name: 'wake-workers', text: `SELECT pg_notify('halyard_job', $1)` }

/** Queues a job in the transaction that causes it: it exists exactly when the change does, and wakes the workers then. */
export async function enqueue(tx: GroupTx, queue: QueueName, data: object = {}): Promise<void> {
  const executeSql = async (text: string, values: unknown[]) => ({
    rows: await tx.sql<Record<string, unknown>>({ name: `enqueue-job`, text }, values),
  })
  await Promise.all([
    writer.send(queue, { groupId: tx.groupId, ...data }, { db: { executeSql } }),
    tx.sql(WAKE, [queue]),
  ])
}
