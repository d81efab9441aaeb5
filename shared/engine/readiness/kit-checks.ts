import { reasonForStanding } from './check-reason.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { dayText, testAction } from './sentences.ts'
import type { FilledPosition } from './slots.ts'
import { standingOf, type Standing } from './standing.ts'
import type { Reason } from './types.ts'
import type { JudgedChecks } from './whole-checks.ts'

/** The seal and the count. */
export function judgeKit(moment: Moment, filled: readonly FilledPosition[]): JudgedChecks {
  const { kit } = moment.state
  const rule = ruleFor(moment.policy, { category: 'kit', facts: {} }, 'count', moment.today)
  const standing = standingOf(moment, { subjectId: kit.id, procedures: ['count'], rule, band: null })
  const reasons = kit.sealMatches ? [] : [sealReason(kit.designation)]
  if (standing.state === 'failed')
    return { reasons: [...reasons, ...countReasons(moment, filled, standing)], tests: [] }
  const subject = { name: kit.designation, itemId: null, positionId: null }
  const level = rule?.vital ? 'not-proven' : 'limit'
  const reason = rule && reasonForStanding(subject, { procedure: 'count', band: null, level }, standing)
  const tests = standing.state === 'good' && rule?.vital ? [standing.test!] : []
  return { reasons: reason ? [...reasons, reason] : reasons, tests }
}

function sealReason(designation: string): Reason {
  return reasonOf({
    code: 'seal-unmatched',
    level: 'not-proven',
    text: `The seal of ${designation} is broken or not the one on record`,
    procedure: 'count',
    action: testAction(designation, 'count', null),
  })
}

/**
 * What a count found missing. A position that is still short says so itself; one that was filled since needs another
 * count before the kit is proven again.
 */
function countReasons(moment: Moment, filled: readonly FilledPosition[], { test }: Standing): Reason[] {
  const { designation } = moment.state.kit
  const failed = test!.findings.filter(({ finding }) => finding === 'fail')
  const refilled = failed.flatMap(({ positionId }) =>
    filled.filter(({ position }) => position.id === positionId),
  )
  const open = refilled.filter(({ position, working }) => working.length >= position.quantity)
  if (open.length === 0 && refilled.length === failed.length) return []
  const vital = open.some(({ position }) => position.vital) || refilled.length < failed.length
  const names = open.map(({ position }) => position.name).join(', ')
  return [
    reasonOf({
      code: 'count-again',
      level: vital ? 'not-proven' : 'limit',
      text: `The count of ${dayText(test!.performedOn)} found parts missing${names ? ` (${names})` : ''}: count again`,
      testId: test!.id,
      procedure: 'count',
      action: testAction(designation, 'count', null),
    }),
  ]
}
