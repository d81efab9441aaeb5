import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { startChild } from './child.ts'
import { root, stateFolder } from './paths.ts'
import { treeHash } from './tree-hash.ts'

/** Everything that decides what the built client looks like. */
const SOURCES = [
  'index.html',
  'src',
  'shared',
  'vite.config.ts',
  'scripts/lib/vite-chunks.ts',
  'scripts/lib/vite-plugins.ts',
  'tsconfig.base.json',
  'package-lock.json',
]

/** Inside the build, so that both come and go together. */
export const STAMP = '.sources'

export function sourcesHash(): string {
  return treeHash(root, SOURCES)
}

export function isBuilt(): boolean {
  const stamp = join(root, 'dist', STAMP)
  return existsSync(stamp) && readFileSync(stamp, 'utf8') === sourcesHash()
}

/** Builds `dist` unless these very sources are built already. Builds side by side wait for each other. */
export async function buildClient(): Promise<'built' | 'kept'> {
  if (isBuilt()) return 'kept'
  console.log('Building the client')
  const builder = ['node', '--import', 'tsx', join(root, 'scripts/lib/build.ts')]
  const build = startChild('flock', ['--no-fork', join(stateFolder, 'build.lock'), ...builder], {
    cwd: root,
    env: { ...process.env, NODE_ENV: 'production' },
  })
  if ((await build.ended) !== 0) throw new Error('The client does not build: see above.')
  return 'built'
}
