import { randomBytes } from 'node:crypto'
import { clusterFolder } from '../../scripts/lib/cluster-folder.ts'
import { startCluster, type Cluster } from '../../scripts/lib/cluster.ts'
import { removeCluster, removeLeftovers } from '../../scripts/lib/test-cluster.ts'

/**
 * A PostgreSQL of the test's own, to stop, crash and freeze: the shared one serves every other test. Its database
 * `halyard` is empty; it keeps its data and its port through `stop` and `start`.
 */
export interface OwnCluster {
  /** Where its files are. */
  readonly folder: string
  /** The running cluster; a new one after each `start`. */
  readonly now: Cluster
  start(): Promise<void>
  /** `immediate` is a crash. */
  stop(how?: 'fast' | 'immediate'): Promise<void>
  /** Stops it and removes its files. */
  remove(): Promise<void>
}

/** Takes about two seconds; `settings` are PostgreSQL's own, such as `fsync: 'off'`. */
export async function startOwnCluster(settings?: Readonly<Record<string, string>>): Promise<OwnCluster> {
  await removeLeftovers()
  const name = `test-${process.pid}-${randomBytes(3).toString('hex')}`
  const folder = clusterFolder(name)
  let cluster = await startCluster({ folder, settings })
  const { port } = cluster
  return {
    folder,
    get now() {
      return cluster
    },
    start: async () => {
      cluster = await startCluster({ folder, settings, port })
    },
    stop: (how) => cluster.stop(how),
    remove: async () => {
      await cluster.stop()
      removeCluster(name)
    },
  }
}
