import type { Band } from '#shared/engine/vocabulary.ts'
import { PARTY } from '../dates.ts'
import type { DemoTest } from '../demo-test.ts'
import { bandsOf } from '../item-details.ts'
import { kitOf } from '../kits.ts'
import type { KindCode } from '../kit-kinds.ts'
import type { Job } from './bench.ts'
import { instrumentFor } from './instruments.ts'
import { linesOf, type LineRound } from './rounds.ts'

/** Power and reception of the radios, which deliver exactly their rating. */

interface Round extends LineRound {
  /** In the place of the one at hand. */
  readonly wattmeter?: string
}

const ROUNDS: readonly Round[] = [
  {
    on: PARTY.sep25,
    kits: ['01', '02', '03', '04', '06', '08', '09', '10', '13', '14', '16'],
    spares: ['91', '92'],
  },
  { on: PARTY.oct25, kits: ['05', '07', '11', '12', '15', '17', '18', '19', '20'], spares: ['93'] },
  {
    on: PARTY.mar,
    kits: [
      '01',
      '02',
      '03',
      '04',
      '05',
      '06',
      '07',
      '08',
      '09',
      '10',
      '11',
      '12',
      '16',
      '17',
      '18',
      '19',
      '20',
    ],
    spares: ['91', '92'],
  },
  // Nobody noticed that the calibration of this wattmeter had lapsed: these four are in doubt.
  { on: PARTY.oct17, kits: ['11', '18'], spares: ['91', '92'], wattmeter: 'WTM-23' },
  { on: PARTY.oct24, kits: ['01', '02', '09', '16', '19'] },
]

const SPARE_KINDS: Readonly<Record<string, KindCode>> = { '91': 'HF-E', '92': 'VU', '93': 'VU' }

/** RAD-93 gives next to nothing on 70 cm. */
const WEAK_W: Readonly<Record<string, number>> = { 'RAD-93 70 cm': 6 }

interface Currents {
  readonly receiveA: number
  /** Key-down, at the setting that is judged and at lower ones. */
  readonly transmit: readonly { readonly settingW: number; readonly currentA: number }[]
}

/** Read in the lead of the battery, with everything running: they give the mean loads of section 4 at its duties. */
const CURRENTS: Readonly<Partial<Record<KindCode, Currents>>> = {
  'HF-E': { receiveA: 1.18, transmit: [{ settingW: 100, currentA: 20 }] },
  VU: { receiveA: 0.97, transmit: [{ settingW: 50, currentA: 11 }] },
  DG: {
    receiveA: 3.7,
    transmit: [
      { settingW: 100, currentA: 22.5 },
      { settingW: 50, currentA: 15.5 },
    ],
  },
  XB: { receiveA: 1, transmit: [{ settingW: 50, currentA: 8.5 }] },
}

function readingsOf(radio: string, band: Band, { transmit }: Currents) {
  return transmit.map(({ settingW, currentA }) => ({
    band,
    settingW,
    measuredW: WEAK_W[`${radio} ${band}`] ?? settingW,
    currentA,
  }))
}

function job(number: string, { on, wattmeter }: Round, turn: number): Job {
  const radio = `RAD-${number}`
  const kind = SPARE_KINDS[number] ?? kitOf(`K-${number}`).kind
  const currents = CURRENTS[kind]!
  const instrument = wattmeter ?? instrumentFor('WTM', on, turn)
  const test: Omit<DemoTest & { procedure: 'radio-check' }, 'performed'> = {
    procedure: 'radio-check',
    subject: radio,
    method: 'Carrier into a dummy load, read on the wattmeter; then a station heard',
    instrument,
    instrumentNote: `Dummy load DML-${instrument.slice(-2)}`,
    inputs: {
      readings: bandsOf(kind).flatMap((band) => readingsOf(radio, band, currents)),
      supplyV: 13.8,
      receiveA: currents.receiveA,
      currentOf: 'station',
      receives: true,
      memoryVersion: 'DEMO-3',
    },
  }
  return { on, crew: ['piet', 'marcus', 'hollis'], minutes: 7, test: (performed) => ({ ...test, performed }) }
}

export const RADIO_JOBS: readonly Job[] = ROUNDS.flatMap((round) =>
  linesOf(round).map((number, turn) => job(number, round, turn)),
)
