import { inject } from 'vitest'
import { cloneDatabase, type TestDatabase } from '../../scripts/lib/clone-database.ts'
import { ensureDemoTemplate } from '../../scripts/lib/template-database.ts'

export type { TestDatabase } from '../../scripts/lib/clone-database.ts'

/** A migrated, empty database of the calling file's own: drop it in `afterAll`. */
export function createTestDatabase(): Promise<TestDatabase> {
  return cloneDatabase(inject('testPg'), inject('templateDatabase'))
}

/** The same with the demo group in it, as of today unless told; the first caller waits until it is loaded. */
export async function createDemoDatabase(asOf?: Date): Promise<TestDatabase> {
  const testPg = inject('testPg')
  return cloneDatabase(testPg, await ensureDemoTemplate(testPg, asOf))
}

/** A database without any schema, for tests of the migrations themselves. */
export function createEmptyDatabase(): Promise<TestDatabase> {
  return cloneDatabase(inject('testPg'))
}
