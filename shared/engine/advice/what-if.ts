import { isFailure, type Outcome } from '../outcome.ts'
import { kitTimeline } from '../readiness/timeline.ts'
import type { Period } from '../readiness/period-types.ts'
import type { EpochMs, KitState } from '../readiness/types.ts'
import { applySteps } from './apply-steps.ts'
import type { WhatIfStep } from './steps.ts'
import { worldOf } from './world.ts'

/** One kit before and after, from the instant on if nothing else is done. */
export interface WhatIfKit {
  readonly before: KitState
  readonly after: KitState
  readonly was: readonly Period[]
  readonly becomes: readonly Period[]
}

/** What these steps would make of the kits, judged as ever. Kits that no step touches are left out; nothing is kept. */
export function whatIf(
  kits: readonly KitState[],
  spares: readonly KitState[],
  steps: readonly WhatIfStep[],
  at: EpochMs,
): Outcome<WhatIfKit[]> {
  const world = applySteps(worldOf(kits, spares), steps, at)
  if (isFailure(world)) return world
  return kits.flatMap((before) => {
    const after = world.kits.get(before.kit.id)!
    if (after === before) return []
    return [{ before, after, was: kitTimeline(before, at), becomes: kitTimeline(after, at) }]
  })
}
