import type { Pool } from 'pg'
import type { DataSource } from 'typeorm'

/**
 * TypeORM's own pool, for statements outside a group: sessions, the job queue, look-ups before a group is known.
 * Rows of a group are reached through `inGroup` only.
 */
export function poolOf(db: DataSource): Pool {
  return (db.driver as unknown as { master: Pool }).master
}
