import fc from 'fast-check'
import { boughtId, type WhatIfStep } from '#shared/engine/advice/steps.ts'
import { PROCEDURES, type Procedure } from '#shared/engine/vocabulary.ts'
import { NOW } from '../../readiness/support/arbitrary-items.ts'
import { arbitraryKit } from '../../readiness/support/arbitrary-kits.ts'
import { renamed } from './renamed.ts'
import { kitsOf, registryOf, type Registry } from './registry.ts'

/** Two kits of one kind or of two, some of their parts on a shelf. */
export const arbitraryRegistry: fc.Arbitrary<Registry> = fc
  .tuple(arbitraryKit, arbitraryKit, fc.boolean())
  .map(([one, two, alike]) => registryOf([one, renamed(alike ? one : two, ' other')]))
  .chain((registry) =>
    fc
      .array(fc.integer({ min: 0, max: 3 }), {
        minLength: registry.items.length,
        maxLength: registry.items.length,
      })
      .map((taken) => ({
        ...registry,
        items: registry.items.map(({ item, kitId }, place) =>
          taken[place] === 0 ? { item: { ...item, positionId: null }, kitId: null } : { item, kitId },
        ),
      })),
  )
  .chain((registry) =>
    fc.constantFrom('available' as const, 'out-of-service' as const).map((availability) => ({
      ...registry,
      kits: registry.kits.map((state) => ({ ...state, kit: { ...state.kit, availability } })),
    })),
  )

/** Steps about things that exist; many of them do not fit all the same. */
export function arbitrarySteps(registry: Registry): fc.Arbitrary<WhatIfStep[]> {
  const slots = kitsOf(registry).flatMap(({ kit, positions }) =>
    positions.map(({ id }) => ({ kitId: kit.id, positionId: id })),
  )
  const itemId = fc.constantFrom(
    ...registry.items.map(({ item }) => item.id),
    ...slots.slice(0, 3).map(({ kitId, positionId }) => boughtId(kitId, positionId)),
  )
  const slot = fc.constantFrom(...slots)
  const kitId = fc.constantFrom(...registry.kits.map(({ kit }) => kit.id))
  const procedure = fc.constantFrom<Procedure>(...PROCEDURES.filter((one) => one !== 'count'))
  const band = fc.constantFrom('40 m' as const, '2 m' as const, null)
  const accept = fc.option(
    fc.integer({ min: 1, max: 4000 }).map((hours) => ({
      reason: 'no time',
      untilAt: new Date(NOW + hours * 3_600_000).toISOString(),
      by: 'Tobin Ashgrove',
    })),
  )
  const swaps = registry.items.flatMap(({ item }) =>
    kitsOf(registry).flatMap(({ kit, positions }) =>
      positions
        .filter(({ category }) => category === item.category)
        .map(({ id }) => ({ kind: 'move' as const, itemId: item.id, kitId: kit.id, positionId: id })),
    ),
  )
  const step: fc.Arbitrary<WhatIfStep> = fc.oneof(
    { weight: 12, arbitrary: fc.constantFrom(...swaps) },
    fc.tuple(itemId, slot).map(([id, to]) => ({ kind: 'move' as const, itemId: id, ...to })),
    { weight: 3, arbitrary: itemId.map((id) => ({ kind: 'take-out' as const, itemId: id })) },
    itemId.map((id) => ({ kind: 'find' as const, itemId: id })),
    kitId.map((id) => ({ kind: 'back' as const, kitId: id })),
    kitId.map((id) => ({ kind: 'count' as const, kitId: id })),
    slot.map((to) => ({ kind: 'buy' as const, ...to })),
    fc.record({ kind: fc.constant('pass' as const), subjectId: itemId, procedure, band }),
    fc.record({ kind: fc.constant('skip' as const), kitId, subjectId: itemId, procedure, band, accept }),
  )
  return fc.array(step, { minLength: 1, maxLength: 12 })
}
