import type { TestFinding } from '#shared/engine/readiness/types.ts'
import type { FindingWord } from '#shared/engine/vocabulary.ts'

export type FindingPart = Partial<TestFinding> & Pick<TestFinding, 'measure'>

export function aFinding(part: FindingPart): TestFinding {
  return {
    band: null,
    finding: 'pass',
    value: null,
    uncertainty: null,
    powerW: null,
    positionId: null,
    limit: '',
    text: '',
    ...part,
  }
}

/** Passes at the limit itself: a limit is the last good value. */
export const atMost = (value: number, limit: number): FindingWord => (value <= limit ? 'pass' : 'fail')
export const atLeast = (value: number, limit: number): FindingWord => (value >= limit ? 'pass' : 'fail')

export function worst(findings: readonly TestFinding[]): FindingWord {
  const words = findings.map(({ finding }) => finding)
  if (words.includes('fail')) return 'fail'
  return words.includes('marginal') ? 'marginal' : 'pass'
}
