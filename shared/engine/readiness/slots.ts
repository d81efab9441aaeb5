import type { Category } from '../vocabulary.ts'
import { bringBackAction, fillAction, replaceAction } from './actions.ts'
import type { Moment } from './moment.ts'
import { reasonAbout, reasonOf } from './reason.ts'
import { brokenText, emptyText } from './sentences.ts'
import type { Reason } from './period-types.ts'
import type { Position, ReadinessItem } from './types.ts'

/** A position with the items in it that can work. */
export interface FilledPosition {
  readonly position: Position
  readonly items: readonly ReadinessItem[]
  readonly working: readonly ReadinessItem[]
}

export function fillPositions(moment: Moment): FilledPosition[] {
  const inspected = moment.state.items.map((item) => asInspected(moment, item))
  return moment.state.positions.map((position) => {
    const items = inspected.filter(({ positionId }) => positionId === position.id)
    return { position, items, working: items.filter(({ condition }) => condition === 'serviceable') }
  })
}

/** An inspection that says unserviceable holds until another one passes: nobody can type it away. */
function asInspected(moment: Moment, item: ReadinessItem): ReadinessItem {
  if (item.condition !== 'serviceable') return item
  const newest = moment.tests(item.id, 'inspection').find(({ recordedAt }) => recordedAt <= moment.at)
  if (newest?.finding !== 'fail') return item
  const found = newest.findings.find(({ finding }) => finding === 'fail')?.text ?? ''
  return { ...item, condition: 'unserviceable', conditionReason: found.replace(/^unserviceable: /, '') }
}

export function itemsOf(filled: readonly FilledPosition[], ...categories: Category[]): ReadinessItem[] {
  return filled
    .filter(({ position }) => categories.includes(position.category))
    .flatMap(({ working }) => working)
}

export function vitalItemsOf(filled: readonly FilledPosition[], ...categories: Category[]): ReadinessItem[] {
  return itemsOf(
    filled.filter(({ position }) => position.vital),
    ...categories,
  )
}

/** The load plan carries this category, and nowhere as vital: the kit can go without. */
export function isSupportingOnly(filled: readonly FilledPosition[], category: Category): boolean {
  const positions = filled.filter(({ position }) => position.category === category)
  return positions.length > 0 && positions.every(({ position }) => !position.vital)
}

/** What is wrong with the positions themselves: empty, or held by something that cannot work. */
export function positionReasons(filled: readonly FilledPosition[]): Reason[] {
  return filled.flatMap(({ position, items, working }) => {
    if (working.length >= position.quantity) return []
    const level = position.vital ? 'not-fit' : 'limit'
    const broken = items.filter(({ condition }) => condition !== 'serviceable')
    const short = items.length < position.quantity ? [emptyReason(position, items.length, level)] : []
    return [...broken.map((item) => brokenReason(position, item, level)), ...short]
  })
}

function brokenReason(position: Position, item: ReadinessItem, level: 'not-fit' | 'limit'): Reason {
  const gone = item.condition === 'missing' || item.condition === 'away'
  return reasonAbout(item, {
    code: `item-${item.condition}`,
    level,
    text: brokenText(item, position.name),
    positionId: position.id,
    action: gone ? bringBackAction(item.designation) : replaceAction(item.designation),
  })
}

function emptyReason(position: Position, held: number, level: 'not-fit' | 'limit'): Reason {
  return reasonOf({
    code: 'position-empty',
    level,
    text: emptyText(position, held),
    positionId: position.id,
    action: fillAction(position.name),
  })
}
