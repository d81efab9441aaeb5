// Builds one part beside its place and swaps it in when whole: `build.ts client|server`. Run by built-parts.ts, under its lock.
import { existsSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { build } from 'vite'
import { BUILT_PARTS, isBuilt, sourcesHash, STAMP, type PartName } from './built-parts.ts'
import { root, stateFolder } from './paths.ts'

const part = BUILT_PARTS[process.argv[2] as PartName]

if (!isBuilt(part)) {
  const place = join(root, part.folder)
  const draft = join(stateFolder, `${part.folder}.new`)
  const old = join(stateFolder, `${part.folder}.old`)
  const hash = sourcesHash(part)
  const ssr = 'ssr' in part ? part.ssr : false
  await build({ root, logLevel: 'error', build: { outDir: draft, emptyOutDir: true, ssr } })
  writeFileSync(join(draft, STAMP), hash)
  rmSync(old, { recursive: true, force: true })
  if (existsSync(place)) renameSync(place, old)
  renameSync(draft, place)
  rmSync(old, { recursive: true, force: true })
}
