import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import type { WhatIfStep } from '#shared/engine/advice/steps.ts'
import { whatIf, type WhatIfKit } from '#shared/engine/advice/what-if.ts'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { PROCEDURES, VERDICTS } from '#shared/engine/vocabulary.ts'
import { NOW } from '../readiness/support/arbitrary-items.ts'
import { arbitraryKit } from '../readiness/support/arbitrary-kits.ts'
import { HF } from '../readiness/support/sample-kits.ts'
import { RUNS, SLOW } from '../readiness/support/runs.ts'
import { renamed } from './support/renamed.ts'

const after = (kits: readonly KitState[], spares: readonly KitState[], steps: readonly WhatIfStep[]) => {
  const answer = whatIf(kits, spares, steps, NOW)
  if (isFailure(answer)) throw new Error(answer.message)
  return answer
}
const rank = ([first]: WhatIfKit['was']) => VERDICTS.indexOf(first!.verdict)
const withAnItem = arbitraryKit
  .filter(({ items }) => items.some(({ positionId }) => positionId !== null))
  .chain((state) => fc.constantFrom(...state.items).map((item) => ({ state, item })))

describe('what-if', SLOW, () => {
  it('without steps changes nothing', () => {
    fc.assert(
      fc.property(arbitraryKit, (state) => {
        expect(after([state], [], [])).toEqual([])
      }),
      RUNS,
    )
  })

  it('leaves the states that it was given untouched', () => {
    fc.assert(
      fc.property(withAnItem, ({ state, item }) => {
        const copy = structuredClone(state)
        after(
          [state],
          [],
          [
            { kind: 'take-out', itemId: item.id },
            { kind: 'count', kitId: state.kit.id },
          ],
        )
        expect(state).toEqual(copy)
      }),
      RUNS,
    )
  })

  it('never raises a verdict by taking an item out', () => {
    fc.assert(
      fc.property(withAnItem, ({ state, item }) => {
        const [kit] = after([state], [], [{ kind: 'take-out', itemId: item.id }])
        expect(rank(kit!.becomes)).toBeGreaterThanOrEqual(rank(kit!.was))
      }),
      RUNS,
    )
  })

  it('has an item that was taken out and put back as it was, for all time to come', () => {
    fc.assert(
      fc.property(withAnItem, ({ state, item }) => {
        const [kit] = after(
          [state],
          [],
          [
            { kind: 'take-out', itemId: item.id },
            { kind: 'move', itemId: item.id, kitId: state.kit.id, positionId: item.positionId! },
          ],
        )
        expect(kit!.becomes.map(({ from, verdict }) => [from, verdict])).toEqual(
          kitTimeline(state, NOW).map(({ from, verdict }) => [from, verdict]),
        )
      }),
      RUNS,
    )
  })

  it('never raises the verdict of the kit that gives an item away', () => {
    fc.assert(
      fc.property(withAnItem, ({ state, item }) => {
        const other = renamed(state, ' other')
        const room = { kind: 'take-out', itemId: `${item.id} other` } as const
        const step = {
          kind: 'move',
          itemId: item.id,
          kitId: other.kit.id,
          positionId: item.positionId!,
        } as const
        const giver = after([state, other], [], [room, step]).find(({ before }) => before === state)
        expect(rank(giver!.becomes)).toBeGreaterThanOrEqual(rank(giver!.was))
      }),
      RUNS,
    )
  })

  it('never lowers a verdict by a test that passes', () => {
    const tested = withAnItem.chain(({ state, item }) =>
      fc
        .constantFrom(
          ...PROCEDURES.filter((procedure) => procedure !== 'calibration' && procedure !== 'count'),
        )
        .map((procedure) => ({ state, item, procedure })),
    )
    fc.assert(
      fc.property(tested, ({ state, item, procedure }) => {
        const [kit] = after([state], [], [{ kind: 'pass', subjectId: item.id, procedure, band: null }])
        expect(rank(kit!.becomes)).toBeLessThanOrEqual(rank(kit!.was))
      }),
      RUNS,
    )
  })

  it('changes the availability of a kit that comes back and nothing of its verdict', () => {
    fc.assert(
      fc.property(arbitraryKit, (state) => {
        const out = { ...state, kit: { ...state.kit, availability: 'out-of-service' as const } }
        const [kit] = after([out], [], [{ kind: 'back', kitId: out.kit.id }])
        expect(kit!.becomes[0]!.availability).toBe('available')
        expect(rank(kit!.becomes)).toBe(rank(kit!.was))
      }),
      RUNS,
    )
  })

  it('names the step that does not fit, and why', () => {
    const [state] = fc.sample(withAnItem, { numRuns: 1, seed: RUNS.seed })
    const answer = whatIf(
      [state!.state],
      [],
      [
        { kind: 'count', kitId: state!.state.kit.id },
        { kind: 'take-out', itemId: 'nobody' },
      ],
      NOW,
    )
    expect(answer).toMatchObject({ code: 'E_UNKNOWN', field: 'steps[1]' })
  })

  it('refuses to put a second thing where there is room for one', () => {
    const state = HF
    const other = renamed(state, ' other')
    const { id, positionId } = state.items.find(({ category }) => category === 'radio')!
    const step = { kind: 'move', itemId: id, kitId: other.kit.id, positionId: positionId! } as const
    expect(whatIf([state, other], [], [step], NOW)).toMatchObject({ code: 'E_FULL', field: 'steps[0]' })
  })
})
