import fc from 'fast-check'
import type { ItemFacts, ReadinessItem } from '#shared/engine/readiness/types.ts'
import type { Band, Condition } from '#shared/engine/vocabulary.ts'
import { at } from './instants.ts'
import type { Kind } from './kinds.ts'
import { anItem } from './kits.ts'

/** Random things of a kit: mostly sound, now and then missing, broken or odd. */

export const NOW = at('2026-06-15 09:00')
export const DAY = 86_400_000

/** A whole number of hours before or after `NOW`. */
export const hoursFromNow = (from: number, to: number) =>
  fc.integer({ min: from, max: to }).map((hours) => NOW + hours * 3_600_000)

/** Mostly sound: a kit with a fault in every part says nothing about any of them. */
export const seldom = <T>(rare: fc.Arbitrary<T>, usual: fc.Arbitrary<T>, weight = 12) =>
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

/** What is in the positions of a kind; some are left empty. */
export const itemsFor = ({ positions, promise }: Kind): fc.Arbitrary<ReadinessItem[]> => {
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
