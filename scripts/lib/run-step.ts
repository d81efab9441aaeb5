import { appendFileSync, closeSync, openSync, readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { startChild } from './child.ts'
import type { Ending } from './ending.ts'
import { root } from './paths.ts'
import type { Step } from './test-steps.ts'

export interface Run {
  /** Where logs and reports go. */
  folder: string
  env: NodeJS.ProcessEnv
  ending: Ending
}

export interface Tally {
  passed: number
  failed: number
  /** What to look for further up, a line each. */
  failures: string[]
}

/** A step that says nothing for so long hangs. How long it may take hangs on what else the machine does. */
const SILENCE_LIMIT_MS = 5 * 60_000

/** Runs one step, says in one line how it went, and prints what it said when something failed. */
export async function runStep(step: Step, run: Run): Promise<Tally> {
  if (run.ending.hasBegun) return { passed: 0, failed: 0, failures: [] }
  const slug = step.name.toLowerCase().replace(/\W+/g, '-')
  const reportPath = join(run.folder, `${slug}.json`)
  const logPath = join(run.folder, `${slug}.log`)
  const startedAt = Date.now()
  const exitCode = await runCommand({ step, run, reportPath, logPath })
  if (run.ending.hasBegun) return { passed: 0, failed: 0, failures: [] }
  const { passed, failed, remark, failures = [] } = step.count({ exitCode, report: readReport(reportPath) })
  const seconds = ((Date.now() - startedAt) / 1000).toFixed(1)
  console.log(
    `${failed === 0 ? 'ok    ' : 'FAILED'} ${step.name}: ${passed} passed, ${failed} failed (${seconds} s)`,
  )
  if (failed > 0) console.log(indent(readFileSync(logPath, 'utf8')))
  if (remark) console.log(indent(remark))
  return { passed, failed, failures: failed > 0 ? failures.map((name) => `${step.name}: ${name}`) : [] }
}

interface Command {
  step: Step
  run: Run
  reportPath: string
  logPath: string
}

async function runCommand({ step, run, reportPath, logPath }: Command): Promise<number> {
  const log = openSync(logPath, 'w')
  const child = startChild(
    step.command,
    step.args.map((arg) => arg.replace('REPORT', reportPath)),
    {
      cwd: root,
      env: { ...run.env, PLAYWRIGHT_JSON_OUTPUT_FILE: reportPath, NO_COLOR: '1' },
      stdio: ['ignore', log, log],
    },
  )
  closeSync(log)
  await run.ending.add(() => child.stop(5000))
  const watch = setInterval(() => {
    if (Date.now() - statSync(logPath).mtimeMs < SILENCE_LIMIT_MS) return
    appendFileSync(logPath, `\nNothing was said for ${SILENCE_LIMIT_MS / 60_000} minutes: it was stopped.\n`)
    void child.stop(5000)
  }, 10_000)
  const code = await child.ended
  clearInterval(watch)
  return code
}

function readReport(path: string): unknown {
  try {
    return JSON.parse(readFileSync(path, 'utf8'))
  } catch {
    return undefined
  }
}

function indent(text: string): string {
  return text.trimEnd().replace(/^/gm, '    ')
}
