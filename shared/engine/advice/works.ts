import { FETCH_MINUTES, MINUTES, REPAIR_MINUTES } from '../readiness/actions.ts'
import type { Reason } from '../readiness/period-types.ts'
import type { KitState } from '../readiness/types.ts'
import { capital, onBand, PROCEDURE_WORDS } from '../readiness/words.ts'
import { fillings, type Gap, type Sources } from './parts.ts'
import type { Work } from './work.ts'

/** Every way to lift one reason; none where only people can settle it. */
export function worksFor(sources: Sources, state: KitState, reason: Reason): Work[] {
  switch (reason.action?.kind) {
    case 'count':
      return [countOf(state)]
    case 'test':
    case 'calibrate':
      return testOf(state, reason)
    case 'repair':
      return [...repairOf(state, reason), ...gapsOf(state, reason).flatMap((gap) => fillings(sources, gap))]
    case 'find':
      return [...findingOf(state, reason), ...gapsOf(state, reason).flatMap((gap) => fillings(sources, gap))]
    case 'replace':
    case 'buy':
      return gapsOf(state, reason).flatMap((gap) => fillings(sources, gap))
    default:
      return []
  }
}

function countOf({ kit }: KitState): Work {
  return {
    text: `Count ${kit.designation}`,
    minutes: MINUTES.count,
    steps: [{ kind: 'count', kitId: kit.id }],
    uses: [],
  }
}

/** A heat test speaks for its band alone; of the others one covers every band. */
function testOf(state: KitState, { procedure, itemId, band }: Reason): Work[] {
  if (!procedure) return []
  const item = state.items.find(({ id }) => id === itemId)
  const name = item?.designation ?? state.kit.designation
  const on = procedure === 'heat-test' ? band : null
  return [
    {
      text: `${capital(PROCEDURE_WORDS[procedure])} of ${name}${onBand(on)}${item ? ` (${state.kit.designation})` : ''}`,
      minutes: MINUTES[procedure],
      steps: [{ kind: 'pass', subjectId: item?.id ?? state.kit.id, procedure, band: on }],
      uses: [],
    },
  ]
}

function repairOf(state: KitState, reason: Reason): Work[] {
  const [test] = testOf(state, reason)
  const item = state.items.find(({ id }) => id === reason.itemId)
  if (!test || !item) return []
  const text = `Put ${item.designation} of ${state.kit.designation} right, then ${PROCEDURE_WORDS[reason.procedure!]}`
  return [{ ...test, text, minutes: REPAIR_MINUTES + test.minutes }]
}

function findingOf(state: KitState, { itemId }: Reason): Work[] {
  const item = state.items.find(({ id }) => id === itemId)
  if (!item) return []
  return [
    {
      text: `Fetch ${item.designation} for ${state.kit.designation}`,
      minutes: FETCH_MINUTES,
      steps: [{ kind: 'find', itemId: item.id }],
      uses: [],
    },
  ]
}

/** The position to fill: the reason's own, else every one that holds a battery, for hours that fall short. */
function gapsOf(state: KitState, { itemId, positionId }: Reason): Gap[] {
  const old = state.items.find(({ id }) => id === itemId)
  if (positionId !== null) return [{ state, positionId, old }]
  return state.positions
    .filter(({ category }) => category === 'battery')
    .map((position) => ({
      state,
      positionId: position.id,
      old: state.items.find((item) => item.positionId === position.id),
    }))
}
