import { currentAtPower } from '../procedures/radio-currents.ts'
import { stationUse } from '../readiness/station-use.ts'
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
  const former = state.items.find(({ category }) => category === position.category)
  if (!former) return {}
  const { lossDb } = former.facts
  return { ...(lossDb && { lossDb }), ...(former.category === 'radio' && drawOf(state, former)) }
}

/** What a radio draws: as its newest check read it, else as its record says. */
function drawOf({ evidence }: KitState, { id, facts }: ReadinessItem): ItemFacts {
  const [newest] = evidence
    .filter(({ subjectId, currents }) => subjectId === id && currents?.receiveA)
    .sort((a, b) => b.performedAt - a.performedAt)
  const measured = newest?.currents
  const drawA = measured?.transmit.map(({ settingW, currentA }) => ({ watts: settingW, amps: currentA }))
  const receiveA = measured?.receiveA ?? facts.receiveA
  return {
    ...((drawA ?? facts.drawA) && { drawA: drawA ?? facts.drawA }),
    ...(receiveA && { receiveA }),
    ...(facts.meanLoadA && { meanLoadA: facts.meanLoadA }),
  }
}

/** A over the time that the station is used as its kind says; 0 where nothing says what its radio draws. */
function meanLoadOf(state: KitState): number {
  const { transmitShare, currentFactor } = stationUse(state.promise)
  const share = transmitShare * currentFactor
  const loads = state.items
    .filter(({ category }) => category === 'radio')
    .map((radio) => {
      const { drawA = [], receiveA, meanLoadA = 0 } = drawOf(state, radio)
      const draws = drawA.map(({ watts, amps }) => ({ settingW: watts, currentA: amps }))
      const full = currentAtPower(draws, state.promise.watts)
      return full && receiveA ? share * full.currentA + (1 - share) * receiveA : meanLoadA
    })
  return Math.max(0, ...loads)
}

/** No lead or box of a station carries more than this. */
const AMPLE_A = 40
/** A new battery is asked to give its hours with this much of its rating. Common practice, no source. */
const USABLE = 0.7
const ENOUGH_AH = 50

function neededFacts(state: KitState, { category }: Position): ItemFacts {
  const { promise } = state
  switch (category) {
    case 'battery': {
      const neededAh = Math.ceil(((promise.hours ?? 0) * meanLoadOf(state)) / USABLE)
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
