// What scripts/test does once Node and the npm packages are there: `test.ts [checks] [unit] [api] [browser]`.
import { mkdirSync, readdirSync, rmSync } from 'node:fs'
import { join, relative } from 'node:path'
import { isAlive } from './child.ts'
import { Ending } from './ending.ts'
import { root } from './paths.ts'
import { runStep, type Run, type Tally } from './run-step.ts'
import { startTestCluster } from './test-cluster.ts'
import { DEMO_STEP, PARTS, STEPS, type Part, type Step } from './test-steps.ts'

const asked = process.argv.slice(2) as Part[]
const parts = new Set<Part>(asked.length > 0 ? asked : PARTS)
const ending = new Ending()
const folder = join(root, 'test-results', String(process.pid))

/** What would point a test at a real server, or change what it sees. */
const NOT_FOR_TESTS = [
  'DATABASE_URL',
  'DATABASE_OWNER_URL',
  'SMTP_URL',
  'PUBLIC_URL',
  'PORT',
  'HOST',
  'LOG_LEVEL',
]

async function test(): Promise<number> {
  removeOldReports()
  mkdirSync(folder, { recursive: true })
  const testPg = await openCluster()
  const run: Run = { folder, env: testEnvironment(testPg), ending }
  const steps = STEPS.filter(({ part }) => parts.has(part))
  const together = steps.filter(({ part }) => part !== 'browser')
  const tallies = await runTogether(testPg ? [DEMO_STEP, ...together] : together, run)
  // Alone: its two browsers need both cores, and what they wait for is on a clock.
  for (const step of steps.filter(({ part }) => part === 'browser')) tallies.push(await runStep(step, run))
  return ending.hasBegun ? 1 : report(tallies)
}

/** Of runs that have ended; one that still goes on beside us keeps its own. */
function removeOldReports(): void {
  const reports = join(root, 'test-results')
  mkdirSync(reports, { recursive: true })
  const ended = readdirSync(reports).filter((name) => /^\d+$/.test(name) && !isAlive(Number(name)))
  for (const name of ended) rmSync(join(reports, name), { recursive: true, force: true })
}

/** API and browser tests share one cluster; the other parts need none. */
async function openCluster(): Promise<string | undefined> {
  if (!parts.has('api') && !parts.has('browser')) return undefined
  const { ownerUrl, appUrl, stop } = await startTestCluster()
  await ending.add(stop)
  return JSON.stringify({ ownerUrl, appUrl })
}

function testEnvironment(testPg: string | undefined): NodeJS.ProcessEnv {
  const kept = Object.entries(process.env).filter(([name]) => !NOT_FOR_TESTS.includes(name))
  return {
    ...Object.fromEntries(kept),
    ...(testPg && { HALYARD_TEST_PG: testPg }),
    HALYARD_TEST_OUTPUT: folder,
  }
}

/** Two at a time: the machine it must run on has two cores. */
async function runTogether(steps: readonly Step[], run: Run): Promise<Tally[]> {
  const waiting = [...steps]
  const tallies: Tally[] = []
  const lane = async () => {
    for (let step = waiting.shift(); step; step = waiting.shift()) tallies.push(await runStep(step, run))
  }
  await Promise.all([lane(), lane()])
  return tallies
}

/** What failed is named again at the end, after all that the steps said. The last line is what machines read. */
function report(tallies: readonly Tally[]): number {
  const sum = (count: (tally: Tally) => number) => tallies.reduce((total, tally) => total + count(tally), 0)
  const failed = sum((tally) => tally.failed)
  if (failed === 0) rmSync(folder, { recursive: true, force: true })
  else console.log(`Reports and pictures of what failed: ${relative(root, folder)}`)
  for (const failure of tallies.flatMap(({ failures }) => failures)) console.log(`FAILED ${failure}`)
  console.log(`${sum((tally) => tally.passed)} passed, ${failed} failed`)
  return failed === 0 ? 0 : 1
}

ending.onSignals((signal) => (signal === 'SIGINT' ? 130 : 143))
const code = await test().catch((error: unknown) => {
  if (!ending.hasBegun) console.error(error instanceof Error ? error.message : error)
  return 1
})
await ending.run()
process.exit(code)
