import { addMonths, type PlainDate } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'
import { doubtAbout, isAnswered, type Doubt } from './doubt.ts'
import type { Moment } from './moment.ts'
import type { EpochMs, Evidence, RaisedCheck, Rule, TestFinding } from './types.ts'

/** What the record says about one check of one subject, on one band or as a whole. */
export interface Standing {
  /**
   * `good`: a passed result in date. `failed`: the newest result failed; it stays failed until tested anew.
   * `lapsed`: passed once, its day is over, or an event asked for a new test that did not come in time.
   */
  readonly state: 'good' | 'failed' | 'lapsed' | 'never' | 'in-doubt'
  readonly test: Evidence | null
  readonly finding: TestFinding | null
  readonly doubt: Doubt | null
  /** The raised check that lapsed, where an event and not the interval is the cause. */
  readonly raised: RaisedCheck | null
  /** Last day in date, by the interval. */
  readonly dueOn: PlainDate | null
}

interface Asked {
  readonly subjectId: string
  readonly procedures: readonly Procedure[]
  readonly rule: Rule | undefined
  /** Null: the subject as a whole. */
  readonly band: Band | null
}

export interface Candidate {
  readonly test: Evidence
  readonly finding: TestFinding
}

/** Results about a band, newest first: findings on the band itself and those about the whole. */
export function candidates(
  moment: Moment,
  asked: Pick<Asked, 'subjectId' | 'procedures' | 'band'>,
): Candidate[] {
  const found: Candidate[] = []
  for (const procedure of asked.procedures) {
    for (const test of moment.tests(asked.subjectId, procedure)) {
      if (test.recordedAt > moment.at) continue
      const finding = worstFinding(test, asked.band)
      if (finding) found.push({ test, finding })
    }
  }
  if (asked.procedures.length > 1) found.sort((a, b) => b.test.performedAt - a.test.performedAt)
  return found
}

/** Judges a check by its newest result that is not in doubt; a doubted failure still stands against a pass. */
export function standingOf(moment: Moment, asked: Asked): Standing {
  let firstDoubt: Standing | undefined
  for (const { test, finding } of candidates(moment, asked)) {
    const doubt = doubtAbout(moment, test, asked.band)
    if (!doubt) return standingOfTest(moment, asked, { test, finding })
    firstDoubt ??= { ...EMPTY, state: 'in-doubt', test, finding, doubt }
    if (finding.finding === 'fail') break
  }
  return firstDoubt ?? raisedStanding(moment, asked) ?? EMPTY
}

const EMPTY: Standing = { state: 'never', test: null, finding: null, doubt: null, raised: null, dueOn: null }

function standingOfTest(moment: Moment, asked: Asked, { test, finding }: Candidate): Standing {
  const dueOn = dueOf(test, asked.rule)
  const base = { ...EMPTY, test, finding, dueOn }
  if (finding.finding === 'fail') return { ...base, state: 'failed' }
  const raised = raisedAndLate(moment, asked)
  if (raised) return { ...base, state: 'lapsed', raised }
  return { ...base, state: dueOn !== null && moment.passedAt(dueOn) <= moment.at ? 'lapsed' : 'good' }
}

function raisedStanding(moment: Moment, asked: Asked): Standing | undefined {
  const raised = raisedAndLate(moment, asked)
  return raised && { ...EMPTY, raised }
}

/** A raised check of this subject and procedure whose day has passed without an answer. */
function raisedAndLate(moment: Moment, asked: Asked): RaisedCheck | undefined {
  return openRaisedChecks(moment, asked.subjectId).find(
    (check) =>
      asked.procedures.includes(check.procedure) &&
      (check.band === null || asked.band === null || check.band === asked.band) &&
      moment.passedAt(check.dueOn) <= moment.at,
  )
}

export function openRaisedChecks(moment: Moment, subjectId: string): RaisedCheck[] {
  return moment.state.raisedChecks.filter(
    (check) => check.subjectId === subjectId && check.raisedAt <= moment.at && !isAnswered(moment, check),
  )
}

/** Counted from the test itself, never from the last due date. Null: the rule asks on events only. */
export function dueOf(test: Evidence, rule: Rule | undefined): PlainDate | null {
  return rule?.intervalMonths ? addMonths(test.performedOn, rule.intervalMonths) : null
}

/** The instant at which a standing lapses if nobody does anything; null: never. */
export function lapsesAt(moment: Moment, standing: Standing): EpochMs | null {
  return standing.state === 'good' && standing.dueOn !== null ? moment.passedAt(standing.dueOn) : null
}

/** The worst of what a test found about a band (or about anything, when no band is asked). */
function worstFinding(test: Evidence, band: Band | null): TestFinding | undefined {
  let worst: TestFinding | undefined
  for (const finding of test.findings) {
    if (band !== null && finding.band !== null && finding.band !== band) continue
    if (!worst || RANK[finding.finding] > RANK[worst.finding]) worst = finding
  }
  return worst
}

const RANK = { pass: 0, marginal: 1, fail: 2 } as const
