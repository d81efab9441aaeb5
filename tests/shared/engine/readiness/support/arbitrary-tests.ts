import fc from 'fast-check'
import type { Evidence, KitState, TestFinding } from '#shared/engine/readiness/types.ts'
import type { Band, Category, FindingWord, Procedure } from '#shared/engine/vocabulary.ts'
import { aFinding, worst } from './findings.ts'
import { at, ZONE } from './instants.ts'

const NOW = at('2026-06-15 09:00')
const HOUR = 3_600_000

/** What can be done to a category besides an inspection. */
const PROCEDURES: Readonly<Partial<Record<Category | 'kit', readonly Procedure[]>>> = {
  transformer: ['heat-test', 'pair-loss', 'open-short-load'],
  antenna: ['antenna-sweep'],
  feedline: ['feedline-loss'],
  radio: ['radio-check'],
  battery: ['battery-capacity'],
  computer: ['boot-and-update'],
  wattmeter: ['calibration'],
  multimeter: ['calibration'],
  kit: ['count'],
}

const MEASURES: Readonly<Partial<Record<Procedure, string>>> = {
  'heat-test': 'peakC',
  'pair-loss': 'efficiency',
  'open-short-load': 'efficiency',
  'antenna-sweep': 'swr',
  'feedline-loss': 'lossDb',
  'radio-check': 'watts',
  'battery-capacity': 'capacityFraction',
  inspection: 'serviceable',
  'boot-and-update': 'upToDate',
  calibration: 'calibration',
}

/** A figure that the finding allows; `best` is as good as any other test may measure. */
const GOOD: Readonly<Record<string, number>> = {
  peakC: 50,
  efficiency: 0.9,
  swr: 1.5,
  lossDb: 1,
  watts: 100,
  capacityFraction: 0.9,
}
const BAD: Readonly<Record<string, number>> = {
  peakC: 85,
  efficiency: 0.7,
  swr: 3,
  lossDb: 3,
  watts: 30,
  capacityFraction: 0.6,
}

const BY_BAND: readonly Procedure[] = [
  'heat-test',
  'pair-loss',
  'open-short-load',
  'antenna-sweep',
  'feedline-loss',
  'radio-check',
]

interface Sketch {
  readonly subject: { readonly id: string; readonly procedure: Procedure }
  readonly bands: readonly Band[]
  readonly words: readonly FindingWord[]
  readonly powerW: number
  readonly performedAt: number
  readonly recordedLate: number
  readonly instrumentId: string | null
  readonly id: string
}

function findingsOf({ subject, bands, words, powerW }: Sketch, state: KitState): TestFinding[] {
  const measure = MEASURES[subject.procedure] ?? 'present'
  const one = (word: FindingWord) =>
    aFinding({
      measure,
      finding: word,
      value: (word === 'fail' ? BAD : GOOD)[measure] ?? null,
      text: `found ${word}`,
      powerW: subject.procedure === 'heat-test' ? powerW : null,
    })
  const word = (index: number) => words[index % words.length] ?? 'pass'
  if (subject.procedure === 'count')
    return state.positions.map(({ id }, index) => ({ ...one(word(index)), positionId: id }))
  // A heat test is one band and one power.
  const tested = subject.procedure === 'heat-test' ? bands.slice(0, 1) : bands
  return BY_BAND.includes(subject.procedure)
    ? tested.map((band, index) => ({ ...one(word(index)), band }))
    : [one(word(0))]
}

const dayOf = (ms: number) => new Date(ms - 7 * HOUR).toISOString().slice(0, 10)
if (ZONE !== 'Etc/GMT+7') throw new Error('dayOf assumes seven hours behind UTC')

function testOf(sketch: Sketch, state: KitState): Evidence {
  const { subject, performedAt, recordedLate, instrumentId, id } = sketch
  const findings = findingsOf(sketch, state)
  return {
    id,
    procedure: subject.procedure,
    subjectId: subject.id,
    performedAt,
    performedOn: dayOf(performedAt),
    recordedAt: Math.min(NOW, performedAt + recordedLate * HOUR),
    instrumentId,
    finding: worst(findings),
    findings,
  }
}

const words: fc.Arbitrary<FindingWord> = fc.oneof(
  { weight: 2, arbitrary: fc.constant<FindingWord>('pass') },
  { weight: 1, arbitrary: fc.constantFrom<FindingWord>('marginal', 'fail') },
)

function subjectsOf(state: KitState, calibrations: boolean): Sketch['subject'][] {
  const things = [{ id: state.kit.id, category: 'kit' as const }, ...state.items]
  return things.flatMap(({ id, category }) =>
    (PROCEDURES[category] ?? [])
      .filter((procedure) => calibrations || procedure !== 'calibration' || state.promise.bands.length === 0)
      .map((procedure) => ({ id, procedure })),
  )
}

const bandsOf = ({ promise }: KitState): readonly Band[] =>
  promise.bands.length > 0 ? promise.bands : ['40 m', '2 m']

/** One test in eight is an inspection; `calibrations` may also be of the instrument W-1. */
function sketch(
  state: KitState,
  outcome: fc.Arbitrary<FindingWord>,
  calibrations: boolean,
): fc.Arbitrary<Sketch> {
  const own = subjectsOf(state, calibrations).filter(
    ({ procedure }) => calibrations || procedure !== 'calibration',
  )
  const inspected = state.items.map(({ id }) => ({ id, procedure: 'inspection' as const }))
  const calibrated = calibrations ? [{ id: 'W-1', procedure: 'calibration' as const }] : []
  return fc.record({
    subject: fc.oneof(
      { weight: 7, arbitrary: fc.constantFrom(...own, ...calibrated) },
      { weight: 1, arbitrary: fc.constantFrom(...own, ...inspected) },
    ),
    bands: fc.shuffledSubarray<Band>([...bandsOf(state)], { minLength: 1 }),
    words: fc.array(outcome, { minLength: 1, maxLength: 4 }),
    powerW: fc.constantFrom(20, 50, 100),
    performedAt: fc.integer({ min: 1, max: 15_000 }).map((hours) => NOW - hours * HOUR),
    recordedLate: fc.integer({ min: 0, max: 200 }),
    instrumentId: fc.constantFrom(null, null, 'W-1', 'W-2'),
    id: fc.uuid(),
  })
}

/** Any test of the kit, of one of its items or of an instrument, recorded before now. */
export const arbitraryTest = (state: KitState): fc.Arbitrary<Evidence> =>
  sketch(state, words, true).map((one) => testOf(one, state))

/** A test that passes, performed at any time before now, recorded now; calibrations are left out. */
export const passingTest = (state: KitState): fc.Arbitrary<Evidence> =>
  sketch(state, fc.constantFrom<FindingWord>('pass', 'marginal'), false).map((one) => ({
    ...testOf(one, state),
    recordedAt: NOW,
  }))

/** Tests that prove most of a kit: every procedure of every item on every band, each within the last seven months. */
export function provingTests(state: KitState): fc.Arbitrary<Evidence[]> {
  const wanted = subjectsOf(state, false).flatMap((subject) =>
    subject.procedure === 'heat-test'
      ? state.promise.bands.map((band) => ({ subject, bands: [band] }))
      : [{ subject, bands: bandsOf(state) }],
  )
  const one = (what: (typeof wanted)[number]) =>
    fc
      .record({
        performedAt: fc.integer({ min: 1, max: 5_000 }).map((hours) => NOW - hours * HOUR),
        kept: fc.integer({ min: 0, max: 24 }),
        id: fc.uuid(),
      })
      .map(({ kept, ...rest }) => ({
        kept: kept > 0,
        test: testOf(
          { ...what, ...rest, words: ['pass'], powerW: 50, recordedLate: 0, instrumentId: null },
          state,
        ),
      }))
  return fc.tuple(...wanted.map(one)).map((tests) => tests.filter(({ kept }) => kept).map(({ test }) => test))
}
