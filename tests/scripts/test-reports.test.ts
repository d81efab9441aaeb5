import { describe, expect, it } from 'vitest'
import { countExitCode, countPlaywright, countVitest } from '../../scripts/lib/test-reports.ts'

const vitestReport = (changes: object = {}) => ({
  numPassedTests: 3,
  numFailedTests: 0,
  numPendingTests: 0,
  numTodoTests: 0,
  testResults: [{ status: 'passed', assertionResults: [{ status: 'passed' }] }],
  ...changes,
})

const playwrightReport = (stats: object = {}, errors: unknown[] = []) => ({
  errors,
  stats: { expected: 4, unexpected: 0, flaky: 0, skipped: 0, ...stats },
})

describe('countExitCode', () => {
  it('counts a check as one', () => {
    expect(countExitCode({ exitCode: 0, report: undefined })).toEqual({ passed: 1, failed: 0 })
    expect(countExitCode({ exitCode: 2, report: undefined })).toEqual({ passed: 0, failed: 1 })
  })
})

describe('countVitest', () => {
  it('counts tests', () => {
    const report = vitestReport({ numFailedTests: 2 })
    expect(countVitest({ exitCode: 1, report })).toMatchObject({ passed: 3, failed: 2 })
  })

  it('counts a file that does not load as one failure', () => {
    const report = vitestReport({ testResults: [{ status: 'failed', assertionResults: [] }] })
    expect(countVitest({ exitCode: 1, report })).toMatchObject({ passed: 3, failed: 1 })
  })

  it('names the tests that failed and the files that do not load', () => {
    const assertionResults = [
      { status: 'passed', fullName: 'a kit opens' },
      { status: 'failed', fullName: 'a kit closes' },
    ]
    const testResults = [
      { name: 'kit.test.ts', status: 'failed', assertionResults },
      { name: 'item.test.ts', status: 'failed', assertionResults: [] },
    ]
    const report = vitestReport({ numFailedTests: 1, testResults })
    expect(countVitest({ exitCode: 1, report }).failures).toEqual(['a kit closes', 'item.test.ts'])
  })

  it('counts a skipped test as a failure', () => {
    const report = vitestReport({ numPendingTests: 1, numTodoTests: 1 })
    expect(countVitest({ exitCode: 0, report })).toMatchObject({ passed: 3, failed: 2 })
  })

  it('does not believe a runner that failed without a failed test', () => {
    expect(countVitest({ exitCode: 1, report: vitestReport() })).toMatchObject({ passed: 3, failed: 1 })
  })

  it.each([undefined, vitestReport({ numPassedTests: 0, testResults: [] })])(
    'counts a run without tests as a failure (%#)',
    (report) => expect(countVitest({ exitCode: 0, report })).toMatchObject({ passed: 0, failed: 1 }),
  )
})

describe('countPlaywright', () => {
  it('counts tests', () => {
    expect(countPlaywright({ exitCode: 0, report: playwrightReport() })).toEqual({
      passed: 4,
      failed: 0,
      failures: [],
    })
  })

  it('names what failed, on which screen', () => {
    const spec = (title: string, ok: boolean) => ({
      file: 'kit.ts',
      title,
      ok,
      tests: [{ projectName: 'phone' }],
    })
    const inner = { specs: [spec('opens a kit', false)] }
    const suites = [{ specs: [spec('closes a kit', true)], suites: [inner] }]
    const report = { ...playwrightReport({ unexpected: 1 }), suites }
    expect(countPlaywright({ exitCode: 1, report }).failures).toEqual(['kit.ts, phone: opens a kit'])
  })

  it('counts flaky, skipped and broken ones as failures', () => {
    const report = playwrightReport({ unexpected: 1, flaky: 1, skipped: 1 }, ['a file does not load'])
    expect(countPlaywright({ exitCode: 1, report })).toMatchObject({ passed: 4, failed: 4 })
  })
})
