import { liftBarrier, type Barrier } from './barriers.ts'
import type { Sources } from './parts.ts'
import { planOf } from './plan-of.ts'
import { searchPlans, type Goal } from './search-plans.ts'
import { RECALL_MINUTES, type AdviceKit, type Plan, type Work } from './work.ts'

/** What can be done for one kit, or for those behind one barrier. */

export function ownPlans(sources: Sources, kit: AdviceKit, deployable: boolean): Plan[] {
  return [...plansTo('proven', sources, kit), ...(deployable ? [] : plansTo('deployable', sources, kit))]
}

export function plansTo(goal: Goal, sources: Sources, kit: AdviceKit): Plan[] {
  const kitId = kit.state.kit.id
  return searchPlans(sources, kitId, goal).flatMap(
    (works) => planOf(sources.world, kitId, [...works, ...bringBack(kit)], sources.at) ?? [],
  )
}

/** Out of service is what people said; once the cause is gone they say so too. */
function bringBack({ state: { kit } }: AdviceKit): Work[] {
  if (kit.availability !== 'out-of-service') return []
  const text = `Say that ${kit.designation} is available again`
  return [{ text, minutes: 0, steps: [{ kind: 'back', kitId: kit.id }], uses: [] }]
}

export function recall(sources: Sources, { state: { kit } }: AdviceKit): Plan[] {
  const why = kit.availabilityReason === '' ? '' : ` (${kit.availabilityReason})`
  const work: Work = {
    text: `Recall ${kit.designation}${why}`,
    minutes: RECALL_MINUTES,
    steps: [{ kind: 'back', kitId: kit.id }],
    uses: [],
  }
  const plan = planOf(sources.world, kit.id, [work], sources.at)
  return plan ? [plan] : []
}

/** Lifting the barrier once for the kits behind it that take least work: for one, for two, ... for all of them. */
export function behind(sources: Sources, barrier: Barrier): Plan[] {
  const ways = barrier.kits
    .flatMap((kit) => {
      const [works] = searchPlans(sources, kit.state.kit.id, 'deployable')
      return works ? [{ kit, works: [...works, ...bringBack(kit)] }] : []
    })
    .sort((a, b) => minutesOf(a.works) - minutesOf(b.works))
  return ways.flatMap((_, last) => {
    const taken = ways.slice(0, last + 1)
    const lift = liftBarrier(
      barrier,
      taken.map(({ kit }) => kit),
    )
    const works = [lift, ...taken.flatMap((way) => way.works)]
    return planOf(sources.world, taken[0]!.kit.state.kit.id, works, sources.at) ?? []
  })
}

const minutesOf = (works: readonly Work[]) => works.reduce((sum, { minutes }) => sum + minutes, 0)
