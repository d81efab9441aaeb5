import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { PARTY } from '../dates.ts'
import type { DemoTest } from '../demo-test.ts'
import { bandsOf, HF_LINE_DB, VHF_LINE_DB } from '../item-details.ts'
import { kitOf } from '../kits.ts'
import { noisy } from '../random.ts'
import type { Job } from './bench.ts'
import { instrumentFor } from './instruments.ts'
import { linesOf, type LineRound } from './rounds.ts'

/** Loss of the feedlines against their first test. */

/** Water in FDL-20: the loss rises, and the SWR at the radio looks better each time. */
export const WET: Readonly<Record<PlainDate, readonly [lossDb: number, swrAtRadio: number]>> = {
  [PARTY.oct25]: [1.4, 1.52],
  [PARTY.mar]: [1.5, 1.51],
  [PARTY.jun]: [2.2, 1.42],
  [PARTY.sep]: [3.1, 1.33],
}

const ROUNDS: readonly LineRound[] = [
  { on: PARTY.sep25, kits: ['01', '02', '03', '04', '06', '08', '09', '10', '13', '14', '16'] },
  {
    on: PARTY.oct25,
    kits: ['05', '07', '11', '12', '15', '17', '18', '19', '20'],
    spares: ['91', '92', '93', '94'],
  },
  { on: PARTY.jan, kits: ['01', '02', '06', '09', '19'] },
  {
    on: PARTY.mar,
    kits: [
      '01',
      '02',
      '03',
      '04',
      '05',
      '06',
      '08',
      '09',
      '10',
      '11',
      '12',
      '15',
      '16',
      '17',
      '18',
      '19',
      '20',
    ],
  },
  { on: PARTY.apr, kits: ['07'] },
  { on: PARTY.jun, kits: ['20'] },
  {
    on: PARTY.sep,
    kits: ['01', '02', '03', '04', '05', '06', '09', '10', '12', '16', '17', '18', '19', '20'],
  },
  { on: PARTY.oct17, kits: ['07'] },
]

const SPARE_BANDS: Readonly<Record<string, readonly Band[]>> = {
  '91': bandsOf('HF-E'),
  '92': bandsOf('HF-E'),
  '93': bandsOf('VU'),
  '94': bandsOf('VU'),
}

const isFirst = (on: PlainDate) => on === PARTY.sep25 || on === PARTY.oct25

function readingOf(line: string, band: Band, on: PlainDate) {
  const wet = line === 'FDL-20' ? WET[on] : undefined
  if (wet) return { band, lossDb: wet[0], swrAtRadio: wet[1] }
  const usual = (HF_LINE_DB as Partial<Record<Band, number>>)[band] ?? VHF_LINE_DB
  const swr = noisy(`own swr ${line} ${band}`, 1.25, { reach: 0.1, digits: 3 })
  return {
    band,
    lossDb: noisy(`loss ${line} ${band} ${on}`, usual, { reach: 0.05, digits: 2 }),
    swrAtRadio: noisy(`swr ${line} ${band} ${on}`, swr, { reach: 0.02, digits: 2 }),
  }
}

type LineTest = Extract<DemoTest, { procedure: 'feedline-loss' }>

export function lineTest(
  line: string,
  bands: readonly Band[],
  on: PlainDate,
  turn: number,
): Omit<LineTest, 'performed'> {
  return {
    procedure: 'feedline-loss',
    subject: line,
    method: 'Half the return loss with the far end open, and SWR into the antenna',
    instrument: instrumentFor('VNA', on, turn),
    inputs: { readings: bands.map((band) => readingOf(line, band, on)), setsBaseline: isFirst(on) },
  }
}

export const FEEDLINE_JOBS: readonly Job[] = ROUNDS.flatMap((round) =>
  linesOf(round).map((number, turn): Job => {
    const bands = SPARE_BANDS[number] ?? bandsOf(kitOf(`K-${number}`).kind)
    const test = lineTest(`FDL-${number}`, bands, round.on, turn)
    return {
      on: round.on,
      crew: ['walt', 'femi', 'thandi'],
      minutes: 7,
      test: (performed) => ({ ...test, performed }),
    }
  }),
)
