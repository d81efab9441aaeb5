import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { startChild } from './child.ts'
import { root, stateFolder } from './paths.ts'
import { treeHash } from './tree-hash.ts'

interface BuiltPart {
  /** Where it stands, below the project's folder. */
  readonly folder: string
  /** Everything that decides what it looks like. */
  readonly sources: readonly string[]
  /** What `vite build` needs to know besides its configuration file. */
  readonly ssr?: string
}

const COMMON = [
  'shared',
  'vite.config.ts',
  'scripts/lib/vite-chunks.ts',
  'scripts/lib/vite-plugins.ts',
  'tsconfig.base.json',
  'package-lock.json',
]

export const BUILT_PARTS = {
  client: { folder: 'dist', sources: ['index.html', 'src', ...COMMON] },
  server: { folder: 'dist-server', sources: ['server', ...COMMON], ssr: 'server/main.ts' },
} as const satisfies Record<string, BuiltPart>

export type PartName = keyof typeof BUILT_PARTS

/** Inside the build, so that both come and go together. */
export const STAMP = '.sources'

export function sourcesHash(part: BuiltPart): string {
  return treeHash(root, part.sources)
}

export function isBuilt(part: BuiltPart): boolean {
  const stamp = join(root, part.folder, STAMP)
  return existsSync(stamp) && readFileSync(stamp, 'utf8') === sourcesHash(part)
}

/** Builds a part unless these very sources are built already. Builds side by side wait for each other. */
export async function buildPart(name: PartName): Promise<void> {
  if (isBuilt(BUILT_PARTS[name])) return
  console.log(`Building the ${name}`)
  const builder = ['node', '--import', 'tsx', join(root, 'scripts/lib/build.ts'), name]
  const build = startChild('flock', ['--no-fork', join(stateFolder, 'build.lock'), ...builder], {
    cwd: root,
    env: { ...process.env, NODE_ENV: 'production' },
  })
  if ((await build.ended) !== 0) throw new Error(`The ${name} does not build: see above.`)
}
