import type { Evidence, ItemFacts, KitState, ReadinessItem } from '#shared/engine/readiness/types.ts'
import type { Kind } from './kinds.ts'
import { ZONE } from './instants.ts'
import { DEMO_1 } from './policy.ts'

export function anItem(
  part: Pick<ReadinessItem, 'id' | 'category'> & Partial<ReadinessItem> & { facts?: ItemFacts },
): ReadinessItem {
  return {
    designation: part.id,
    positionId: null,
    condition: 'serviceable',
    conditionReason: '',
    facts: {},
    ...part,
  }
}

/** A kit without evidence: the kind's positions, the items given. Items are known by their designation. */
export function aKit(id: string, kind: Kind, items: readonly ReadinessItem[]): KitState {
  return {
    kit: {
      id,
      designation: id,
      availability: 'available',
      availabilityReason: '',
      sealMatches: true,
    },
    promise: kind.promise,
    positions: kind.positions,
    items,
    evidence: [],
    instruments: [],
    raisedChecks: [],
    decisions: [],
    policies: [DEMO_1],
    zone: ZONE,
  }
}

/** The same kit with tests added, in the order of performance as the store gives them. */
export function withTests(state: KitState, ...tests: readonly Evidence[]): KitState {
  const evidence = [...state.evidence, ...tests].sort((a, b) => a.performedAt - b.performedAt)
  return { ...state, evidence }
}

export function withoutTests(state: KitState, unwanted: (test: Evidence) => boolean): KitState {
  return { ...state, evidence: state.evidence.filter((test) => !unwanted(test)) }
}

/** The same kit with these tests in the place of all of the same procedure and subject. */
export function retested(state: KitState, ...tests: readonly Evidence[]): KitState {
  const same = (a: Evidence) => tests.some((b) => a.procedure === b.procedure && a.subjectId === b.subjectId)
  return withTests(withoutTests(state, same), ...tests)
}

export function withItem(state: KitState, itemId: string, change: Partial<ReadinessItem>): KitState {
  return { ...state, items: state.items.map((item) => (item.id === itemId ? { ...item, ...change } : item)) }
}

export function withoutItem(state: KitState, itemId: string): KitState {
  return { ...state, items: state.items.filter(({ id }) => id !== itemId) }
}

/** The item in this position; the state is wrong for the test when there is none. */
export function itemIn(state: KitState, positionId: string): ReadinessItem {
  const item = state.items.find((one) => one.positionId === positionId)
  if (!item) throw new Error(`Nothing in ${positionId}`)
  return item
}

export function withKit(state: KitState, change: Partial<KitState['kit']>): KitState {
  return { ...state, kit: { ...state.kit, ...change } }
}
