import type { PlainDate } from '#shared/engine/plain-date.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { PARTY } from '../dates.ts'
import type { DemoTest } from '../demo-test.ts'
import { bandsOf } from '../item-details.ts'
import { kitOf } from '../kits.ts'
import { noisy } from '../random.ts'
import type { Job } from './bench.ts'
import { instrumentFor } from './instruments.ts'
import { linesOf, type LineRound } from './rounds.ts'

/** Antenna sweeps. A working point a band; the antenna of a story is read as its story says. */

const POINT_MHZ: Readonly<Partial<Record<Band, number>>> = {
  '40 m': 7.2,
  '20 m': 14.2,
  '15 m': 21.25,
  '10 m': 28.4,
  '2 m': 146,
  '70 cm': 445,
}
const SWR: Readonly<Partial<Record<Band, number>>> = {
  '40 m': 1.4,
  '20 m': 1.5,
  '15 m': 1.7,
  '10 m': 1.6,
  '2 m': 1.4,
  '70 cm': 1.6,
}
const RESONANCE_40_MHZ = 7.15

/** Story S3: ANT-07 on 40 m, its wire stretched by the ice; MHz of the resonance and SWR at 7.200. */
export const STRETCHED: Readonly<Record<PlainDate, readonly [resonanceMHz: number, swr: number]>> = {
  [PARTY.oct25]: [7.15, 1.3],
  [PARTY.jan]: [7.062, 2.1],
  [PARTY.apr]: [7.021, 2.4],
  [PARTY.jul]: [6.989, 2.7],
  [PARTY.oct17]: [6.968, 3],
}

/** The blind test: ANT-15 passed eight weeks before its element broke. */
export const BLIND_ON: PlainDate = '2026-06-27'

const ROUNDS: readonly LineRound[] = [
  {
    on: PARTY.sep25,
    kits: ['01', '02', '03', '04', '06', '08', '09', '10', '13', '14', '16'],
    spares: ['92', '93'],
  },
  { on: PARTY.oct25, kits: ['05', '07', '11', '12', '15', '17', '18', '19', '20'], spares: ['91'] },
  { on: PARTY.jan, kits: ['01', '02', '06', '07', '09', '19'] },
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
    spares: ['92', '93'],
  },
  { on: PARTY.apr, kits: ['07'] },
  { on: PARTY.jun, kits: ['04', '20'] },
  { on: BLIND_ON, kits: ['15'] },
  { on: PARTY.jul, kits: ['07', '05', '18'] },
  { on: PARTY.aug, from: '14:00', kits: ['09'] },
  {
    on: PARTY.sep,
    kits: ['01', '02', '03', '04', '05', '06', '09', '10', '12', '16', '17', '18', '19', '20'],
    spares: ['92', '93'],
  },
  { on: PARTY.oct17, kits: ['07'] },
]

/** An antenna's SWR on a band: its own, a little off the usual one, and the noise of the day. */
function swrOf(antenna: string, band: Band, on: PlainDate): number {
  const stretched = antenna === 'ANT-07' && band === '40 m' ? STRETCHED[on] : undefined
  if (stretched) return stretched[1]
  const own = noisy(`own swr ${antenna} ${band}`, SWR[band]!, { reach: 0.08, digits: 3 })
  return noisy(`swr ${antenna} ${band} ${on}`, own, { reach: 0.02, digits: 2 })
}

function sweepInputs(antenna: string, bands: readonly Band[], on: PlainDate) {
  const own = noisy(`resonance ${antenna}`, RESONANCE_40_MHZ, { reach: 0.02, digits: 3 })
  const resonance = (antenna === 'ANT-07' ? STRETCHED[on]?.[0] : undefined) ?? own
  return {
    points: bands.map((band) => ({ band, frequencyMHz: POINT_MHZ[band]!, swr: swrOf(antenna, band, on) })),
    resonances: bands.includes('40 m') ? [{ band: '40 m' as const, frequencyMHz: resonance }] : [],
    conditions: bands.includes('40 m') ? 'Strung 8 m high at the school field, dry' : 'On its mast, dry',
  }
}

const NOTES: Readonly<Record<string, string>> = {
  [`ANT-07 ${PARTY.jan}`]: 'The knot at the insulator slips and the wire was stretched by the ice.',
  [`ANT-07 ${PARTY.jul}`]:
    'Over the limit at 7.200 MHz for the first time; the resonance has wandered down all year.',
}

function job(antenna: string, bands: readonly Band[], on: PlainDate, turn: number): Job {
  const notes = NOTES[`${antenna} ${on}`]
  const test: Omit<DemoTest & { procedure: 'antenna-sweep' }, 'performed'> = {
    procedure: 'antenna-sweep',
    subject: antenna,
    method: 'Analyser at the feed point through its jumper, calibrated for the session',
    instrument: instrumentFor('VNA', on, turn),
    inputs: sweepInputs(antenna, bands, on),
    ...(notes !== undefined && { notes }),
  }
  return { on, crew: ['gideon', 'carl', 'nadira'], minutes: 8, test: (performed) => ({ ...test, performed }) }
}

const SPARE_BANDS: Readonly<Record<string, readonly Band[]>> = {
  '91': bandsOf('HF-E'),
  '92': bandsOf('HF-E'),
  '93': bandsOf('VU'),
}

export const SWEEP_JOBS: readonly Job[] = ROUNDS.flatMap((round) =>
  linesOf(round).map((number, turn) => {
    const bands = SPARE_BANDS[number] ?? bandsOf(kitOf(`K-${number}`).kind)
    return { ...job(`ANT-${number}`, bands, round.on, turn), from: round.from }
  }),
)
