import { createHash } from 'node:crypto'
import { readdirSync, readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'

/** One hash over the names and contents of files and folders, so that work on unchanged sources can be skipped. */
export function treeHash(base: string, paths: readonly string[]): string {
  const hash = createHash('sha256')
  for (const path of paths) {
    for (const file of filesUnder(base, path)) {
      const content = readFileSync(join(base, file))
      hash.update(`${file}\0${content.length}\0`).update(content)
    }
  }
  return hash.digest('hex')
}

/** Sorted, so that the order of the disk does not matter; nothing for what does not exist. */
function filesUnder(base: string, path: string): string[] {
  const found = statSync(join(base, path), { throwIfNoEntry: false })
  if (!found) return []
  if (!found.isDirectory()) return [path]
  return readdirSync(join(base, path))
    .sort()
    .flatMap((name) => filesUnder(base, join(path, name)))
}
