import { failure, type Outcome } from '../outcome.ts'
import type { EpochMs, KitState } from '../readiness/types.ts'
import { onBand, PROCEDURE_WORDS } from '../readiness/words.ts'
import type { WhatIfStep } from './steps.ts'
import { putKit, type World } from './world.ts'

type Skip = WhatIfStep & { kind: 'skip' }

/**
 * A skipped test is what every timeline counts on anyway: its kit is named and stays as it is. Only a risk that
 * somebody accepts for it is something new, and it changes no verdict either.
 */
export function skip(world: World, step: Skip, at: EpochMs): Outcome<World> {
  const state = world.kits.get(step.kitId)
  if (!state) return failure('E_UNKNOWN', 'There is no such kit in your group.')
  if (nameOf(state, step.subjectId) === undefined)
    return failure('E_UNKNOWN', `${state.kit.designation} has no such part.`)
  if (!step.accept) return putKit(world, { ...state })
  const until = Date.parse(step.accept.untilAt)
  if (!(until > at)) return failure('E_PAST', 'Choose a time to come.')
  const risk: KitState['decisions'][number] = {
    id: `what-if:${step.kitId}:${state.decisions.length}`,
    kind: 'risk-accepted',
    toVerdict: null,
    reason: `${skippedTest(state, step)} skipped: ${step.accept.reason}`,
    by: step.accept.by,
    from: at,
    until,
  }
  return putKit(world, { ...state, decisions: [...state.decisions, risk] })
}

/** "heat test of XFM-05 on 10 m". */
export function skippedTest(
  state: KitState,
  { subjectId, procedure, band }: Pick<Skip, 'subjectId' | 'procedure' | 'band'>,
): string {
  return `${PROCEDURE_WORDS[procedure]} of ${nameOf(state, subjectId) ?? 'a part'}${onBand(band)}`
}

function nameOf({ kit, items }: KitState, subjectId: string): string | undefined {
  return subjectId === kit.id ? kit.designation : items.find(({ id }) => id === subjectId)?.designation
}
