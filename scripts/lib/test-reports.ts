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
  /** The names of what failed, where the report has them. */
  failures?: string[]
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
  testResults: { name: string; status: string; assertionResults: { status: string; fullName: string }[] }[]
}

export function countVitest({ exitCode, report }: Outcome): Counts {
  if (!report) return noReport()
  const { numPassedTests, numFailedTests, numPendingTests, numTodoTests, testResults } =
    report as VitestReport
  // A file that does not load, or whose hooks fail, has no failed test of its own.
  const brokenFiles = testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && assertionResults.every((assertion) => assertion.status !== 'failed'),
  )
  const failures = testResults.flatMap(({ assertionResults }) =>
    assertionResults.filter(({ status }) => status === 'failed').map(({ fullName }) => fullName),
  )
  return strict({
    exitCode,
    passed: numPassedTests,
    failed: numFailedTests + brokenFiles.length,
    skipped: numPendingTests + numTodoTests,
    failures: [...failures, ...brokenFiles.map(({ name }) => name)],
  })
}

interface PlaywrightSuite {
  suites?: PlaywrightSuite[]
  specs: { title: string; file: string; ok: boolean; tests: { projectName: string }[] }[]
}

interface PlaywrightReport {
  errors: unknown[]
  suites?: PlaywrightSuite[]
  stats: { expected: number; unexpected: number; flaky: number; skipped: number }
}

export function countPlaywright({ exitCode, report }: Outcome): Counts {
  if (!report) return noReport()
  const { errors, suites = [], stats } = report as PlaywrightReport
  const failed = stats.unexpected + stats.flaky + errors.length
  const failures = suites.flatMap(failedSpecs)
  return strict({ exitCode, passed: stats.expected, failed, skipped: stats.skipped, failures })
}

function failedSpecs({ suites = [], specs }: PlaywrightSuite): string[] {
  const own = specs
    .filter(({ ok }) => !ok)
    .map(
      ({ file, title, tests }) => `${file}, ${tests.map(({ projectName }) => projectName).join()}: ${title}`,
    )
  return [...own, ...suites.flatMap(failedSpecs)]
}

interface Tests {
  exitCode: number
  passed: number
  failed: number
  skipped: number
  failures: string[]
}

/** A test that does not run proves nothing; neither does a runner that failed and says of nothing that it did. */
function strict({ exitCode, passed, failed, skipped, failures }: Tests): Counts {
  if (skipped > 0)
    return { passed, failed: failed + skipped, remark: `${skipped} tests were skipped.`, failures }
  if (passed + failed === 0) return { passed, failed: 1, remark: 'No test ran.' }
  if (exitCode !== 0 && failed === 0) {
    return {
      passed,
      failed: 1,
      remark: `Every test passed, but the runner failed with exit code ${exitCode}.`,
    }
  }
  return { passed, failed, failures }
}

function noReport(): Counts {
  return { passed: 0, failed: 1, remark: 'The runner left no report.' }
}
