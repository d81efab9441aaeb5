// Runs scripts/backup or scripts/restore on the local database: `with-local-database.ts running|stopped backup|restore FILE`.
import { join } from 'node:path'
import { startChild } from './child.ts'
import { clusterFolder } from './cluster-folder.ts'
import { attachCluster, startCluster, type Cluster } from './cluster.ts'
import { Ending } from './ending.ts'
import { root } from './paths.ts'
import { replaceDatabase } from './replace-database.ts'

const [found, work, file = ''] = process.argv.slice(2)
const ending = new Ending()

async function run(): Promise<number> {
  if (work === 'restore' && found === 'running') throw new Error('Stop scripts/start first (Ctrl-C there).')
  const cluster = await openCluster()
  if (work === 'backup') return runScript('backup', { DATABASE_BACKUP_URL: cluster.url('backup') })
  return replaceDatabase(cluster, () => runScript('restore', { DATABASE_OWNER_URL: cluster.url('owner') }))
}

async function openCluster(): Promise<Pick<Cluster, 'url'>> {
  const folder = clusterFolder('start-1')
  if (found === 'running') return attachCluster(folder)
  const cluster = await startCluster({ folder })
  await ending.add(() => cluster.stop())
  return cluster
}

async function runScript(name: string, env: NodeJS.ProcessEnv): Promise<number> {
  const child = startChild(join(root, 'scripts', name), [file], { env: { ...process.env, ...env } })
  await ending.add(() => child.stop())
  return child.ended
}

ending.onSignals(() => 130)
const code = await run().catch((error: unknown) => {
  if (!ending.hasBegun) console.error(error instanceof Error ? error.message : error)
  return 1
})
await ending.run()
process.exit(code)
