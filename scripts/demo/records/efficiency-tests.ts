import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { Local } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { PairTest } from '../demo-test.ts'
import { HF_BANDS } from '../kit-kinds.ts'
import { noisy, rounded } from '../random.ts'
import type { Job } from './bench.ts'
import { EFFICIENCY } from './heat-model.ts'
import { BATCH_B_UNITS, batchOf } from './heat-tests.ts'
import { instrumentFor } from './instruments.ts'

/** Loss of two like transformers back to back. */

const PARTNERS: Readonly<Record<string, string>> = {
  'XFM-01': 'XFM-02',
  'XFM-02': 'XFM-01',
  'XFM-03': 'XFM-04',
  'XFM-04': 'XFM-03',
  'XFM-05': 'XFM-06',
  'XFM-06': 'XFM-05',
  'XFM-07': 'XFM-10',
  'XFM-08': 'XFM-11',
  'XFM-09': 'XFM-11',
  'XFM-10': 'XFM-07',
  'XFM-11': 'XFM-08',
  'XFM-12': 'XFM-13',
  'XFM-13': 'XFM-12',
  'XFM-14': 'XFM-15',
  'XFM-15': 'XFM-14',
  'XFM-81': 'XFM-83',
  'XFM-82': 'XFM-84',
  'XFM-83': 'XFM-81',
  'XFM-84': 'XFM-82',
}

interface Round {
  readonly on: PlainDate
  readonly units: readonly string[]
  readonly bands?: readonly Band[]
}

const ROUNDS: readonly Round[] = [
  {
    on: PARTY.sep25,
    units: ['XFM-01', 'XFM-02', 'XFM-03', 'XFM-04', 'XFM-06', 'XFM-14', 'XFM-15', 'XFM-81', 'XFM-83'],
  },
  { on: PARTY.oct25, units: ['XFM-05', 'XFM-12', 'XFM-82', 'XFM-84'] },
  { on: PARTY.feb, units: ['XFM-01', 'XFM-02', 'XFM-13'] },
  // Nobody tried 10 m before batch B went into the kits.
  { on: PARTY.mar, units: BATCH_B_UNITS, bands: ['40 m', '20 m', '15 m'] },
  { on: PARTY.mar, units: ['XFM-03', 'XFM-06', 'XFM-12', 'XFM-14', 'XFM-15'] },
  { on: PARTY.apr, units: ['XFM-04', 'XFM-05'] },
  { on: PARTY.sep, units: ['XFM-01', 'XFM-02', 'XFM-03', 'XFM-04', 'XFM-06', 'XFM-12'] },
]

interface Pair {
  readonly unit: string
  readonly bands: readonly Band[]
  /** Mean of the two devices, by band. */
  readonly efficiency: Readonly<Partial<Record<Band, number>>>
  readonly performed: Local
  readonly instrument: string
  readonly partner?: string
  /** Names the noise; absent: exactly the figures given. */
  readonly noise?: string
}

const CARRIER_W = 50

export function pairTest({ unit, bands, efficiency, noise, performed, instrument, partner }: Pair): PairTest {
  return {
    procedure: 'pair-loss',
    subject: unit,
    partner: partner ?? PARTNERS[unit]!,
    performed,
    method: 'Two like transformers back to back, wattmeter before and after',
    instrument,
    instrumentNote: `Dummy load DML-${instrument.slice(-2)}`,
    inputs: {
      meters: 'one-moved',
      bands: bands.map((band) => {
        const extraDb = noise === undefined ? 0 : noisy(`${noise} ${band}`, 0, { reach: 0.05, digits: 3 })
        const outW = CARRIER_W * efficiency[band]! ** 2 * 10 ** (extraDb / 10)
        return { band, inW: CARRIER_W, outW: rounded(outW, 3) }
      }),
    },
  }
}

function job(unit: string, { on, bands = HF_BANDS }: Round, turn: number): Job {
  const instrument = instrumentFor('WTM', on, turn)
  // The newest figures are those of the tables.
  const noise = on === PARTY.sep ? undefined : `pair ${unit} ${on}`
  const efficiency = EFFICIENCY[batchOf(unit)]
  return {
    on,
    crew: ['oona', 'gideon'],
    minutes: 9,
    test: (performed) => pairTest({ unit, bands, efficiency, noise, performed, instrument }),
  }
}

export const EFFICIENCY_JOBS: readonly Job[] = ROUNDS.flatMap((round) =>
  round.units.map((unit, turn) => job(unit, round, turn)),
)
