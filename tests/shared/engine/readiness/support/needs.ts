import fc from 'fast-check'
import type { Need, NeedKit } from '#shared/engine/readiness/need.ts'
import type { BandCapability } from '#shared/engine/readiness/period-types.ts'
import { AVAILABILITIES, BANDS, MODES, VERDICTS, type Band } from '#shared/engine/vocabulary.ts'

export const NO_NEED: Need = { bands: [], mode: null, watts: null, hours: null, mains: false, placeId: null }

export function onBand(band: Band, fields: Partial<BandCapability> = {}): BandCapability {
  return {
    band,
    state: 'proven',
    watts: 100,
    wattsAtAntenna: 84.8,
    fraction: 0.848,
    lossDb: 0.7,
    limit: '',
    testId: `test-${band}`,
    testedOn: '2026-05-01',
    ...fields,
  }
}

/** A station that stands on 80 m and 40 m with 84.8 W at the antenna, by voice, for 17 h. */
export function needKit(
  fields: Partial<Omit<NeedKit, 'capability'>> & { capability?: Partial<NeedKit['capability']> } = {},
) {
  const { capability, ...rest } = fields
  return {
    verdict: 'proven',
    availability: 'available',
    promisedModes: ['voice'],
    placeId: 'cage',
    ...rest,
    capability: { bands: [onBand('80 m'), onBand('40 m')], modes: ['voice'], hours: 17, ...capability },
  } satisfies NeedKit
}

const PLACES = ['cage', 'north'] as const
const some = <T>(of: fc.Arbitrary<T>) => fc.option(of, { nil: null })

export const anyNeed: fc.Arbitrary<Need> = fc.record({
  bands: fc.subarray(BANDS.slice(0, 5)),
  mode: some(fc.constantFrom(...MODES)),
  watts: some(fc.double({ min: 0.1, max: 120, noNaN: true })),
  hours: some(fc.double({ min: 0.1, max: 30, noNaN: true })),
  mains: fc.boolean(),
  placeId: some(fc.constantFrom(...PLACES)),
})

const amount = (max: number) => some(fc.double({ min: 0, max, noNaN: true }))
const anyBand = (band: Band) =>
  fc
    .record({
      state: fc.constantFrom('proven', 'limited', 'not-proven', 'out'),
      wattsAtAntenna: amount(120),
    })
    .map((fields) => onBand(band, fields))

export const anyNeedKit: fc.Arbitrary<NeedKit> = fc.record({
  verdict: fc.constantFrom(...VERDICTS.slice(0, 3)),
  availability: fc.constantFrom(...AVAILABILITIES.slice(0, 2)),
  promisedModes: fc.subarray([...MODES]),
  placeId: some(fc.constantFrom(...PLACES)),
  capability: fc.record({
    bands: fc
      .subarray(BANDS.slice(0, 5))
      .chain((bands) => fc.tuple(...bands.map(anyBand)) as fc.Arbitrary<BandCapability[]>),
    modes: fc.subarray([...MODES]),
    hours: amount(30),
  }),
})

/** The same need with one thing or several asked for less, or not at all. */
export function weakerThan(need: Need): fc.Arbitrary<Need> {
  const less = (value: number | null) =>
    value === null
      ? fc.constant(null)
      : some(fc.double({ min: 0, max: 1, noNaN: true }).map((f) => value * f))
  const orNothing = <T>(value: T | null) => fc.constantFrom(value, null)
  return fc.record({
    bands: fc.subarray([...need.bands]),
    mode: orNothing(need.mode),
    watts: less(need.watts),
    hours: less(need.hours),
    mains: need.mains ? fc.constant(true) : fc.boolean(),
    placeId: orNothing(need.placeId),
  })
}
