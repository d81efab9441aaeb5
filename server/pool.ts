import type { Pool } from 'pg'
import type { DataSource } from 'typeorm'
import { AppError } from './errors.ts'

/** Beyond this many waiting for a connection the answer is 503 at once: a frozen database must not pile up work. */
const LONGEST_QUEUE = 200

/**
 * TypeORM's own pool, for statements outside a group: sessions, the job queue, look-ups before a group is known.
 * Rows of a group are reached through `inGroup` only.
 * @throws AppError `unavailable` before the first connection and while too many wait for one.
 */
export function poolOf(db: DataSource): Pool {
  const pool = (db.driver as unknown as { master: Pool | undefined }).master
  if (!pool) throw new AppError('unavailable', 'The database has not answered yet. Try again.')
  if (pool.waitingCount >= LONGEST_QUEUE)
    throw new AppError('unavailable', 'Too much is waiting. Try again in a moment.')
  return pool
}
