import { listText } from '../plain-words.ts'
import { failure, isFailure, type Outcome } from '../outcome.ts'
import type { EpochMs, Evidence, KitState } from '../readiness/types.ts'
import { boughtPart } from './bought-part.ts'
import { hypotheticalCount, passingTest } from './hypothetical-test.ts'
import { stepFailure } from './step-failure.ts'
import { boughtId, type WhatIfStep } from './steps.ts'
import { skip } from './skip-test.ts'
import {
  alone,
  findItem,
  mapStates,
  packed,
  putKit,
  putLoose,
  withItem,
  without,
  type World,
} from './world.ts'

/**
 * The world after these steps, at an instant. A failure names the step by its place, `steps[2]`: what it names is not
 * there, or does not fit.
 */
export function applySteps(world: World, steps: readonly WhatIfStep[], at: EpochMs): Outcome<World> {
  let now = world
  for (const [place, step] of steps.entries()) {
    const next = applyStep(now, step, at)
    if (isFailure(next)) return stepFailure(next, place)
    now = next
  }
  return now
}

const gone = (what: string) => failure('E_UNKNOWN', `There is no such ${what} in your group.`)

export function applyStep(world: World, step: WhatIfStep, at: EpochMs): Outcome<World> {
  switch (step.kind) {
    case 'move':
      return move(world, step)
    case 'take-out':
      return takeOut(world, step.itemId)
    case 'find':
      return find(world, step.itemId)
    case 'pass':
      return pass(world, step, at)
    case 'count':
      return onKit(world, step.kitId, (state) => {
        const counted = { ...state, kit: { ...state.kit, sealMatches: true } }
        return withTest(counted, hypotheticalCount(counted, at))
      })
    case 'back':
      return onKit(world, step.kitId, (state) => ({
        ...state,
        kit: { ...state.kit, availability: 'available', availabilityReason: '' },
      }))
    case 'buy':
      return buy(world, step)
    case 'skip':
      return skip(world, step, at)
  }
}

function onKit(world: World, kitId: string, change: (state: KitState) => KitState): Outcome<World> {
  const state = world.kits.get(kitId)
  return state ? putKit(world, change(state)) : gone('kit')
}

function move(world: World, { itemId, kitId, positionId }: WhatIfStep & { kind: 'move' }): Outcome<World> {
  const found = findItem(world, itemId)
  if (!found) return gone('item')
  if (found.state.kit.id === kitId && found.item.positionId === positionId)
    return failure('E_THERE', `${found.item.designation} is there already.`)
  const left = found.loose ? putLoose(world, itemId, null) : putKit(world, without(found.state, itemId))
  const kit = left.kits.get(kitId)
  if (!kit) return gone('kit')
  const position = kit.positions.find(({ id }) => id === positionId)
  if (!position) return gone('position')
  if (position.category !== found.item.category)
    return failure('E_CATEGORY', `${found.item.designation} does not belong in ${position.name}.`)
  const there = kit.items.filter((item) => item.positionId === positionId)
  if (there.length >= position.quantity)
    return failure(
      'E_FULL',
      `${position.name} of ${kit.kit.designation} is full: ${listText(there.map((item) => item.designation))}. ` +
        'Take that out first.',
    )
  return putKit(left, withItem(kit, found.loose ? found.state : alone(found), positionId))
}

function takeOut(world: World, itemId: string): Outcome<World> {
  const found = findItem(world, itemId)
  if (!found) return gone('item')
  if (found.loose) return failure('E_LOOSE', `${found.item.designation} is in no kit.`)
  return putLoose(putKit(world, without(found.state, itemId)), itemId, alone(found))
}

function find(world: World, itemId: string): Outcome<World> {
  const found = findItem(world, itemId)
  if (!found) return gone('item')
  if (found.item.condition !== 'missing' && found.item.condition !== 'away')
    return failure('E_THERE', `${found.item.designation} is neither missing nor away.`)
  const back = { ...found.item, condition: 'serviceable' as const, conditionReason: '' }
  const state = { ...found.state, items: found.state.items.map((one) => (one.id === itemId ? back : one)) }
  return found.loose ? putLoose(world, itemId, state) : putKit(world, state)
}

function pass(world: World, step: WhatIfStep & { kind: 'pass' }, at: EpochMs): Outcome<World> {
  if (step.procedure === 'count' && world.kits.has(step.subjectId))
    return applyStep(world, { kind: 'count', kitId: step.subjectId }, at)
  const knows = ({ kit, items, instruments }: KitState) =>
    kit.id === step.subjectId || [...items, ...instruments].some(({ id }) => id === step.subjectId)
  if (![...world.kits.values(), ...world.loose.values()].some(knows)) return gone('item or kit')
  // A calibration speaks for every kit that was tested with the instrument.
  return mapStates(world, (state) => (knows(state) ? withTest(state, passingTest(state, step, at)) : state))
}

function buy(world: World, { kitId, positionId }: WhatIfStep & { kind: 'buy' }): Outcome<World> {
  const position = world.kits.get(kitId)?.positions.find(({ id }) => id === positionId)
  if (!position) return gone('position')
  if (findItem(world, boughtId(kitId, positionId)))
    return failure('E_THERE', `A part for ${position.name} was bought already.`)
  return onKit(world, kitId, (state) => ({
    ...state,
    items: packed(state.items, boughtPart(state, position)),
  }))
}

function withTest(state: KitState, test: Evidence): KitState {
  return { ...state, evidence: [...state.evidence.filter(({ id }) => id !== test.id), test] }
}
