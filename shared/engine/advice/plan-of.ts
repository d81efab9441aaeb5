import { isFailure } from '../outcome.ts'
import type { EpochMs, KitState } from '../readiness/types.ts'
import { isDeployable } from '../vocabulary.ts'
import { applySteps } from './apply-steps.ts'
import { judgeNow } from './judge-now.ts'
import { usesOf } from './search-plans.ts'
import type { KitChange, Plan, Work } from './work.ts'
import type { World } from './world.ts'

/** Works with what they yield, found by doing them in a copy. Undefined where a step does not fit. */
export function planOf(world: World, kitId: string, works: readonly Work[], at: EpochMs): Plan | undefined {
  const after = applySteps(
    world,
    works.flatMap(({ steps }) => steps),
    at,
  )
  if (isFailure(after)) return undefined
  const changes = [...world.kits.values()].flatMap((state) =>
    changeOf(state, after.kits.get(state.kit.id)!, at),
  )
  const count = (counts: (change: KitChange) => boolean) => changes.filter(counts).length
  return {
    kitId,
    works,
    minutes: works.reduce((sum, { minutes }) => sum + minutes, 0),
    uses: usesOf(works),
    changes,
    countAfter: openedKits(world, works),
    deployable: count(({ before, after: then }) => !isDeployable(before) && isDeployable(then)),
    proven: count(({ before, after: then }) => before !== 'proven' && then === 'proven'),
    returned: count(({ before, returns }) => returns && isDeployable(before)),
  }
}

function changeOf(before: KitState, after: KitState, at: EpochMs): KitChange[] {
  if (before === after) return []
  const { id: kitId, designation, availability } = before.kit
  const returns = availability !== 'available' && after.kit.availability === 'available'
  return [
    { kitId, designation, before: judgeNow(before, at).verdict, after: judgeNow(after, at).verdict, returns },
  ]
}

/** A kit that was opened is counted after it (field practice); the verdict asks for it only where the policy does. */
function openedKits(world: World, works: readonly Work[]): string[] {
  const steps = works.flatMap((work) => work.steps)
  const counted = new Set(steps.flatMap((step) => (step.kind === 'count' ? [step.kitId] : [])))
  const opened = new Set(
    steps.flatMap((step) => (step.kind === 'move' || step.kind === 'buy' ? [step.kitId] : [])),
  )
  return [...opened]
    .filter((kitId) => !counted.has(kitId))
    .map((kitId) => world.kits.get(kitId)!.kit.designation)
}
