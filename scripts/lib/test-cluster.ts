import { readdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { isAlive } from './child.ts'
import { clusterFolder } from './cluster-folder.ts'
import { startCluster } from './cluster.ts'
import { outsideFolder, stateFolder } from './paths.ts'
import { endLeftoverPostmaster } from './postmaster.ts'

/** The PostgreSQL that tests use: addresses of its `postgres` database for the two roles. */
export interface TestPg {
  ownerUrl: string
  appUrl: string
}

export interface TestCluster extends TestPg {
  stop(): Promise<void>
}

/** The cluster named by HALYARD_TEST_PG (JSON: `ownerUrl`, `appUrl`), else one of our own that ends with us. */
export async function openTestCluster(): Promise<TestCluster> {
  const given = process.env.HALYARD_TEST_PG
  if (given) return { ...(JSON.parse(given) as TestPg), stop: () => Promise.resolve() }
  return startTestCluster()
}

/** A fresh cluster whose folder is gone when it stops. */
export async function startTestCluster(): Promise<TestCluster> {
  await removeLeftovers()
  const name = `test-${process.pid}`
  const cluster = await startCluster({ folder: clusterFolder(name) })
  return {
    ownerUrl: cluster.url('owner', 'postgres'),
    appUrl: cluster.url('app', 'postgres'),
    stop: async () => {
      await cluster.stop()
      removeCluster(name)
    },
  }
}

/** Removes what a stopped cluster called `name` left on the disk. */
export function removeCluster(name: string): void {
  for (const parent of [stateFolder, outsideFolder()]) removeFolder(join(parent, name))
}

/** The same address with another database. */
export function withDatabase(url: string, database: string): string {
  const changed = new URL(url)
  changed.pathname = `/${database}`
  return changed.href
}

/** What runs that were killed with -9 left behind (`test-PID…`); one whose process lives is another run's. */
export async function removeLeftovers(): Promise<void> {
  for (const parent of [stateFolder, outsideFolder()]) {
    for (const name of namesIn(parent)) {
      const pid = /^test-(\d+)(-|$)/.exec(name)?.[1]
      if (pid === undefined || isAlive(Number(pid))) continue
      await endLeftoverPostmaster(join(parent, name, 'data'))
      removeFolder(join(parent, name))
    }
  }
}

function namesIn(folder: string): string[] {
  try {
    return readdirSync(folder)
  } catch {
    return []
  }
}

function removeFolder(folder: string): void {
  rmSync(folder, { recursive: true, force: true, maxRetries: 3 })
}
