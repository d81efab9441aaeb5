import type { Category } from '../vocabulary.ts'
import { reasonOf } from './reason.ts'
import { FETCH_MINUTES, replaceAction } from './sentences.ts'
import type { KitState, Position, ReadinessItem, Reason } from './types.ts'

/** A position with the items in it that can work. */
export interface FilledPosition {
  readonly position: Position
  readonly items: readonly ReadinessItem[]
  readonly working: readonly ReadinessItem[]
}

export function fillPositions(state: KitState): FilledPosition[] {
  return state.positions.map((position) => {
    const items = state.items.filter(({ positionId }) => positionId === position.id)
    return { position, items, working: items.filter(({ condition }) => condition === 'serviceable') }
  })
}

export function itemsOf(filled: readonly FilledPosition[], ...categories: Category[]): ReadinessItem[] {
  return filled
    .filter(({ position }) => categories.includes(position.category))
    .flatMap(({ working }) => working)
}

/** What is wrong with the positions themselves: empty, or held by something that cannot work. */
export function positionReasons(filled: readonly FilledPosition[]): Reason[] {
  return filled.flatMap(({ position, items, working }) => {
    if (working.length >= position.quantity) return []
    const level = position.vital ? 'not-fit' : 'limit'
    const broken = items.filter(({ condition }) => condition !== 'serviceable')
    if (broken.length > 0) return broken.map((item) => brokenReason(position, item, level))
    return [emptyReason(position, items.length, level)]
  })
}

const CONDITION_WORDS = { unserviceable: 'unserviceable', missing: 'missing', away: 'away' } as const

function brokenReason(position: Position, item: ReadinessItem, level: 'not-fit' | 'limit'): Reason {
  const word = item.condition === 'serviceable' ? '' : CONDITION_WORDS[item.condition]
  const why = item.conditionReason ? `: ${item.conditionReason}` : ''
  const gone = item.condition === 'missing' || item.condition === 'away'
  return reasonOf({
    code: `item-${item.condition}`,
    level,
    text: `${item.designation} (${position.name}) is ${word}${why}`,
    positionId: position.id,
    itemId: item.id,
    action: gone
      ? { kind: 'find', text: `Bring ${item.designation} back, or replace it`, minutes: FETCH_MINUTES }
      : replaceAction(item.designation),
  })
}

function emptyReason(position: Position, held: number, level: 'not-fit' | 'limit'): Reason {
  const text =
    position.quantity === 1
      ? `Position ${position.name} is empty`
      : `Position ${position.name} holds ${held} of ${position.quantity}`
  return reasonOf({
    code: 'position-empty',
    level,
    text,
    positionId: position.id,
    action: { kind: 'buy', text: `Find or buy what belongs in ${position.name}`, minutes: FETCH_MINUTES },
  })
}
