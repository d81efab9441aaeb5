import fc from 'fast-check'
import type { Decision, KitState, RaisedCheck, Rule } from '#shared/engine/readiness/types.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { DAY, hoursFromNow, itemsFor, seldom } from './arbitrary-items.ts'
import { arbitraryTest, provingTests } from './arbitrary-tests.ts'
import { DG, HF_E, PW, TB, VU, XB, type Kind } from './kinds.ts'
import { aKit } from './kits.ts'
import { DEMO_RULES, DEMO_1, aRule } from './policy.ts'

/** Random kits around one instant: all that is on record was recorded before it. */

const kinds: fc.Arbitrary<Kind> = fc
  .record({
    kind: fc.constantFrom(HF_E, VU, DG, XB, PW, TB),
    vital: fc.array(fc.boolean(), { minLength: 13, maxLength: 13 }),
    asPlanned: fc.boolean(),
    hours: fc.constantFrom(null, 12),
  })
  .map(({ kind, vital, asPlanned, hours }) => ({
    promise: { ...kind.promise, hours },
    positions: asPlanned
      ? kind.positions
      : kind.positions.map((position, index) => ({ ...position, vital: vital[index] ?? true })),
  }))

const rules: fc.Arbitrary<Rule[]> = fc
  .record({
    kept: fc.array(fc.integer({ min: 0, max: 9 }), {
      minLength: DEMO_RULES.length,
      maxLength: DEMO_RULES.length,
    }),
    vital: fc.array(fc.integer({ min: 0, max: 4 }), {
      minLength: DEMO_RULES.length,
      maxLength: DEMO_RULES.length,
    }),
    heatNamesBands: fc.boolean(),
    stricterWithAge: fc.boolean(),
  })
  .map(({ kept, vital, heatNamesBands, stricterWithAge }) => [
    ...DEMO_RULES.filter((_, index) => kept[index]).map((rule, index) => ({
      ...rule,
      vital: vital[index] !== 0,
      applies: rule.procedure === 'heat-test' && !heatNamesBands ? {} : rule.applies,
    })),
    ...(stricterWithAge
      ? [
          aRule({
            category: 'battery' as const,
            procedure: 'battery-capacity' as const,
            applies: { chemistry: 'lifepo4', minAgeYears: 3 },
            intervalMonths: 4,
          }),
        ]
      : []),
  ])

const raisedCheck = (state: KitState): fc.Arbitrary<RaisedCheck> =>
  fc
    .record({
      id: fc.uuid(),
      subjectId: fc.constantFrom(state.kit.id, ...state.items.map(({ id }) => id)),
      procedure: fc.constantFrom<RaisedCheck['procedure']>(
        'heat-test',
        'antenna-sweep',
        'feedline-loss',
        'radio-check',
        'battery-capacity',
        'count',
        'inspection',
      ),
      band: fc.constantFrom<Band | null>(null, null, '40 m', '10 m', '2 m'),
      doubtsEarlier: fc.boolean(),
      raisedAt: hoursFromNow(-9000, 3000),
      dueInDays: fc.integer({ min: 0, max: 60 }),
    })
    .map(({ dueInDays, raisedAt, ...rest }) => ({
      ...rest,
      raisedAt,
      reason: 'something happened',
      dueOn: new Date(raisedAt + dueInDays * DAY).toISOString().slice(0, 10),
    }))

export const decision: fc.Arbitrary<Decision> = fc
  .record({
    id: fc.uuid(),
    kind: fc.constantFrom<Decision['kind']>('lowered', 'risk-accepted'),
    toVerdict: fc.constantFrom('proven-with-limits' as const, 'not-proven' as const, 'not-fit' as const),
    from: hoursFromNow(-500, 5000),
    lasts: fc.option(fc.integer({ min: 1, max: 2000 })),
  })
  .map(({ lasts, from, ...rest }) => ({
    ...rest,
    from,
    until: lasts === null ? null : from + lasts * 3_600_000,
    reason: 'a smell',
    by: 'Ines Calderwick',
  }))

/** Wattmeter W-1 is calibrated now and then, W-2 never. */
const INSTRUMENTS = ['W-1', 'W-2'].map((id) => ({ id, designation: id, category: 'wattmeter' as const }))

const withRecord = (state: KitState): fc.Arbitrary<KitState> =>
  fc
    .record({
      proofs: provingTests(state),
      tests: fc.array(arbitraryTest(state), { maxLength: 6 }),
      raisedChecks: fc.array(raisedCheck(state), { maxLength: 2 }),
      sealMatches: seldom(fc.constant(false), fc.constant(true), 20),
    })
    .map(({ proofs, tests, raisedChecks, sealMatches }) => ({
      ...state,
      evidence: [...proofs, ...tests].sort((a, b) => a.performedAt - b.performedAt),
      raisedChecks: [...raisedChecks].sort((a, b) => a.raisedAt - b.raisedAt),
      kit: { ...state.kit, sealMatches },
      instruments: INSTRUMENTS,
    }))

/** A kit without decisions under one policy: nothing but time, evidence and events speaks. */
export const arbitraryKit: fc.Arbitrary<KitState> = kinds
  .chain((kind) => itemsFor(kind).map((items) => aKit('K-1', kind, items)))
  .chain((state) =>
    rules.map((list) => ({ ...state, policies: [{ ...DEMO_1, effectiveFrom: 0, rules: list }] })),
  )
  .chain(withRecord)
