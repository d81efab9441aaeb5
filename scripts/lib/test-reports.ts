/** What a step's command left behind. */
export interface Outcome {
  exitCode: number
  /** The parsed report file; undefined when there is none. */
  report: unknown
}

export interface Counts {
  passed: number
  failed: number
  /** Why it counts as failed, where the command's own output does not say it. */
  remark?: string
}

export type ReadReport = (outcome: Outcome) => Counts

/** A check that is not made of tests counts as one. */
export function countExitCode({ exitCode }: Outcome): Counts {
  return exitCode === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 }
}

interface VitestReport {
  numPassedTests: number
  numFailedTests: number
  numPendingTests: number
  numTodoTests: number
  testResults: { status: string; assertionResults: { status: string }[] }[]
}

export function countVitest({ exitCode, report }: Outcome): Counts {
  if (!report) return noReport()
  const { numPassedTests, numFailedTests, numPendingTests, numTodoTests, testResults } =
    report as VitestReport
  // A file that does not load, or whose hooks fail, has no failed test of its own.
  const brokenFiles = testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && assertionResults.every((assertion) => assertion.status !== 'failed'),
  ).length
  const failed = numFailedTests + brokenFiles
  return strict({ exitCode, passed: numPassedTests, failed, skipped: numPendingTests + numTodoTests })
}

interface PlaywrightReport {
  errors: unknown[]
  stats: { expected: number; unexpected: number; flaky: number; skipped: number }
}

export function countPlaywright({ exitCode, report }: Outcome): Counts {
  if (!report) return noReport()
  const { errors, stats } = report as PlaywrightReport
  const failed = stats.unexpected + stats.flaky + errors.length
  return strict({ exitCode, passed: stats.expected, failed, skipped: stats.skipped })
}

interface Tests {
  exitCode: number
  passed: number
  failed: number
  skipped: number
}

/** A test that does not run proves nothing; neither does a runner that failed and says of nothing that it did. */
function strict({ exitCode, passed, failed, skipped }: Tests): Counts {
  if (skipped > 0) return { passed, failed: failed + skipped, remark: `${skipped} tests were skipped.` }
  if (passed + failed === 0) return { passed, failed: 1, remark: 'No test ran.' }
  if (exitCode !== 0 && failed === 0) {
    return {
      passed,
      failed: 1,
      remark: `Every test passed, but the runner failed with exit code ${exitCode}.`,
    }
  }
  return { passed, failed }
}

function noReport(): Counts {
  return { passed: 0, failed: 1, remark: 'The runner left no report.' }
}
