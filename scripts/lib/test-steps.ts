import { join } from 'node:path'
import { root, stateFolder } from './paths.ts'
import { countExitCode, countPlaywright, countVitest, type ReadReport } from './test-reports.ts'

export const PARTS = ['checks', 'unit', 'api', 'browser'] as const
export type Part = (typeof PARTS)[number]

/** One line of the summary: a command, and how its outcome is counted. */
export interface Step {
  part: Part
  name: string
  command: string
  args: readonly string[]
  count: ReadReport
}

const bin = (name: string) => join(root, 'node_modules/.bin', name)
const script = (name: string) => ['--import', 'tsx', join(root, 'scripts/lib', name)]

const check = (name: string, command: string, args: readonly string[]): Step => {
  return { part: 'checks', name, command, args, count: countExitCode }
}

const vitest = (part: 'unit' | 'api', name: string): Step => ({
  part,
  name,
  command: bin('vitest'),
  args: ['run', '--project', part, '--reporter=default', '--reporter=json', '--outputFile.json=REPORT'],
  count: countVitest,
})

/** Made once, so that no API or browser test waits for it; part of every run that has a PostgreSQL. */
export const DEMO_STEP: Step = check('Demo group loads', 'node', script('make-templates.ts'))

/** The long ones first, so that two lanes end at about the same time. REPORT stands for the step's report file. */
export const STEPS: readonly Step[] = [
  check('Types of every project reference', 'flock', [
    '--no-fork',
    join(stateFolder, 'types.lock'),
    bin('vue-tsc'),
    '--build',
  ]),
  check('Lint and import directions', bin('eslint'), ['.', '--max-warnings', '0']),
  check('Formatting', bin('prettier'), ['--check', '.']),
  check('Production build and its size', 'node', script('size-check.ts')),
  check('Licences', 'node', script('licence-check.ts')),
  vitest('api', 'API tests on PostgreSQL'),
  vitest('unit', 'Unit tests'),
  {
    part: 'browser',
    name: 'Browser tests',
    command: bin('playwright'),
    args: ['test', '--config', 'tests/browser/playwright.config.ts', '--reporter=list,json'],
    count: countPlaywright,
  },
]
