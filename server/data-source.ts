import 'reflect-metadata'
import pg from 'pg'
import { DataSource } from 'typeorm'
import { entities } from './entities/index.ts'
import { prepareQueues } from './jobs/prepare-queues.ts'
import { migrations } from './migrations/index.ts'

/** Any number will do, as long as every process takes the same one. */
const MIGRATION_LOCK = 7_205_418_833

interface PoolSettings {
  url: string
  size: number
}

/**
 * The application's pool. Every connection works as `halyard_app`, whoever signed in, so that row-level security
 * holds; time-outs keep a frozen database from freezing us (promises F7).
 */
export function createDataSource({ url, size }: PoolSettings): DataSource {
  return new DataSource({
    type: 'postgres',
    url,
    entities,
    migrations,
    synchronize: false,
    logging: false,
    poolSize: size,
    connectTimeoutMS: 3000,
    // The client's own pool errors are handled by TypeORM's listener; a lost connection is replaced at the next use.
    poolErrorHandler: () => undefined,
    extra: {
      pipeline: true,
      options: '-c role=halyard_app',
      application_name: 'halyard',
      statement_timeout: 5000,
      lock_timeout: 2000,
      idle_in_transaction_session_timeout: 10_000,
      query_timeout: 6000,
      keepAlive: true,
    },
  })
}

/**
 * Brings the schema up to date as the owner. Two servers starting at once wait for each other: TypeORM takes no lock
 * of its own, and the second start would fail.
 */
export async function migrate(ownerUrl: string): Promise<void> {
  const lock = new pg.Client({ connectionString: ownerUrl, connectionTimeoutMillis: 5000 })
  // Without a listener a lost connection would end the process; the failing statement says so anyway.
  lock.on('error', () => undefined)
  await lock.connect()
  const source = new DataSource({ type: 'postgres', url: ownerUrl, entities: [], migrations, poolSize: 2 })
  try {
    await lock.query('SELECT pg_advisory_lock($1)', [MIGRATION_LOCK])
    await source.initialize()
    await source.runMigrations({ transaction: 'each' })
    await prepareQueues(ownerUrl, lock)
  } finally {
    if (source.isInitialized) await source.destroy()
    await lock.end()
  }
}
