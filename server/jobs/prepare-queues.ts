import PgBoss from 'pg-boss'
import type pg from 'pg'
import { DEAD_LETTER, QUEUES } from './queues.ts'

/**
 * Makes the job tables and queues as the owner: queues are partitions, which the application's role may not create.
 * Safe to run at every start; the caller holds the migration lock.
 */
export async function prepareQueues(ownerUrl: string, owner: pg.Client): Promise<void> {
  const boss = new PgBoss({ connectionString: ownerUrl, max: 1, supervise: false, schedule: false })
  boss.on('error', () => undefined)
  await boss.start()
  try {
    const known = new Set((await boss.getQueues()).map((queue) => queue.name))
    if (!known.has(DEAD_LETTER)) await boss.createQueue(DEAD_LETTER, { name: DEAD_LETTER })
    for (const [name, options] of Object.entries(QUEUES)) {
      const queue = { name, ...options, deadLetter: DEAD_LETTER }
      if (known.has(name)) await boss.updateQueue(name, queue)
      else await boss.createQueue(name, queue)
    }
  } finally {
    await boss.stop({ graceful: false, wait: true })
  }
  await owner.query(`
    GRANT USAGE ON SCHEMA pgboss TO halyard_app;
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA pgboss TO halyard_app;
    GRANT EXECUTE ON ALL FUNCTIONS IN SCHEMA pgboss TO halyard_app;
    REVOKE EXECUTE ON FUNCTION pgboss.create_queue(text, json), pgboss.delete_queue(text) FROM halyard_app, PUBLIC;`)
}
