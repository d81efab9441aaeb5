import { isFailure } from '../outcome.ts'
import type { Judgement } from '../readiness/period-at.ts'
import type { Reason } from '../readiness/period-types.ts'
import type { EpochMs, KitState } from '../readiness/types.ts'
import { isDeployable } from '../vocabulary.ts'
import { applySteps } from './apply-steps.ts'
import { judgeNow } from './judge-now.ts'
import { type Sources } from './parts.ts'
import type { Work } from './work.ts'
import { worksFor } from './works.ts'
import type { World } from './world.ts'

export type Goal = 'deployable' | 'proven'

/** Ways of one kit to a goal that are kept: they differ in the parts and kits that they use. */
const MOST_WAYS = 6
/** States looked at for one kit and goal; beyond it what was found stands. */
const MOST_LOOKS = 150
const MOST_WORKS = 12

interface Node {
  readonly world: World
  readonly works: readonly Work[]
  readonly minutes: number
}

/**
 * Ways to bring one kit to a goal, cheapest first by attended minutes. The heaviest reason that something can be done
 * about is lifted first, by each of its ways, and the kit is judged anew after each.
 */
export function searchPlans(sources: Sources, kitId: string, goal: Goal): (readonly Work[])[] {
  const open: Node[] = [{ world: sources.world, works: [], minutes: 0 }]
  const found: (readonly Work[])[] = []
  const used = new Set<string>()
  for (let looks = 0; open.length > 0 && looks < MOST_LOOKS && found.length < MOST_WAYS; looks += 1) {
    const node = takeCheapest(open)
    const state = node.world.kits.get(kitId)!
    const judged = judgeNow(state, sources.at)
    if (reached(judged, goal)) {
      const key = usesOf(node.works).sort().join(' ')
      if (!used.has(key) && node.works.length > 0) found.push(node.works)
      used.add(key)
    } else if (node.works.length < MOST_WORKS) open.push(...next(sources, node, { state, judged, goal }))
  }
  return found
}

export function usesOf(works: readonly Work[]): string[] {
  return [...new Set(works.flatMap(({ uses }) => uses))]
}

function takeCheapest(open: Node[]): Node {
  let best = 0
  for (let place = 1; place < open.length; place += 1)
    if (open[place]!.minutes < open[best]!.minutes) best = place
  return open.splice(best, 1)[0]!
}

const reached = ({ verdict }: Judgement, goal: Goal) =>
  goal === 'proven' ? verdict === 'proven' : isDeployable(verdict)

interface Look {
  readonly state: KitState
  readonly judged: Judgement
  readonly goal: Goal
}

function next(sources: Sources, { world, works, minutes }: Node, { state, judged, goal }: Look): Node[] {
  const here = {
    ...sources,
    world,
    donors: sources.donors.filter(({ kit }) => isWhole(world, kit.id, sources)),
  }
  for (const reason of judged.reasons.filter((one) => matters(one, goal))) {
    const ways = worksFor(here, state, reason)
    if (ways.length === 0) continue
    return ways.flatMap((work) => {
      const after = applied(world, work, sources.at)
      return after ? [{ world: after, works: [...works, work], minutes: minutes + work.minutes }] : []
    })
  }
  return []
}

/** A donor that gave something already is as the world has it, not as it was. */
function isWhole(world: World, kitId: string, sources: Sources): boolean {
  return world.kits.get(kitId) === sources.world.kits.get(kitId)
}

const matters = ({ level, action }: Reason, goal: Goal) =>
  action !== null && level !== 'note' && (goal === 'proven' || level !== 'limit')

function applied(world: World, work: Work, at: EpochMs): World | undefined {
  const after = applySteps(world, work.steps, at)
  return isFailure(after) ? undefined : after
}
