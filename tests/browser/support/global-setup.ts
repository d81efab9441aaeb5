import { execFileSync } from 'node:child_process'
import { buildPart } from '../../../scripts/lib/built-parts.ts'
import { root } from '../../../scripts/lib/paths.ts'
import { openTestCluster } from '../../../scripts/lib/test-cluster.ts'

/** The built product, one PostgreSQL and its templates for all browser tests; workers read them from the environment. */
export default async function globalSetup(): Promise<() => Promise<void>> {
  const { ownerUrl, appUrl, stop } = await openTestCluster()
  try {
    process.env.HALYARD_TEST_PG = JSON.stringify({ ownerUrl, appUrl })
    await buildPart('client')
    await buildPart('server')
    process.env.HALYARD_TEST_TEMPLATES = makeTemplates()
  } catch (error) {
    await stop()
    throw error
  }
  return stop
}

/** In a process of its own: the server's sources are read by tsx, not by the browser tests' own loader. */
function makeTemplates(): string {
  const program = ['--import', 'tsx', 'scripts/lib/make-templates.ts']
  const output = execFileSync('node', program, {
    cwd: root,
    encoding: 'utf8',
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  return output.trim().split('\n').at(-1) ?? ''
}
