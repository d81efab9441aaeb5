import { groupBy } from '../group-by.ts'
import type { PlainDate } from '../plain-date.ts'
import { answerOf } from '../readiness/doubt.ts'
import type { Moment } from '../readiness/moment.ts'
import type { EpochMs, Evidence, RaisedCheck } from '../readiness/types.ts'
import { FINDINGS, type Band, type FindingWord, type Procedure } from '../vocabulary.ts'
import { isInUse, type BatchUnit } from './recall-units.ts'

/** The check of one unit that a recall raised. */
export interface RecallCheck extends RaisedCheck {
  readonly withdrawnAt: EpochMs | null
}

export interface RecalledUnit {
  readonly unitId: string
  /** `out`: retired or broken since, so that nothing waits for it. */
  readonly state: 'waiting' | 'tested' | 'taken-back' | 'out'
  readonly testId: string | null
  readonly finding: FindingWord | null
}

export interface BatchRecall {
  readonly procedure: Procedure
  readonly band: Band | null
  readonly reason: string
  readonly raisedAt: EpochMs
  readonly dueOn: PlainDate
  readonly units: readonly RecalledUnit[]
  /** Units whose test is still to come; at 0 the recall has ended by itself. */
  readonly waiting: number
}

/** The recalls of a batch, the newest first. One recall raised all its checks at one instant. */
export function batchRecalls(
  moment: Moment,
  { units, checks }: { units: readonly BatchUnit[]; checks: readonly RecallCheck[] },
): BatchRecall[] {
  const unitOf = new Map(units.map((unit) => [unit.id, unit]))
  const groups = groupBy(checks, (check) => `${check.raisedAt} ${check.procedure} ${check.band ?? ''}`)
  return [...groups.values()]
    .flatMap((list): BatchRecall[] => {
      const [first] = list
      if (!first) return []
      const recalled = list.map((check) => recalledUnit(moment, check, unitOf.get(check.subjectId)))
      const { procedure, band, reason, raisedAt, dueOn } = first
      const waiting = recalled.filter(({ state }) => state === 'waiting').length
      return [{ procedure, band, reason, raisedAt, dueOn, units: recalled, waiting }]
    })
    .toSorted((a, b) => b.raisedAt - a.raisedAt)
}

function recalledUnit(moment: Moment, check: RecallCheck, unit: BatchUnit | undefined): RecalledUnit {
  const answer = answerOnAll(moment, check, unit)
  const finding = answer?.findings.find(({ band }) => band === check.band)?.finding ?? answer?.finding
  return {
    unitId: check.subjectId,
    state: stateOf(check, { answer, unit }),
    testId: answer?.id ?? null,
    finding: finding ?? null,
  }
}

/** A recall of the whole unit waits for a test on every band that the unit is for; the worst of them is its answer. */
function answerOnAll(moment: Moment, check: RecallCheck, unit: BatchUnit | undefined): Evidence | undefined {
  const bands = check.band === null && unit?.bands?.length ? unit.bands : [null]
  const answers = bands.map((band) => answerOf(moment, check, band))
  return answers.every((answer) => answer !== undefined) ? answers.reduce(worse) : undefined
}

const worse = (a: Evidence, b: Evidence) =>
  FINDINGS.indexOf(b.finding) > FINDINGS.indexOf(a.finding) ? b : a

function stateOf(
  { withdrawnAt }: RecallCheck,
  { answer, unit }: { answer: Evidence | undefined; unit: BatchUnit | undefined },
): RecalledUnit['state'] {
  if (answer) return 'tested'
  if (withdrawnAt !== null) return 'taken-back'
  return unit && isInUse(unit) ? 'waiting' : 'out'
}
