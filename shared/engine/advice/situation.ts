import type { PlainDate } from '../plain-date.ts'
import type { EpochMs, KitState } from '../readiness/types.ts'
import type { Verdict } from '../vocabulary.ts'
import { barriersOf, type Barrier } from './barriers.ts'
import { judgeNow } from './judge-now.ts'
import type { Sources } from './parts.ts'
import type { AdviceKit } from './work.ts'
import { worldOf } from './world.ts'

/** The stations that want something, sorted by what can be done about them. */
export interface Situation {
  readonly sources: Sources
  readonly verdictOf: (kit: AdviceKit) => Verdict
  /** On issue and due back. */
  readonly late: readonly AdviceKit[]
  /** At home and within reach. */
  readonly here: readonly AdviceKit[]
  readonly barriers: readonly Barrier[]
}

interface Day {
  readonly at: EpochMs
  readonly today: PlainDate
}

export function situationOf(
  kits: readonly AdviceKit[],
  spares: readonly KitState[],
  { at, today }: Day,
): Situation {
  const judged = new Map(kits.map(({ state }) => [state.kit.id, judgeNow(state, at)]))
  const verdictOf = ({ state }: AdviceKit) => judged.get(state.kit.id)!.verdict
  const wanting = kits.filter((kit) => verdictOf(kit) !== 'proven' || isLate(kit, today))
  const barriers = barriersOf(kits, judged)
  const barred = new Set(barriers.flatMap((barrier) => barrier.kits))
  const here = wanting.filter((kit) => !barred.has(kit) && kit.state.kit.availability !== 'assigned')
  const states = wanting.map(({ state }) => state)
  const handsOn = here.flatMap(({ state }) => tooWeakIn(state, at))
  return {
    sources: { world: worldOf(states, spares), donors: [], handsOn, at, known: new Map() },
    verdictOf,
    late: wanting.filter((kit) => isLate(kit, today)),
    here,
    barriers,
  }
}

const isLate = ({ state: { kit }, expectedReturnOn }: AdviceKit, today: PlainDate) =>
  kit.availability === 'assigned' && expectedReturnOn !== null && expectedReturnOn < today

/** A sound part that holds its kit back and may do for another. */
function tooWeakIn(state: KitState, at: EpochMs): Sources['handsOn'] {
  return judgeNow(state, at)
    .reasons.filter(({ code }) => code === 'lead-rated-low')
    .flatMap(({ itemId }) => state.items.filter(({ id }) => id === itemId))
    .map((item) => ({ state, item }))
}
