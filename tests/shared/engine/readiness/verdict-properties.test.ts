import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { VERDICTS } from '#shared/engine/vocabulary.ts'
import { RUNS, SLOW } from './support/runs.ts'
import { NOW } from './support/arbitrary-items.ts'
import { arbitraryKit, decision } from './support/arbitrary-kits.ts'
import { passingTest } from './support/arbitrary-tests.ts'
import { withoutItem, withoutTests, withTests } from './support/kits.ts'

/** What may and may not move a verdict (design, section 4). All evidence is on record before the timeline begins. */

const rank = ({ verdict }: Pick<Period, 'verdict'>) => VERDICTS.indexOf(verdict)
const STATES = ['proven', 'limited', 'not-proven', 'out'] as const
const bandRanks = ({ capability }: Period) => capability.bands.map(({ state }) => STATES.indexOf(state))

/** What two timelines from one instant say at every instant at which either changes. */
function atEachStep(a: KitState, b: KitState): { at: number; a: Period; b: Period }[] {
  const [first, second] = [kitTimeline(a, NOW), kitTimeline(b, NOW)]
  const starts = [...new Set([...first, ...second].map(({ from }) => from))]
  const within = (periods: readonly Period[], when: number) => periods.findLast(({ from }) => from <= when)!
  return starts.map((at) => ({ at, a: within(first, at), b: within(second, at) }))
}

const isNoBetter = (worse: Period, better: Period) =>
  expect(
    rank(worse),
    `${better.verdict} before: ${worse.reasons.map(({ text }) => text).join('; ')} | ${better.reasons
      .map(({ text }) => text)
      .join('; ')}`,
  ).toBeGreaterThanOrEqual(rank(better))

const withDecisions = fc
  .record({ state: arbitraryKit, decisions: fc.array(decision, { minLength: 1, maxLength: 2 }) })
  .map(({ state, decisions }) => ({ ...state, decisions }))

describe('without new evidence', SLOW, () => {
  it('a verdict never improves with time', () => {
    fc.assert(
      fc.property(arbitraryKit, (state) => {
        const periods = kitTimeline(state, NOW)
        periods.slice(1).forEach((period, index) => isNoBetter(period, periods[index]!))
      }),
      RUNS,
    )
  })

  it('no band improves with time', () => {
    fc.assert(
      fc.property(arbitraryKit, (state) => {
        const ranks = kitTimeline(state, NOW).map(bandRanks)
        ranks
          .slice(1)
          .forEach((bands, index) =>
            bands.forEach((state_, band) => expect(state_).toBeGreaterThanOrEqual(ranks[index]![band]!)),
          )
      }),
      RUNS,
    )
  })

  it('a verdict improves only where a lowering by a person ends', () => {
    fc.assert(
      fc.property(withDecisions, (state) => {
        const ends = state.decisions.filter(({ kind }) => kind === 'lowered').map(({ until }) => until)
        const periods = kitTimeline(state, NOW)
        periods.slice(1).forEach((period, index) => {
          if (!ends.includes(period.from)) isNoBetter(period, periods[index]!)
        })
      }),
      RUNS,
    )
  })
})

describe('a person', SLOW, () => {
  it('never raises a verdict', () => {
    fc.assert(
      fc.property(withDecisions, (state) => {
        for (const { a, b } of atEachStep(state, { ...state, decisions: [] })) isNoBetter(a, b)
      }),
      RUNS,
    )
  })

  it('changes no verdict by accepting a risk', () => {
    fc.assert(
      fc.property(withDecisions, (state) => {
        const accepted = state.decisions.map((one) => ({ ...one, kind: 'risk-accepted' as const }))
        for (const { a, b } of atEachStep({ ...state, decisions: accepted }, { ...state, decisions: [] }))
          expect(a.verdict).toBe(b.verdict)
      }),
      RUNS,
    )
  })
})

describe('a passing test', SLOW, () => {
  /**
   * Real conflicts are kept out by construction and shown one by one in `test-conflicts.test.ts`: a newer pass with a
   * smaller figure, and a calibration that shows an instrument to have lapsed.
   */
  const tested = arbitraryKit.chain((state) => passingTest(state).map((test) => ({ state, test })))

  it('never lowers a verdict', () => {
    fc.assert(
      fc.property(tested, ({ state, test }) => {
        for (const { a, b } of atEachStep(state, withTests(state, test))) isNoBetter(a, b)
      }),
      RUNS,
    )
  })

  it('never lowers a band', () => {
    fc.assert(
      fc.property(tested, ({ state, test }) => {
        for (const { a, b } of atEachStep(state, withTests(state, test)))
          bandRanks(a).forEach((without, band) => expect(without).toBeGreaterThanOrEqual(bandRanks(b)[band]!))
      }),
      RUNS,
    )
  })
})

describe('removing an item', SLOW, () => {
  const removed = arbitraryKit
    .filter(({ items }) => items.length > 0)
    .chain((state) => fc.constantFrom(...state.items).map((item) => ({ state, item })))

  it('never raises a verdict, with or without its record', () => {
    fc.assert(
      fc.property(removed, ({ state, item }) => {
        const less = withoutItem(state, item.id)
        const unrecorded = withoutTests(less, ({ subjectId }) => subjectId === item.id)
        for (const { a, b } of atEachStep(less, state)) isNoBetter(a, b)
        for (const { a, b } of atEachStep(unrecorded, state)) isNoBetter(a, b)
      }),
      RUNS,
    )
  })
})
