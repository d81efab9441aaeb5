import { daysBetween, earliestDate, type PlainDate } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'
import { countStanding } from './count-standing.ts'
import { heatStanding, type HeatStanding } from './heat-standing.ts'
import type { Moment } from './moment.ts'
import { doubtText, heatUnprovenText, lapsedText, neverText, raisedText } from './sentences.ts'
import { dueOf, hasPassed, openRaisedChecks, standingOf, type Candidate, type Standing } from './standing.ts'
import type { CheckState } from './period-types.ts'
import type { Rule } from './types.ts'

/** One check of one subject on one band, before the bands are put together. */
export type CheckRow = Pick<
  CheckState,
  'ruleId' | 'state' | 'band' | 'finding' | 'testId' | 'testedOn' | 'dueOn' | 'because'
>

interface Asked {
  readonly subjectId: string
  readonly name: string
  readonly procedures: readonly Procedure[]
  readonly rule: Rule
  readonly band: Band | null
}

/**
 * The state of one check. A failed check keeps its retest day: once that has passed it is overdue like any other,
 * whatever the last result said. Undefined: not asked (a band without a heat test of its own).
 */
export function checkRow(moment: Moment, asked: Asked): CheckRow | undefined {
  const { rule, band } = asked
  if (rule.procedure === 'heat-test' && band !== null) return heatRow(moment, asked, band)
  const standing = rule.procedure === 'count' ? countStanding(moment) : standingOf(moment, asked)
  return withRaised(moment, asked, { ...shown(asked, standing), ...stateOf(moment, asked, standing) })
}

function shown({ rule, band }: Asked, by: Pick<Standing, 'test' | 'finding'> & { dueOn: PlainDate | null }) {
  return {
    ruleId: rule.id,
    band,
    finding: by.finding?.finding ?? null,
    testId: by.test?.id ?? null,
    testedOn: by.test?.performedOn ?? null,
    dueOn: by.dueOn,
  }
}

type Said = Pick<CheckRow, 'state' | 'because'>

function stateOf(moment: Moment, asked: Asked, standing: Standing): Said {
  const { test, doubt, raised, finding } = standing
  const { name, band, rule } = asked
  if (doubt) return { state: 'in-doubt', because: doubtText(name, rule.procedure, doubt, band) }
  if (raised) return { state: 'overdue', because: raisedText(name, raised) }
  if (!test) return { state: 'never', because: neverText(name, rule.procedure, band) }
  // The count of a kit on issue stands past its day.
  const state = standing.state === 'good' ? inDateState(moment, rule, standing.dueOn) : 'overdue'
  const overdue = standing.state === 'failed' ? hasPassed(moment, standing.dueOn) : state === 'overdue'
  if (overdue) return { state: 'overdue', because: lapsedText(name, rule.procedure, test.performedOn, band) }
  if (standing.state === 'failed') return { state: 'failed', because: finding!.text }
  return { state, because: '' }
}

function inDateState(moment: Moment, rule: Rule, dueOn: PlainDate | null): 'current' | 'due-soon' {
  if (dueOn === null) return 'current'
  const days = daysBetween(moment.today, dueOn)
  return days >= 0 && days <= rule.warningDays ? 'due-soon' : 'current'
}

function heatRow(moment: Moment, asked: Asked, band: Band): CheckRow | undefined {
  const heat = heatStanding(moment, asked.subjectId, asked.rule, band)
  if (heat.state === 'not-asked') return undefined
  const newest = newestOf(heat)
  // The band stands on the pass where there is one; a failure alone is retested from its own day.
  const basis = 'by' in heat && heat.by ? heat.by : newest
  const dueOn = basis ? dueOf(basis.test, asked.rule) : null
  const by = { test: newest?.test ?? null, finding: newest?.finding ?? null, dueOn }
  const row = { ...shown(asked, by), ...heatSaid(moment, { asked, band, dueOn }, heat) }
  return withRaised(moment, asked, row)
}

function newestOf(heat: HeatStanding): Candidate | null {
  if ('failed' in heat && heat.failed) return heat.failed
  return 'by' in heat ? heat.by : null
}

function heatSaid(
  moment: Moment,
  { asked, band, dueOn }: { asked: Asked; band: Band; dueOn: PlainDate | null },
  heat: Exclude<HeatStanding, { state: 'not-asked' }>,
): Said {
  if (heat.state === 'never' || heat.state === 'in-doubt' || heat.state === 'lapsed') {
    const state = heat.state === 'lapsed' ? 'overdue' : heat.state
    return { state, because: heatUnprovenText(asked.name, band, heat) }
  }
  const failed = 'failed' in heat ? heat.failed : null
  if (hasPassed(moment, dueOn)) {
    const testedOn = failed?.test.performedOn ?? moment.today
    return { state: 'overdue', because: lapsedText(asked.name, 'heat-test', testedOn, band) }
  }
  if (failed) return { state: 'failed', because: failed.finding.text }
  return { state: inDateState(moment, asked.rule, dueOn), because: '' }
}

/** What an event asks for comes before what the calendar asks for. */
function withRaised(moment: Moment, asked: Asked, row: CheckRow): CheckRow {
  const open = openRaisedChecks(moment, asked.subjectId, asked.band).filter((check) =>
    asked.procedures.includes(check.procedure),
  )
  const first = open.sort((a, b) => (a.dueOn < b.dueOn ? -1 : 1))[0]
  if (!first) return row
  const late = hasPassed(moment, first.dueOn)
  const state = late ? 'overdue' : row.state === 'current' ? 'due-soon' : row.state
  const because = late ? raisedText(asked.name, first) : first.reason
  return { ...row, state, because, dueOn: earliestDate([first.dueOn, row.dueOn]) ?? null }
}
