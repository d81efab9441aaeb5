import { addMonths, type PlainDate } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'
import { doubtAbout, isAnswered, openRecall, type Doubt } from './doubt.ts'
import type { Moment } from './moment.ts'
import type { Evidence, RaisedCheck, Rule, TestFinding } from './types.ts'

/** What the record says about one check of one subject, on one band or as a whole. */
export interface Standing {
  /**
   * `good`: a passed result in date. `failed`: the newest result failed; it stays failed until tested anew.
   * `lapsed`: its day is over, or an event asked for a new test that did not come in time.
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

export interface Asked {
  readonly subjectId: string
  readonly procedures: readonly Procedure[]
  readonly rule: Rule | undefined
  /** Null: the subject as a whole. */
  readonly band: Band | null
  /** Whose raised checks count, where it is not `band`. */
  readonly raisedOn?: Band
  /** A failure that leaves something to go with (fewer watts) speaks for it only while it is in date. */
  readonly failureLapses?: boolean
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

const EMPTY: Standing = {
  state: 'never',
  test: null,
  finding: null,
  doubt: null,
  raised: null,
  dueOn: null,
}

/** Judges a check by its newest result that is not in doubt; a doubted failure still stands against a pass. */
export function standingOf(moment: Moment, asked: Asked): Standing {
  let doubted: Standing | undefined
  for (const candidate of candidates(moment, asked)) {
    const doubt = doubtAbout(moment, candidate.test, asked.band)
    if (!doubt) {
      const standing = standingOfTest(moment, asked, candidate)
      return standing.state === 'lapsed' ? (doubted ?? standing) : standing
    }
    doubted ??= { ...EMPTY, state: 'in-doubt', ...candidate, doubt }
    if (candidate.finding.finding === 'fail') break
  }
  return doubted ?? untestedStanding(moment, asked)
}

function standingOfTest(moment: Moment, asked: Asked, { test, finding }: Candidate): Standing {
  const dueOn = dueOf(test, asked.rule)
  const base = { ...EMPTY, test, finding, dueOn }
  const failed = finding.finding === 'fail'
  if (failed && !asked.failureLapses) return { ...base, state: 'failed' }
  const raised = lateRaisedCheck(moment, asked)
  if (raised) return { ...base, state: 'lapsed', raised }
  if (hasPassed(moment, dueOn)) return { ...base, state: 'lapsed' }
  return { ...base, state: failed ? 'failed' : 'good' }
}

/** Never tested, and perhaps recalled or asked for by an event. */
function untestedStanding(moment: Moment, asked: Asked): Standing {
  const recall = asked.procedures
    .map((procedure) => openRecall(moment, asked.subjectId, procedure, asked.band))
    .find((check) => check !== undefined)
  if (recall) return { ...EMPTY, state: 'in-doubt', doubt: { kind: 'recall', check: recall } }
  return { ...EMPTY, raised: lateRaisedCheck(moment, asked) ?? null }
}

/** A raised check of this subject and procedure whose day has passed without an answer. */
export function lateRaisedCheck(
  moment: Moment,
  asked: Pick<Asked, 'subjectId' | 'procedures' | 'band' | 'raisedOn'>,
): RaisedCheck | undefined {
  return openRaisedChecks(moment, asked.subjectId, asked.raisedOn ?? asked.band).find(
    (check) => asked.procedures.includes(check.procedure) && hasPassed(moment, check.dueOn),
  )
}

/** Raised checks that ask about this band, or about the subject where no band is named. */
export function openRaisedChecks(moment: Moment, subjectId: string, band: Band | null): RaisedCheck[] {
  return moment.state.raisedChecks.filter(
    (check) =>
      check.subjectId === subjectId &&
      check.raisedAt <= moment.at &&
      (check.band === null || band === null || check.band === band) &&
      !isAnswered(moment, check, band),
  )
}

/** Counted from the test itself, never from the last due date. Null: the rule asks on events only. */
export function dueOf(test: Evidence, rule: Rule | undefined): PlainDate | null {
  return rule?.intervalMonths ? addMonths(test.performedOn, rule.intervalMonths) : null
}

/** The due day itself is still in date. */
export function hasPassed(moment: Moment, dueOn: PlainDate | null): boolean {
  return dueOn !== null && moment.passedAt(dueOn) <= moment.at
}

const RANK = { pass: 0, marginal: 1, fail: 2 } as const

/** The worst of what a test found about a band (or about anything, when no band is asked). */
function worstFinding(test: Evidence, band: Band | null): TestFinding | undefined {
  let worst: TestFinding | undefined
  for (const finding of test.findings) {
    if (band !== null && finding.band !== null && finding.band !== band) continue
    if (!worst || RANK[finding.finding] > RANK[worst.finding]) worst = finding
  }
  return worst
}
