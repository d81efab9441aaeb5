// Builds the client beside its place and swaps it in when whole. Run by build-client.ts, under its lock.
import { existsSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { build } from 'vite'
import { isBuilt, sourcesHash, STAMP } from './build-client.ts'
import { root, stateFolder } from './paths.ts'

if (!isBuilt()) {
  const dist = join(root, 'dist')
  const draft = join(stateFolder, 'dist.new')
  const old = join(stateFolder, 'dist.old')
  const hash = sourcesHash()
  await build({ root, logLevel: 'error', build: { outDir: draft, emptyOutDir: true } })
  writeFileSync(join(draft, STAMP), hash)
  rmSync(old, { recursive: true, force: true })
  if (existsSync(dist)) renameSync(dist, old)
  renameSync(draft, dist)
  rmSync(old, { recursive: true, force: true })
}
