import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { TRANSFORMERS, type BatchKey } from '../builds.ts'
import { PARTY } from '../dates.ts'
import type { DemoTest } from '../demo-test.ts'
import { noisy } from '../random.ts'
import type { Job } from './bench.ts'
import { EFFICIENCY, heatInputs, type HeatRun } from './heat-model.ts'
import { instrumentFor } from './instruments.ts'

/** Heat tests of the work parties; the hot batch has a story of its own. */

const ALL_BANDS: readonly Band[] = ['40 m', '20 m', '10 m']
export const BATCH_B_UNITS = ['XFM-07', 'XFM-08', 'XFM-09', 'XFM-10', 'XFM-11'] as const

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
  // The acceptance of batch B: one band, and not the hardest.
  { on: PARTY.feb, units: BATCH_B_UNITS, bands: ['40 m'] },
  { on: PARTY.mar, units: BATCH_B_UNITS, bands: ['20 m'] },
  { on: PARTY.mar, units: ['XFM-03', 'XFM-06', 'XFM-12'] },
  { on: PARTY.apr, units: ['XFM-04', 'XFM-05'] },
]

export function batchOf(unit: string): BatchKey | 'former' {
  return TRANSFORMERS[unit]?.batch ?? 'former'
}

export const HEAT_METHOD = 'Key-down carrier into the 2450-ohm fixture, 10 min'

export function heatTest(
  unit: string,
  run: HeatRun,
  more: Pick<DemoTest, 'performed' | 'instrument' | 'notes'>,
): DemoTest {
  const method = HEAT_METHOD
  const instrumentNote = `Fixture FIX-${more.instrument?.slice(-2)}, carrier ${run.powerW} W`
  return { procedure: 'heat-test', subject: unit, method, instrumentNote, inputs: heatInputs(run), ...more }
}

function job(unit: string, band: Band, on: PlainDate, turn: number): Job {
  const name = `heat ${unit} ${band} ${on}`
  const efficiency = EFFICIENCY[batchOf(unit)][band]!
  const ambientC = noisy(`ambient ${unit} ${on}`, 22, { reach: 3, digits: 1 })
  const instrument = instrumentFor('IRT', on, turn)
  return {
    on,
    crew: ['josiah', 'lupe', 'rafael'],
    minutes: 17,
    test: (performed) =>
      heatTest(unit, { name, band, powerW: 50, efficiency, ambientC }, { performed, instrument }),
  }
}

export const HEAT_JOBS: readonly Job[] = ROUNDS.flatMap(({ on, units, bands = ALL_BANDS }) =>
  units.flatMap((unit, turn) => bands.map((band) => job(unit, band, on, turn))),
)
