import { daysBetween, earliestDate, type PlainDate } from '../plain-date.ts'
import type { Band, Procedure } from '../vocabulary.ts'
import { heatStanding, type HeatStanding } from './heat-standing.ts'
import type { Moment } from './moment.ts'
import { doubtText, lapsedText, neverText, raisedText } from './sentences.ts'
import { dueOf, openRaisedChecks, standingOf, type Standing } from './standing.ts'
import type { CheckState, RaisedCheck, Rule } from './types.ts'

/** One check of one subject on one band, before the bands are put together. */
export type CheckRow = Pick<
  CheckState,
  'state' | 'band' | 'finding' | 'testId' | 'testedOn' | 'dueOn' | 'because'
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
  if (asked.rule.procedure === 'heat-test' && asked.band !== null) return heatRow(moment, asked, asked.band)
  const standing = standingOf(moment, asked)
  const row = {
    band: asked.band,
    finding: standing.finding?.finding ?? null,
    testId: standing.test?.id ?? null,
    testedOn: standing.test?.performedOn ?? null,
    dueOn: standing.raised?.dueOn ?? standing.dueOn,
  }
  return withRaised(moment, asked, { ...row, ...stateOf(moment, asked, standing) })
}

function heatRow(moment: Moment, asked: Asked, band: Band): CheckRow | undefined {
  const heat = heatStanding(moment, asked.subjectId, asked.rule, band)
  if (heat.state === 'untested') return undefined
  const newest = 'failed' in heat && heat.failed ? heat.failed : 'by' in heat ? heat.by : heat.failed
  // The band stands on the pass where there is one; a failure alone is retested from its own day.
  const dueOn = dueOf('by' in heat ? heat.by.test : newest.test, asked.rule)
  const row: CheckRow = {
    band,
    finding: newest.finding.finding,
    testId: newest.test.id,
    testedOn: newest.test.performedOn,
    dueOn,
    because: heatText(asked, heat),
    state: heat.state === 'in-doubt' ? 'in-doubt' : 'failed' in heat && heat.failed ? 'failed' : 'current',
  }
  return withRaised(moment, asked, row.state === 'in-doubt' ? row : dated(moment, asked.rule, row))
}

function heatText(asked: Asked, heat: HeatStanding): string {
  if (heat.state === 'in-doubt') return doubtText(asked.name, 'heat-test', heat.doubt, asked.band)
  if (heat.state === 'lapsed')
    return lapsedText(asked.name, 'heat-test', heat.by.test.performedOn, asked.band)
  if (heat.state !== 'untested' && 'failed' in heat && heat.failed) return heat.failed.finding.text
  return ''
}

function stateOf(moment: Moment, asked: Asked, standing: Standing): Pick<CheckRow, 'state' | 'because'> {
  const { test, doubt, raised, finding } = standing
  const procedure = asked.rule.procedure
  if (doubt) return { state: 'in-doubt', because: doubtText(asked.name, procedure, doubt, asked.band) }
  if (raised)
    return { state: 'overdue', because: raisedText(asked.name, procedure, raised.reason, raised.dueOn) }
  if (!test) return { state: 'never', because: neverText(asked.name, procedure, asked.band) }
  const state = dateState(moment, asked.rule, standing.dueOn)
  if (state === 'overdue')
    return { state, because: lapsedText(asked.name, procedure, test.performedOn, asked.band) }
  if (standing.state === 'failed') return { state: 'failed', because: finding!.text }
  return { state, because: '' }
}

function dated(moment: Moment, rule: Rule, row: CheckRow): CheckRow {
  const state = dateState(moment, rule, row.dueOn)
  return state === 'overdue' || row.state === 'current' ? { ...row, state } : row
}

function dateState(moment: Moment, rule: Rule, dueOn: PlainDate | null): 'current' | 'due-soon' | 'overdue' {
  if (dueOn === null) return 'current'
  if (moment.passedAt(dueOn) <= moment.at) return 'overdue'
  return daysBetween(moment.today, dueOn) <= rule.warningDays ? 'due-soon' : 'current'
}

/** What an event asks for comes before what the calendar asks for. */
function withRaised(moment: Moment, asked: Asked, row: CheckRow): CheckRow {
  const open = openRaisedChecks(moment, asked.subjectId).filter((check) => asksFor(check, asked))
  const first = open.sort((a, b) => (a.dueOn < b.dueOn ? -1 : 1))[0]
  if (!first) return row
  const late = moment.passedAt(first.dueOn) <= moment.at
  const state = late ? 'overdue' : row.state === 'current' ? 'due-soon' : row.state
  const because = late ? raisedText(asked.name, first.procedure, first.reason, first.dueOn) : first.reason
  return { ...row, state, because, dueOn: earliestDate([first.dueOn, row.dueOn]) ?? null }
}

function asksFor(check: RaisedCheck, asked: Asked): boolean {
  const onBand = check.band === null || asked.band === null || check.band === asked.band
  return onBand && asked.procedures.includes(check.procedure)
}
