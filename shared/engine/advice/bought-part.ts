import type { ItemFacts, KitState, Position, ReadinessItem } from '../readiness/types.ts'
import { boughtId } from './steps.ts'

/** A part as the kit's promise wants it: good enough on paper, and not tested yet. */
export function boughtPart(state: KitState, position: Position): ReadinessItem {
  return {
    id: boughtId(state.kit.id, position.id),
    designation: `new ${position.name}`,
    category: position.category,
    positionId: position.id,
    condition: 'serviceable',
    conditionReason: '',
    facts: { ...formerFacts(state, position), ...neededFacts(state, position) },
  }
}

/** What the part in this position was like, where one of the same sort is on record: only its loss and its draw. */
function formerFacts(state: KitState, position: Position): ItemFacts {
  const former = state.items.find(({ category }) => category === position.category)?.facts
  return {
    ...(former?.lossDb && { lossDb: former.lossDb }),
    ...(former?.drawA && { drawA: former.drawA }),
    ...(former?.meanLoadA !== undefined && { meanLoadA: former.meanLoadA }),
  }
}

/** No lead or box of a station carries more than this. */
const AMPLE_A = 40
/** A new battery is asked to give its hours with this much of its rating. Common practice, no source. */
const USABLE = 0.7
const ENOUGH_AH = 50

function neededFacts({ promise, items }: KitState, { category }: Position): ItemFacts {
  switch (category) {
    case 'battery': {
      const loads = items.flatMap(({ facts }) => facts.meanLoadA ?? [])
      const loadA = Math.max(0, ...loads)
      const neededAh = loadA > 0 ? Math.ceil(((promise.hours ?? 0) * loadA) / USABLE) : 0
      return { chemistry: 'lifepo4', ratedAh: Math.max(ENOUGH_AH, neededAh) }
    }
    case 'dc-lead':
    case 'distribution-box':
      return { ratedA: AMPLE_A }
    case 'radio':
      return { bands: promise.bands, ...(promise.watts !== null && { ratedWatts: promise.watts }) }
    case 'transformer':
    case 'antenna':
      return { bands: promise.bands }
    default:
      return {}
  }
}
