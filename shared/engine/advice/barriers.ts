import { groupBy } from '../group-by.ts'
import { FETCH_MINUTES } from '../readiness/actions.ts'
import type { Judgement } from '../readiness/period-at.ts'
import { listText } from '../plain-words.ts'
import { isDeployable } from '../vocabulary.ts'
import type { AdviceKit, Work } from './work.ts'

/** Something outside the kits that keeps them out of service: a key that is abroad, a road that is closed. */
export interface Barrier {
  readonly reason: string
  readonly kits: readonly AdviceKit[]
}

/**
 * Kits out of service for one and the same reason, where at least one of them has nothing in it that is not fit: then
 * no repair explains the reason, and it must be lifted before anybody can work on any of them.
 */
export function barriersOf(kits: readonly AdviceKit[], judged: ReadonlyMap<string, Judgement>): Barrier[] {
  const held = kits.filter(({ state: { kit } }) => kit.availability === 'out-of-service')
  const byReason = groupBy(held, ({ state }) => state.kit.availabilityReason)
  return [...byReason]
    .filter(([, group]) => group.some(({ state }) => judged.get(state.kit.id)?.verdict === 'not-proven'))
    .map(([reason, group]) => ({
      reason,
      kits: group.filter(({ state }) => !isDeployable(judged.get(state.kit.id)!.verdict)),
    }))
}

/** What it takes is not on record; as long as fetching a part. Common practice, no source. */
export function liftBarrier({ reason }: Barrier, kits: readonly AdviceKit[]): Work {
  const names = listText(kits.map(({ state }) => state.kit.designation))
  const cause = reason === '' ? 'Settle what keeps' : `Settle "${reason}", which keeps`
  return {
    text: `${cause} ${names} out of service`,
    minutes: FETCH_MINUTES,
    steps: [],
    uses: [],
  }
}
