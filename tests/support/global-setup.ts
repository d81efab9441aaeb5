import type { TestProject } from 'vitest/node'
import { buildPart } from '../../scripts/lib/built-parts.ts'
import { ensureTemplate } from '../../scripts/lib/template-database.ts'
import { openTestCluster, type TestPg } from '../../scripts/lib/test-cluster.ts'

declare module 'vitest' {
  interface ProvidedContext {
    testPg: TestPg
    /** A migrated, empty database to clone from. */
    templateDatabase: string
  }
}

/** The built server, which some tests start as a process, one PostgreSQL and one migrated template for all API tests; each test file clones it. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const { ownerUrl, appUrl, stop } = await openTestCluster()
  try {
    await buildPart('server')
    project.provide('testPg', { ownerUrl, appUrl })
    project.provide('templateDatabase', await ensureTemplate({ ownerUrl, appUrl }))
  } catch (error) {
    await stop()
    throw error
  }
  return stop
}
