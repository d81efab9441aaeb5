import { FORMER_TRANSFORMERS, TRANSFORMERS } from '../builds.ts'
import { later, onDay, type Local } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { Deed, Step } from '../deeds.ts'
import type { DemoTest } from '../demo-test.ts'
import { BATCH_B } from '../items.ts'
import { HF_BANDS } from '../kit-kinds.ts'
import type { PersonKey } from '../people.ts'
import { pairTest } from '../records/efficiency-tests.ts'
import { ambientForStop, EFFICIENCY } from '../records/heat-model.ts'
import { heatTest } from '../records/heat-tests.ts'

/** Story S1: batch B passes on 40 m, goes into four kits and runs hot on 10 m. */

const arrival: Step[] = [
  { at: onDay(PARTY.feb, '08:20'), by: 'maren', deed: { do: 'add-batch', batch: 'B' } },
  ...BATCH_B.map((item, minute): Step => ({
    at: later(onDay(PARTY.feb, '08:30'), minute),
    by: 'maren',
    deed: { do: 'add-item', item },
  })),
]

/** Into K-04, K-05, K-08 and K-18; what sat there is retired. */
const swaps: Step[] = Object.entries(FORMER_TRANSFORMERS).flatMap(([kit, former], turn) => {
  const [unit] = Object.entries(TRANSFORMERS).find(([, one]) => one.kit === kit)!
  const from = later(onDay(PARTY.mar, '13:30'), turn * 5)
  const reason = 'Batch B takes its place'
  const deeds: Deed[] = [
    { do: 'shelve', item: former, place: 'P1', reason },
    { do: 'pack', item: unit, kit, position: 'transformer', reason: 'New unit of batch B' },
    { do: 'retire-item', item: former, reason: 'Replaced by a unit of batch B; its winding is worn' },
  ]
  return deeds.map((deed, minute) => ({ at: later(from, minute), by: 'tobin', deed }))
})

interface HotRun {
  readonly unit: string
  /** Share that it passes on at 10 m. */
  readonly efficiency: number
  readonly stopS: number
  readonly begins: Local
  readonly by: PersonKey
  readonly instrument: string
}

type Performed = readonly [test: DemoTest, doneAt: Local]

/** 50 W until it is too hot, then, cooled down, 20 W for the whole time. */
function hotRuns({ unit, efficiency, stopS, begins, instrument }: HotRun): Performed[] {
  const ambientC = ambientForStop(efficiency, stopS)
  const run = { band: '10 m', efficiency, ambientC } as const
  const [first, second] = [begins, later(begins, 80)]
  const name = (watts: number) => `hot ${unit} ${watts} ${begins}`
  return [
    [
      heatTest(unit, { ...run, name: name(50), powerW: 50, stopS }, { performed: first, instrument }),
      later(first, 17),
    ],
    [
      heatTest(unit, { ...run, name: name(20), powerW: 20 }, { performed: second, instrument }),
      later(second, 17),
    ],
  ]
}

const recorded = (by: PersonKey, tests: readonly Performed[]): Step[] =>
  tests.map(([test, at]) => ({ at, by, deed: { do: 'test', test } }))

/** The night without a signal: the phone kept four records, the fourth is the count of K-04. */
const SENT_AT: Local = onDay(PARTY.jun, '23:40')

const firstNight: Step[] = [
  ...hotRuns({
    unit: 'XFM-07',
    efficiency: 0.74,
    stopS: 492,
    begins: onDay(PARTY.jun, '19:00'),
    by: 'lupe',
    instrument: 'IRT-24',
  }).map(([test]) => test),
  pairTest({
    unit: 'XFM-07',
    bands: HF_BANDS,
    efficiency: EFFICIENCY.B,
    performed: onDay(PARTY.jun, '20:40'),
    instrument: 'WTM-24',
    partner: 'XFM-11',
  }),
].map((test, minute) => ({ at: later(SENT_AT, minute), by: 'lupe', deed: { do: 'test', test } }))

const recall: Step = {
  at: onDay(PARTY.jun, '23:50'),
  by: 'tobin',
  deed: {
    do: 'recall',
    batch: 'B',
    band: '10 m',
    reason: 'XFM-07 of the same batch failed on 10 m',
    dueOn: '2026-08-01',
  },
}

const JULY: readonly HotRun[] = [
  {
    unit: 'XFM-07',
    efficiency: 0.74,
    stopS: 516,
    begins: onDay(PARTY.jul, '18:00'),
    by: 'josiah',
    instrument: 'IRT-23',
  },
  {
    unit: 'XFM-08',
    efficiency: 0.76,
    stopS: 540,
    begins: onDay(PARTY.jul, '18:05'),
    by: 'lupe',
    instrument: 'IRT-24',
  },
  {
    unit: 'XFM-10',
    efficiency: 0.74,
    stopS: 486,
    begins: onDay(PARTY.jul, '18:30'),
    by: 'josiah',
    instrument: 'IRT-23',
  },
  {
    unit: 'XFM-11',
    efficiency: 0.7,
    stopS: 420,
    begins: onDay(PARTY.jul, '18:35'),
    by: 'lupe',
    instrument: 'IRT-24',
  },
]

/** Mean of each unit and its partner on 10 m: 0.74 with 0.74, 0.76 with 0.70. */
const PAIRS_ON_10 = { 'XFM-07': 0.74, 'XFM-08': 0.73, 'XFM-10': 0.74, 'XFM-11': 0.73 } as const

const pairs: Step[] = Object.entries(PAIRS_ON_10).map(([unit, efficiency], turn) => {
  const performed = later(onDay(PARTY.jul, '20:20'), turn * 9)
  const bands = { ...EFFICIENCY.B, '10 m': efficiency }
  const test = pairTest({ unit, bands: HF_BANDS, efficiency: bands, performed, instrument: 'WTM-23' })
  return { at: later(performed, 8), by: 'josiah', deed: { do: 'test', test } }
})

const secondNight: Step[] = [...JULY.flatMap((run) => recorded(run.by, hotRuns(run))), ...pairs]

export const HOT_BATCH: readonly Step[] = [...arrival, ...swaps, ...firstNight, recall, ...secondNight]
