import type { KitState, ReadinessItem } from '../readiness/types.ts'

/** Kits by id, and loose items by id, each with all that their readiness depends on. */
export interface World {
  readonly kits: ReadonlyMap<string, KitState>
  /** The state of a loose item: no promise, no positions, one item. */
  readonly loose: ReadonlyMap<string, KitState>
}

export function worldOf(kits: readonly KitState[], spares: readonly KitState[]): World {
  return {
    kits: new Map(kits.map((state) => [state.kit.id, state])),
    loose: new Map(spares.flatMap((state) => state.items.map((item) => [item.id, state] as const))),
  }
}

export interface Found {
  readonly state: KitState
  readonly item: ReadinessItem
  readonly loose: boolean
}

export function findItem(world: World, itemId: string): Found | undefined {
  const spare = world.loose.get(itemId)
  if (spare) return { state: spare, item: itemIn(spare, itemId)!, loose: true }
  for (const state of world.kits.values()) {
    const item = itemIn(state, itemId)
    if (item) return { state, item, loose: false }
  }
  return undefined
}

function itemIn(state: KitState, itemId: string): ReadinessItem | undefined {
  return state.items.find(({ id }) => id === itemId)
}

/** The item with its own record, as a loose one: what it takes along when it goes. */
export function alone({ state, item }: Pick<Found, 'state' | 'item'>): KitState {
  const own = state.evidence.filter(({ subjectId }) => subjectId === item.id)
  const used = new Set(own.map(({ instrumentId }) => instrumentId))
  return {
    kit: {
      id: item.id,
      designation: item.designation,
      availability: 'available',
      availabilityReason: '',
      sealMatches: true,
    },
    promise: { bands: [], modes: [], watts: null, hours: null },
    positions: [],
    items: [{ ...item, positionId: null }],
    evidence: state.evidence.filter(({ subjectId }) => subjectId === item.id || used.has(subjectId)),
    instruments: state.instruments.filter(({ id }) => used.has(id)),
    raisedChecks: state.raisedChecks.filter(({ subjectId }) => subjectId === item.id),
    decisions: [],
    policies: state.policies,
    zone: state.zone,
  }
}

/** The kit without the item and without what spoke of it alone. */
export function without(state: KitState, itemId: string): KitState {
  // What was measured with it still stands or falls with its calibrations.
  const measures = state.instruments.some(({ id }) => id === itemId)
  return {
    ...state,
    items: state.items.filter(({ id }) => id !== itemId),
    evidence: measures ? state.evidence : state.evidence.filter(({ subjectId }) => subjectId !== itemId),
    raisedChecks: state.raisedChecks.filter(({ subjectId }) => subjectId !== itemId),
  }
}

/** The kit with a loose item in one of its positions, and with the item's record. */
export function withItem(state: KitState, spare: KitState, positionId: string): KitState {
  const known = new Set(state.evidence.map(({ id }) => id))
  const instruments = new Set(state.instruments.map(({ id }) => id))
  return {
    ...state,
    items: spare.items.reduce((items, item) => packed(items, { ...item, positionId }), state.items),
    evidence: [...state.evidence, ...spare.evidence.filter(({ id }) => !known.has(id))],
    instruments: [...state.instruments, ...spare.instruments.filter(({ id }) => !instruments.has(id))],
    raisedChecks: [...state.raisedChecks, ...spare.raisedChecks],
  }
}

/** The items with one more, in the order in which the service reads them: reasons are told in that order. */
export function packed(items: KitState['items'], item: ReadinessItem): KitState['items'] {
  const place = items.findIndex((one) => isBefore(item, one))
  return place < 0 ? [...items, item] : items.toSpliced(place, 0, item)
}

const isBefore = (a: ReadinessItem, b: ReadinessItem) =>
  a.designation === b.designation ? a.id < b.id : a.designation < b.designation

export function putKit(world: World, state: KitState): World {
  return { ...world, kits: new Map(world.kits).set(state.kit.id, state) }
}

export function putLoose(world: World, itemId: string, spare: KitState | null): World {
  const loose = new Map(world.loose)
  if (spare) loose.set(itemId, spare)
  else loose.delete(itemId)
  return { ...world, loose }
}

/** Changes every state, of kits and of loose items. */
export function mapStates(world: World, change: (state: KitState) => KitState): World {
  const all = (states: World['kits']) => new Map([...states].map(([id, state]) => [id, change(state)]))
  return { kits: all(world.kits), loose: all(world.loose) }
}
