// Builds the client for production, where these sources are not built yet, and weighs the first load of the board.
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { buildPart } from './built-parts.ts'
import { root } from './paths.ts'
import { BUDGET, firstLoad, measure, packedBytes, type Manifest } from './size-budget.ts'

const BOARD_VIEW = 'src/views/BoardView.vue'

await buildPart('client')
const dist = join(root, 'dist')
const manifest = JSON.parse(readFileSync(join(dist, '.vite/manifest.json'), 'utf8')) as Manifest
const load = firstLoad(manifest, BOARD_VIEW)
const size = measure(dist, load)
const total = size.scriptBytes + size.styleBytes + size.fontBytes + size.pageBytes
const kiB = (bytes: number) => Math.round((bytes / 1024) * 10) / 10

for (const file of [...load.scripts, ...load.styles]) {
  console.log(`${kiB(packedBytes(dist, file))} KiB ${file}`)
}
console.log(`Scripts ${kiB(size.scriptBytes)} KiB of ${BUDGET.scriptKiB}`)
console.log(
  `Styles ${kiB(size.styleBytes)} KiB, fonts ${kiB(size.fontBytes)} KiB, page ${kiB(size.pageBytes)} KiB`,
)
console.log(`All ${kiB(total)} KiB of ${BUDGET.totalKiB}`)
process.exit(kiB(size.scriptBytes) <= BUDGET.scriptKiB && kiB(total) <= BUDGET.totalKiB ? 0 : 1)
