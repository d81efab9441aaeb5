import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checksAt } from '#shared/engine/readiness/checks.ts'
import { fixList } from '#shared/engine/readiness/fix-list.ts'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { RUNS, SLOW } from './support/runs.ts'
import { hoursFromNow, NOW } from './support/arbitrary-items.ts'
import { arbitraryKit, decision } from './support/arbitrary-kits.ts'
import { demoPolicy } from './support/policy.ts'

/** Random kits with decisions and a second policy to come: whatever they say, the shape of the answer holds. */

const anyKit: fc.Arbitrary<KitState> = fc
  .record({
    state: arbitraryKit,
    decisions: fc.array(decision, { maxLength: 2 }),
    policyComes: fc.option(hoursFromNow(-1000, 4000)),
  })
  .map(({ state, decisions, policyComes }) => ({
    ...state,
    decisions,
    policies:
      policyComes === null
        ? state.policies
        : [
            ...state.policies,
            demoPolicy('antenna-sweep', { intervalMonths: 18 }, { id: 'next', effectiveFrom: policyComes }),
          ],
  }))

const start = hoursFromNow(-8000, 2000)

describe('a timeline', SLOW, () => {
  it('tiles time from its start without gap, overlap or end', () => {
    fc.assert(
      fc.property(anyKit, start, (state, from) => {
        const periods = kitTimeline(state, from)
        expect(periods[0]?.from).toBe(from)
        expect(periods.map(({ to }) => to)).toEqual([...periods.slice(1).map((next) => next.from), null])
        for (const { from: begins, to } of periods) if (to !== null) expect(to).toBeGreaterThan(begins)
      }),
      RUNS,
    )
  })

  it('has no two neighbours alike', () => {
    const said = ({ from: _from, to: _to, ...rest }: Period) => JSON.stringify(rest)
    fc.assert(
      fc.property(anyKit, start, (state, from) => {
        const periods = kitTimeline(state, from).map(said)
        periods.forEach((period, index) => expect(period).not.toBe(periods[index + 1]))
      }),
      RUNS,
    )
  })

  it('is the same for the same state, which it leaves untouched', () => {
    fc.assert(
      fc.property(anyKit, start, (state, from) => {
        const copy = structuredClone(state)
        const first = kitTimeline(state, from)
        expect(kitTimeline(state, from)).toEqual(first)
        expect(kitTimeline(copy, from)).toEqual(first)
        expect(state).toEqual(copy)
      }),
      RUNS,
    )
  })

  it('does not depend on the order in which tests and checks are given', () => {
    fc.assert(
      fc.property(anyKit, start, (state, from) => {
        const turned = { ...state, evidence: [...state.evidence].reverse() }
        expect(kitTimeline(turned, from)).toEqual(kitTimeline(state, from))
      }),
      RUNS,
    )
  })

  it('started later says what the earlier one says of that time', () => {
    fc.assert(
      fc.property(anyKit, start, fc.integer({ min: 1, max: 8000 }), (state, from, hours) => {
        const later = from + hours * 3_600_000
        const rest = kitTimeline(state, from).filter(({ to }) => to === null || to > later)
        expect(kitTimeline(state, later)).toEqual(
          rest.map((period, index) => (index === 0 ? { ...period, from: later } : period)),
        )
      }),
      RUNS,
    )
  })

  it('says within a period what it says at its start', () => {
    fc.assert(
      fc.property(anyKit, (state) => {
        for (const period of kitTimeline(state, NOW)) {
          const last = (period.to ?? period.from + 86_400_000) - 1
          const [then] = kitTimeline(state, last)
          expect({ ...then, from: period.from, to: period.to }).toEqual(period)
        }
      }),
      RUNS,
    )
  })

  it('gives a verdict that its reasons explain, and the other way about', () => {
    const LEVELS = { 'not-fit': 'not-fit', 'not-proven': 'not-proven', limit: 'proven-with-limits' } as const
    fc.assert(
      fc.property(anyKit, start, (state, from) => {
        for (const { verdict, reasons } of kitTimeline(state, from)) {
          const heaviest = (['not-fit', 'not-proven', 'limit'] as const).find((level) =>
            reasons.some((reason) => reason.level === level),
          )
          expect(verdict).toBe(heaviest ? LEVELS[heaviest] : 'proven')
          expect(new Set(reasons.map(({ text }) => text)).size).toBe(reasons.length)
        }
      }),
      RUNS,
    )
  })

  it('lists every reason that lowers a verdict in the fix list', () => {
    fc.assert(
      fc.property(anyKit, start, (state, from) => {
        for (const period of kitTimeline(state, from)) {
          const lowering = period.reasons.filter(({ level }) => level !== 'note').map(({ text }) => text)
          const fixed = fixList(period).flatMap(({ reasons }) => reasons)
          expect([...fixed].sort()).toEqual([...lowering].sort())
        }
      }),
      RUNS,
    )
  })

  it('has checks to list at any time, one a subject and procedure', () => {
    fc.assert(
      fc.property(anyKit, start, (state, from) => {
        const keys = checksAt(state, from).map(({ subjectId, procedure }) => `${subjectId} ${procedure}`)
        expect(new Set(keys).size).toBe(keys.length)
      }),
      RUNS,
    )
  })
})
