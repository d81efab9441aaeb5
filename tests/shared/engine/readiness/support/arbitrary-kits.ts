import fc from 'fast-check'
import type {
  Decision,
  ItemFacts,
  KitState,
  RaisedCheck,
  ReadinessItem,
  Rule,
} from '#shared/engine/readiness/types.ts'
import type { Band, Condition } from '#shared/engine/vocabulary.ts'
import { arbitraryTest, provingTests } from './arbitrary-tests.ts'
import { at } from './instants.ts'
import { DG, HF_E, PW, TB, VU, XB, type Kind } from './kinds.ts'
import { aKit, anItem } from './kits.ts'
import { DEMO_RULES, DEMO_1, aRule } from './policy.ts'

/** Random kits around one instant: all that is on record was recorded before it. */

export const NOW = at('2026-06-15 09:00')
export const DAY = 86_400_000

/** A whole number of hours before or after `NOW`. */
export const hoursFromNow = (from: number, to: number) =>
  fc.integer({ min: from, max: to }).map((hours) => NOW + hours * 3_600_000)

/** Mostly sound: a kit with a fault in every part says nothing about any of them. */
const seldom = <T>(rare: fc.Arbitrary<T>, usual: fc.Arbitrary<T>, weight = 12) =>
  fc.oneof({ weight, arbitrary: usual }, { weight: 1, arbitrary: rare })

const conditions = seldom<Condition>(
  fc.constantFrom<Condition>('unserviceable', 'missing', 'away'),
  fc.constant<Condition>('serviceable'),
  40,
)

const dayBefore = fc
  .integer({ min: 0, max: 6 * 365 })
  .map((days) => new Date(NOW - days * DAY).toISOString().slice(0, 10))

/** Facts that a category reads; each may be missing or odd. */
const factsFor = (promised: readonly Band[]): fc.Arbitrary<ItemFacts> =>
  fc
    .record({
      bands: seldom<readonly Band[]>(
        fc.subarray<Band>(['40 m', '20 m', '10 m', '2 m']),
        fc.constant(promised),
      ),
      ratedWatts: seldom<number | undefined>(fc.constantFrom(20, 50, 99, undefined), fc.constant(100)),
      ratedAh: seldom<number | undefined>(fc.constantFrom(5, undefined), fc.constant(50)),
      chemistry: fc.constantFrom('lifepo4', 'agm', 'nimh'),
      ratedA: seldom<number | undefined>(fc.constantFrom(5, 8, 13, 15, undefined), fc.constant(25)),
      drawA: seldom<ItemFacts['drawA'] | undefined>(fc.constant(undefined), fc.constant(DRAW)),
      meanLoadA: seldom<number | undefined>(fc.constantFrom(12, undefined), fc.constant(2)),
      lossDb: seldom<ItemFacts['lossDb'] | undefined>(fc.constant(undefined), fc.constant(LOSS)),
      acquiredOn: seldom<string | undefined>(fc.constant(undefined), dayBefore),
    })
    .map((facts) => JSON.parse(JSON.stringify(facts)) as ItemFacts)

const DRAW = [
  { watts: 20, amps: 8 },
  { watts: 50, amps: 13 },
  { watts: 100, amps: 20 },
]
const LOSS = { '40 m': 0.4, '20 m': 0.6, '15 m': 0.7, '10 m': 0.9, '2 m': 1.4, '70 cm': 1.4 }

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

const itemsFor = ({ positions, promise }: Kind): fc.Arbitrary<ReadinessItem[]> => {
  const places = positions.flatMap((position) =>
    Array.from({ length: position.quantity }, (_, index) => ({ position, id: `${position.id} ${index}` })),
  )
  const item = ({ position, id }: (typeof places)[number]) =>
    fc
      .record({
        condition: conditions,
        facts: factsFor(promise.bands),
        here: fc.integer({ min: 0, max: 79 }),
      })
      .map((one) => ({
        here: one.here > 0,
        item: anItem({
          id,
          category: position.category,
          positionId: position.id,
          condition: one.condition,
          facts: one.facts,
        }),
      }))
  return fc
    .tuple(...places.map(item))
    .map((found) => found.filter(({ here }) => here).map(({ item: one }) => one))
}

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
