import { inject } from 'vitest'
import { cloneDatabase, type TestDatabase } from '../../scripts/lib/clone-database.ts'

export type { TestDatabase } from '../../scripts/lib/clone-database.ts'

/** A migrated, empty database of the calling file's own: drop it in `afterAll`. */
export function createTestDatabase(): Promise<TestDatabase> {
  return cloneDatabase(inject('testPg'), inject('templateDatabase'))
}

/** A database without any schema, for tests of the migrations themselves. */
export function createEmptyDatabase(): Promise<TestDatabase> {
  return cloneDatabase(inject('testPg'))
}
