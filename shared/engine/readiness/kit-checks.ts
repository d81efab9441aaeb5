import { testAction } from './actions.ts'
import { reasonForStanding } from './check-reason.ts'
import { countRule, countStanding, WHOLE_KIT } from './count-standing.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { ruleFor, rulesFor } from './rules-in-force.ts'
import { failedCheckText, sealText, shortCountText } from './sentences.ts'
import type { FilledPosition } from './slots.ts'
import { standingOf, type Standing } from './standing.ts'
import type { Reason } from './period-types.ts'
import type { Evidence, Rule } from './types.ts'
import type { JudgedChecks } from './whole-checks.ts'

/** The seal, the count, and whatever else the policy asks of the kit as a whole. */
export function judgeKit(moment: Moment, filled: readonly FilledPosition[]): JudgedChecks {
  const rules = new Map(
    rulesFor(moment.policy, WHOLE_KIT, moment.today).map((rule) => [rule.procedure, rule]),
  )
  const others = [...rules.keys()].filter((procedure) => procedure !== 'count')
  const judged = others.map((procedure) => {
    const rule = ruleFor(moment.policy, WHOLE_KIT, procedure, moment.today)!
    const asked = { subjectId: moment.state.kit.id, procedures: [procedure], rule, band: null }
    return judgeWhole(moment, rule, standingOf(moment, asked))
  })
  const all = [judgeCount(moment, filled), ...judged]
  return {
    reasons: [...sealReasons(moment), ...all.flatMap(({ reasons }) => reasons)],
    tests: all.flatMap(({ tests }) => tests),
  }
}

function sealReasons({ state: { kit } }: Moment): Reason[] {
  if (kit.sealMatches) return []
  return [
    reasonOf({
      code: 'seal-unmatched',
      level: 'not-proven',
      text: sealText(kit.designation),
      procedure: 'count',
      action: testAction(kit.designation, 'count', null),
    }),
  ]
}

function judgeCount(moment: Moment, filled: readonly FilledPosition[]): JudgedChecks {
  const standing = countStanding(moment)
  const rule = countRule(moment)
  const short = standing.test ? shortReasons(moment, filled, standing.test) : []
  if (!rule || standing.state === 'failed') return { reasons: short, tests: [] }
  const whole = judgeWhole(moment, rule, standing)
  return { ...whole, reasons: [...short, ...whole.reasons] }
}

function judgeWhole({ state: { kit } }: Moment, rule: Rule, standing: Standing): JudgedChecks {
  const { procedure, vital } = rule
  const tests = vital && standing.state === 'good' && standing.test ? [standing.test] : []
  if (standing.state === 'failed') {
    const text = failedCheckText(kit.designation, procedure, standing.finding!)
    const action = testAction(kit.designation, procedure, null)
    const level = vital ? 'not-fit' : 'limit'
    const testId = standing.test!.id
    return {
      reasons: [reasonOf({ code: `${procedure}-failed`, level, text, testId, procedure, action })],
      tests,
    }
  }
  const subject = { name: kit.designation, itemId: null, positionId: null }
  const level = vital ? 'not-proven' : 'limit'
  const reason = reasonForStanding(subject, { procedure, band: null, level }, standing)
  return { reasons: reason ? [reason] : [], tests }
}

/**
 * What a count found short. A position that the record too knows to be short says so itself; one that was filled since
 * needs another count; one that the record calls full is as short as it was found.
 */
function shortReasons(moment: Moment, filled: readonly FilledPosition[], count: Evidence): Reason[] {
  const short = filled.filter(
    ({ position, working }) =>
      working.length >= position.quantity &&
      count.findings.some(({ positionId, finding }) => positionId === position.id && finding === 'fail'),
  )
  return short.map(({ position, items }) => {
    const refilled = items.some(({ placedAt }) => (placedAt ?? -Infinity) > count.performedAt)
    return reasonOf({
      code: 'count-short',
      level: !position.vital ? 'limit' : refilled ? 'not-proven' : 'not-fit',
      text: shortCountText(count.performedOn, position.name, refilled),
      positionId: position.id,
      testId: count.id,
      procedure: 'count',
      action: testAction(moment.state.kit.designation, 'count', null),
    })
  })
}
