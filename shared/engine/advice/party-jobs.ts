/** What of a plan is done at a work party, what before it, and what through the night after it. */
import { INSTRUMENTS } from '../procedures/subjects.ts'
import { MINUTES } from '../readiness/actions.ts'
import type { Category, Procedure } from '../vocabulary.ts'
import { worthOf } from './choose-plans.ts'
import type { Plan, Work } from './work.ts'

export interface PartyTask {
  readonly text: string
  readonly minutes: number
  readonly procedure: Procedure | null
  /** One instrument of one of these, the usual one first; none: hands are enough. */
  readonly needs: readonly Category[]
}

/** The works of one plan: they are about the same kits, so one follows the other. */
export interface PartyJob {
  readonly plan: Plan
  readonly worth: number
  /** Errands without which the rest is of no use: purchases, keys, recalls, parts that are elsewhere. */
  readonly before: readonly string[]
  readonly tasks: readonly PartyTask[]
  /** Capacity runs: minutes of work and hours of waiting. */
  readonly runs: readonly { readonly text: string; readonly itemId: string }[]
  /** Said at the end, in no time. */
  readonly then: readonly string[]
}

export function partyJobOf(plan: Plan): PartyJob {
  const of = (kind: Kind) => plan.works.filter((work) => kindOf(work) === kind)
  const counts = plan.countAfter.map((kit) => ({
    text: `Count ${kit}, as it was opened`,
    minutes: MINUTES.count,
    procedure: 'count' as const,
    needs: [],
  }))
  return {
    plan,
    worth: worthOf(plan),
    before: of('before').map(({ text }) => text),
    tasks: [...of('task').map(taskOf), ...counts],
    runs: of('run').map(({ text, steps }) => ({ text, itemId: passed(steps)!.subjectId })),
    then: of('then').map(({ text }) => text),
  }
}

type Kind = 'before' | 'task' | 'run' | 'then'

function kindOf({ steps, minutes }: Work): Kind {
  if (minutes === 0) return 'then'
  if (steps.length === 0 || steps.some(({ kind }) => kind === 'buy' || kind === 'find' || kind === 'back'))
    return 'before'
  const test = passed(steps)
  // A part that must be put right first is worked on before it runs through the night.
  return test?.procedure === 'battery-capacity' && minutes <= MINUTES['battery-capacity'] ? 'run' : 'task'
}

const passed = (steps: Work['steps']) => steps.find((step) => step.kind === 'pass')

function taskOf({ text, minutes, steps }: Work): PartyTask {
  const counted = steps.some(({ kind }) => kind === 'count')
  const procedure = passed(steps)?.procedure ?? (counted ? 'count' : null)
  return { text, minutes, procedure, needs: procedure ? INSTRUMENTS[procedure] : [] }
}
