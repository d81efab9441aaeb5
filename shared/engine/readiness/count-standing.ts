import type { Moment } from './moment.ts'
import { ruleFor } from './rules-in-force.ts'
import { hasPassed, standingOf, type Standing } from './standing.ts'
import type { Rule } from './types.ts'

/** Rules about a whole kit name no item. */
export const WHOLE_KIT = { category: 'kit', facts: {} } as const

export function countRule(moment: Moment): Rule | undefined {
  return ruleFor(moment.policy, WHOLE_KIT, 'count', moment.today)
}

/** The count of a kit. One that was in date when the kit went out on issue stays so until the kit is back. */
export function countStanding(moment: Moment): Standing {
  const { kit } = moment.state
  const asked = { subjectId: kit.id, procedures: ['count'], rule: countRule(moment), band: null } as const
  const standing = standingOf(moment, { ...asked, failureLapses: true })
  if (standing.state !== 'lapsed' || standing.raised || !wentOutInDate(moment, standing)) return standing
  return { ...standing, state: standing.finding?.finding === 'fail' ? 'failed' : 'good' }
}

function wentOutInDate(moment: Moment, { dueOn }: Standing): boolean {
  const { availability, assignedAt } = moment.state.kit
  if (availability !== 'assigned' || typeof assignedAt !== 'number') return false
  return !hasPassed({ ...moment, at: assignedAt }, dueOn)
}
