import { boughtPart } from '#shared/engine/advice/bought-part.ts'
import { hypotheticalCount, passingTest } from '#shared/engine/advice/hypothetical-test.ts'
import { skippedTest } from '#shared/engine/advice/skip-test.ts'
import type { WhatIfStep } from '#shared/engine/advice/steps.ts'
import { alone } from '#shared/engine/advice/world.ts'
import type { Evidence, KitState, RaisedCheck, ReadinessItem } from '#shared/engine/readiness/types.ts'
import { NOW } from '../../readiness/support/arbitrary-items.ts'

/**
 * A registry as the database keeps it: flat lists, each thing once. What-if works on states of kits instead; that the
 * two agree after the same steps is what makes a what-if worth asking.
 */
export interface Registry {
  /** Kits without their items and records. */
  readonly kits: readonly KitState[]
  /** Each with the kit that it is in; null: it lies loose. */
  readonly items: readonly { readonly item: ReadinessItem; readonly kitId: string | null }[]
  readonly tests: readonly Evidence[]
  readonly raisedChecks: readonly RaisedCheck[]
  readonly instruments: KitState['instruments']
}

/** Designations are made unique, as they are in a group. */
export function registryOf(states: readonly KitState[]): Registry {
  const [first] = states
  const tests = new Map(states.flatMap(({ evidence }) => evidence).map((test) => [test.id, test]))
  return {
    kits: states.map((state) => ({ ...state, items: [], evidence: [], raisedChecks: [], instruments: [] })),
    items: states.flatMap(({ kit, items }) =>
      items.map((item) => ({ item: { ...item, designation: item.id }, kitId: kit.id })),
    ),
    tests: [...tests.values()].sort((a, b) => a.performedAt - b.performedAt),
    raisedChecks: states.flatMap(({ raisedChecks }) => raisedChecks),
    instruments: first!.instruments,
  }
}

/** Read as the service reads it: its own tests, the calibrations of the instruments that they name. */
export function kitsOf(registry: Registry): KitState[] {
  return registry.kits.map((kit) =>
    filled(
      registry,
      kit,
      registry.items
        .filter(({ kitId }) => kitId === kit.kit.id)
        .map(({ item }) => item)
        .sort((a, b) => (a.designation < b.designation ? -1 : 1)),
    ),
  )
}

export function sparesOf(registry: Registry): KitState[] {
  return registry.items
    .filter(({ kitId }) => kitId === null)
    .map(({ item }) => {
      const shell = alone({ state: registry.kits[0]!, item })
      return filled(registry, shell, [{ ...item, positionId: null }])
    })
}

function filled(registry: Registry, shell: KitState, items: readonly ReadinessItem[]): KitState {
  const subjects = new Set([shell.kit.id, ...items.map(({ id }) => id)])
  const own = registry.tests.filter(({ subjectId }) => subjects.has(subjectId))
  const used = new Set(own.map(({ instrumentId }) => instrumentId))
  const calibrations = registry.tests.filter(
    ({ subjectId, procedure }) => used.has(subjectId) && procedure === 'calibration',
  )
  const evidence = registry.tests.filter((test) => own.includes(test) || calibrations.includes(test))
  return {
    ...shell,
    items,
    evidence,
    instruments: registry.instruments.filter(({ id }) => used.has(id)),
    raisedChecks: registry.raisedChecks.filter(({ subjectId }) => subjects.has(subjectId)),
  }
}

/** Does one step as people would: an item goes, a test is recorded, a word is said. */
export function done(registry: Registry, step: WhatIfStep): Registry {
  const place = (itemId: string, kitId: string | null, positionId: string | null) => ({
    ...registry,
    items: registry.items.map((one) =>
      one.item.id === itemId ? { item: { ...one.item, positionId }, kitId } : one,
    ),
  })
  const kit = (kitId: string, change: (state: KitState) => KitState) => ({
    ...registry,
    kits: registry.kits.map((state) => (state.kit.id === kitId ? change(state) : state)),
  })
  switch (step.kind) {
    case 'move':
      return place(step.itemId, step.kitId, step.positionId)
    case 'take-out':
      return place(step.itemId, null, null)
    case 'find':
      return {
        ...registry,
        items: registry.items.map((one) =>
          one.item.id === step.itemId
            ? { ...one, item: { ...one.item, condition: 'serviceable', conditionReason: '' } }
            : one,
        ),
      }
    case 'back':
      return kit(step.kitId, (state) => ({
        ...state,
        kit: { ...state.kit, availability: 'available', availabilityReason: '' },
      }))
    case 'pass':
      return tested(registry, passingTest(knowing(registry, step.subjectId), step, NOW))
    case 'count': {
      const sealed = kit(step.kitId, (state) => ({ ...state, kit: { ...state.kit, sealMatches: true } }))
      const state = kitsOf(sealed).find((one) => one.kit.id === step.kitId)!
      return tested(sealed, hypotheticalCount(state, NOW))
    }
    case 'buy': {
      const state = kitsOf(registry).find((one) => one.kit.id === step.kitId)!
      const item = boughtPart(
        state,
        state.positions.find(({ id }) => id === step.positionId)!,
      )
      return { ...registry, items: [...registry.items, { item, kitId: step.kitId }] }
    }
    case 'skip':
      return step.accept ? kit(step.kitId, (state) => accepted(registry, state, step)) : registry
  }
}

function accepted(registry: Registry, shell: KitState, step: WhatIfStep & { kind: 'skip' }): KitState {
  const state = kitsOf(registry).find(({ kit }) => kit.id === shell.kit.id)!
  const { reason, untilAt, by } = step.accept!
  return {
    ...shell,
    decisions: [
      ...shell.decisions,
      {
        id: `done:${shell.decisions.length}`,
        kind: 'risk-accepted',
        toVerdict: null,
        reason: `${skippedTest(state, step)} skipped: ${reason}`,
        by,
        from: NOW,
        until: Date.parse(untilAt),
      },
    ],
  }
}

function tested(registry: Registry, test: Evidence): Registry {
  return { ...registry, tests: [...registry.tests.filter(({ id }) => id !== test.id), test] }
}

function knowing(registry: Registry, subjectId: string): KitState {
  const states = [...kitsOf(registry), ...sparesOf(registry)]
  return states.find(({ kit, items }) => kit.id === subjectId || items.some(({ id }) => id === subjectId))!
}
