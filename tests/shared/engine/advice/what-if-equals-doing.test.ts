import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { applyStep } from '#shared/engine/advice/apply-steps.ts'
import { doable, tellSteps } from '#shared/engine/advice/doable-steps.ts'
import type { WhatIfStep } from '#shared/engine/advice/steps.ts'
import { whatIf } from '#shared/engine/advice/what-if.ts'
import { worldOf } from '#shared/engine/advice/world.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { NOW } from '../readiness/support/arbitrary-items.ts'
import { HF } from '../readiness/support/sample-kits.ts'
import { RUNS, SLOW } from '../readiness/support/runs.ts'
import { arbitraryRegistry, arbitrarySteps } from './support/arbitrary-steps.ts'
import { done, kitsOf, registryOf, sparesOf, type Registry } from './support/registry.ts'
import { renamed } from './support/renamed.ts'

/** Random steps; those that do not fit where they stand are left out. */
const cases = arbitraryRegistry.chain((registry) =>
  arbitrarySteps(registry).map((steps) => ({ registry, steps: fitting(registry, steps) })),
)

function fitting(registry: Registry, steps: readonly WhatIfStep[]): WhatIfStep[] {
  let world = worldOf(kitsOf(registry), sparesOf(registry))
  return steps.filter((step) => {
    const next = applyStep(world, step, NOW)
    if (isFailure(next)) return false
    world = next
    return true
  })
}

const asked = (registry: Registry, steps: readonly WhatIfStep[]) => {
  const answer = whatIf(kitsOf(registry), sparesOf(registry), steps, NOW)
  if (isFailure(answer)) throw new Error(answer.message)
  return answer
}

const told = (registry: Registry, steps: readonly WhatIfStep[]) => {
  const answer = tellSteps(worldOf(kitsOf(registry), sparesOf(registry)), steps, NOW)
  if (isFailure(answer)) throw new Error(answer.message)
  return answer
}

const timelines = (states: readonly KitState[]) =>
  new Map(states.map((state) => [state.kit.id, kitTimeline(state, NOW)]))

describe('a what-if', SLOW, () => {
  it('says of every kit what doing it says, for all time to come', () => {
    fc.assert(
      fc.property(cases, ({ registry, steps }) => {
        const before = timelines(kitsOf(registry))
        const foretold = new Map(
          asked(registry, steps).map(({ before: { kit }, becomes }) => [kit.id, becomes]),
        )
        const after = timelines(kitsOf(steps.reduce(done, registry)))
        for (const [id, periods] of after) expect(foretold.get(id) ?? before.get(id)).toEqual(periods)
      }),
      RUNS,
    )
  })

  it('tells the same of the steps that can be done at once as of doing only those', () => {
    fc.assert(
      fc.property(cases, ({ registry, steps }) => {
        const now = doable(told(registry, steps))
        const foretold = new Map(
          asked(registry, now).map(({ before: { kit }, becomes }) => [kit.id, becomes]),
        )
        const before = timelines(kitsOf(registry))
        for (const [id, periods] of timelines(kitsOf(now.reduce(done, registry))))
          expect(foretold.get(id) ?? before.get(id)).toEqual(periods)
      }),
      RUNS,
    )
  })

  it('keeps every part in its place that a waiting step is to replace', () => {
    fc.assert(
      fc.property(cases, ({ registry, steps }) => {
        const all = told(registry, steps)
        const waitedFor = all.flatMap(({ step, waits }) =>
          waits !== null && (step.kind === 'buy' || step.kind === 'move')
            ? [`${step.kitId} ${step.positionId}`]
            : [],
        )
        const after = doable(all).reduce(done, registry)
        for (const { item, kitId } of registry.items.filter(({ item: one, kitId: kit }) =>
          waitedFor.includes(`${kit} ${one.positionId}`),
        ))
          expect(after.items.find((one) => one.item.id === item.id)).toMatchObject({
            kitId,
            item: { positionId: item.positionId },
          })
      }),
      RUNS,
    )
  })
})

describe('what can be done at once', () => {
  const one = HF
  const registry = registryOf([one, renamed(one, ' other')])
  const idOf = (category: string) => one.items.find((item) => item.category === category)!.id
  const positionOf = (category: string) =>
    one.positions.find((position) => position.category === category)!.id
  const waiting = (steps: readonly WhatIfStep[]) => told(registry, steps).map(({ waits }) => waits !== null)

  it('leaves a part where it is that is to be replaced by a bought one', () => {
    expect(
      waiting([
        { kind: 'buy', kitId: 'K-90', positionId: positionOf('radio') },
        { kind: 'take-out', itemId: idOf('radio') },
      ]),
    ).toEqual([true, true])
  })

  it('leaves the old part in where the one that follows it waits for a purchase elsewhere', () => {
    expect(
      waiting([
        { kind: 'buy', kitId: 'K-90', positionId: positionOf('radio') },
        { kind: 'take-out', itemId: `${idOf('radio')} other` },
        { kind: 'move', itemId: idOf('radio'), kitId: 'K-90 other', positionId: positionOf('radio') },
      ]),
    ).toEqual([true, true, true])
  })

  it('swaps two parts, and leaves the tests after it', () => {
    const [here, there] = [idOf('radio'), `${idOf('radio')} other`]
    const to = { positionId: positionOf('radio') }
    expect(
      waiting([
        { kind: 'take-out', itemId: here },
        { kind: 'move', itemId: there, kitId: 'K-90', ...to },
        { kind: 'move', itemId: here, kitId: 'K-90 other', ...to },
        { kind: 'pass', subjectId: here, procedure: 'radio-check', band: null },
        { kind: 'count', kitId: 'K-90' },
      ]),
    ).toEqual([false, false, false, true, true])
  })

  it('calls a kit available again only where nothing of it waits', () => {
    expect(
      waiting([
        { kind: 'back', kitId: 'K-90' },
        { kind: 'count', kitId: 'K-90 other' },
        { kind: 'back', kitId: 'K-90 other' },
      ]),
    ).toEqual([false, true, true])
  })

  it('names every step in plain words', () => {
    const { id } = one.items.find((item) => item.category === 'radio')!
    const accept = { reason: 'no time', untilAt: '2027-01-01T00:00:00Z', by: 'Tobin Ashgrove' }
    const skipped = {
      kind: 'skip',
      kitId: 'K-90',
      subjectId: id,
      procedure: 'radio-check',
      band: null,
    } as const
    expect(
      told(registry, [
        { kind: 'take-out', itemId: id },
        { kind: 'move', itemId: id, kitId: 'K-90', positionId: positionOf('radio') },
        { kind: 'buy', kitId: 'K-90', positionId: positionOf('charger') },
        { ...skipped, accept: null },
        { ...skipped, accept },
      ]).map(({ text }) => text),
    ).toEqual([
      `Take ${id} out of K-90`,
      `Put ${id} into K-90`,
      'Buy a new charger for K-90',
      `Skip the radio check of ${id} (K-90)`,
      `Skip the radio check of ${id} (K-90) and accept the risk`,
    ])
  })
})
