import { createHash } from 'node:crypto'
import { fileURLToPath } from 'node:url'
import { join } from 'node:path'

/** The folder of this clone, without a slash at the end. */
export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/+$/, '')

/** Everything the scripts keep: git-ignored, and removed by hand to start afresh. */
export const stateFolder = join(root, '.halyard')

/** Where PostgreSQL's own user keeps its files when it cannot reach the clone: one named folder per clone. */
export function outsideFolder(clone: string = root): string {
  const hash = createHash('sha256').update(clone).digest('hex').slice(0, 12)
  return `/var/tmp/halyard-${hash}`
}
