import type { PlainDate } from '#shared/engine/plain-date.ts'
import { PARTY } from '../dates.ts'
import type { CountTest } from '../demo-test.ts'
import type { PersonKey } from '../people.ts'

/** Which kits were counted when, in the order in which their seals were taken from the roll. */
export interface CountRound {
  readonly on: PlainDate
  readonly from: string
  /** One counts after the other, each at a table of their own. */
  readonly crew: readonly PersonKey[]
  readonly kits: readonly string[]
  /** The lid was open, or the seal broken, when the count began. */
  readonly open?: readonly string[]
  /** Left without a seal although the kind has one. */
  readonly leftOpen?: readonly string[]
  readonly short?: Readonly<Record<string, Pick<CountTest['inputs'], 'short' | 'extra'>>>
  readonly notes?: string
  /** When the device reached the network again; at once unless given. */
  readonly sentAt?: string
}

const kits = (...numbers: string[]) => numbers.map((number) => `K-${number}`)
const EVERYBODY: readonly PersonKey[] = ['tobin', 'maren', 'june', 'beatriz', 'everett']

export const COUNT_ROUNDS: readonly CountRound[] = [
  {
    on: PARTY.sep25,
    from: '15:00',
    crew: EVERYBODY,
    kits: kits('01', '02', '03', '04', '06', '08', '09', '10', '13', '14', '16', '22'),
  },
  {
    on: PARTY.oct25,
    from: '15:00',
    crew: EVERYBODY,
    kits: kits('05', '07', '11', '12', '15', '17', '18', '19', '20', '21', '23', '24'),
  },
  {
    on: PARTY.jan,
    from: '14:00',
    crew: ['tobin', 'june'],
    kits: kits('01', '02', '06', '09', '19'),
    open: kits('01', '02', '06', '09', '19'),
    notes: 'Back from the ice storm.',
  },
  {
    on: '2026-01-26',
    from: '18:30',
    crew: ['maren'],
    kits: kits('07'),
    open: kits('07'),
    notes: 'Dried and restocked.',
  },
  {
    on: PARTY.mar,
    from: '15:00',
    crew: EVERYBODY,
    kits: kits(
      ...[
        '04',
        '05',
        '08',
        '18',
        '12',
        '15',
        '11',
        '01',
        '02',
        '03',
        '06',
        '07',
        '09',
        '10',
        '16',
        '17',
        '19',
        '20',
      ],
      ...['21', '22', '23', '24'],
    ),
  },
  { on: PARTY.apr, from: '15:30', crew: ['maren'], kits: kits('07') },
  { on: PARTY.jun, from: '16:30', crew: ['tobin'], kits: kits('20') },
  { on: PARTY.jun, from: '20:55', crew: ['lupe'], kits: kits('04'), sentAt: '23:43' },
  { on: PARTY.jul, from: '21:00', crew: ['tobin', 'maren'], kits: kits('04', '05', '18', '07') },
  {
    on: PARTY.aug,
    from: '15:00',
    crew: ['tobin'],
    kits: kits('09'),
    open: kits('09'),
    notes: 'Back from the flood.',
  },
  {
    on: '2026-08-24',
    from: '18:00',
    crew: ['maren'],
    kits: kits('05'),
    open: kits('05'),
    notes: 'Dry again.',
  },
  {
    on: PARTY.sep,
    from: '10:00',
    crew: ['maren'],
    kits: kits('11'),
    open: kits('11'),
    leftOpen: kits('11'),
    short: {
      'K-11': {
        short: {
          'DC lead': { found: 0, missing: ['DCL-11'] },
          'adapter pouch': { found: 0, missing: ['ADP-11'] },
        },
        extra: [],
      },
    },
    notes: 'Seal broken, nobody knows by whom. The lead and the adapter pouch are gone.',
  },
  {
    on: PARTY.sep,
    from: '11:30',
    crew: ['tobin'],
    kits: kits('03'),
    notes: 'DCL-11 was in it, with a pencil note: "borrowed from 11 T."',
  },
  {
    on: PARTY.sep,
    from: '15:00',
    crew: EVERYBODY,
    kits: kits(
      ...['01', '02', '04', '05', '06', '07', '09', '10', '12', '15', '16', '17', '18', '19', '20'],
      ...['21', '22', '24'],
    ),
    open: kits('15', '18'),
  },
  { on: PARTY.oct17, from: '15:30', crew: ['maren'], kits: kits('07') },
  {
    on: PARTY.oct24,
    from: '14:00',
    crew: ['tobin'],
    kits: kits('01', '02', '09', '16', '19', '21'),
    notes: 'Counted together for the handover: Tobin Arkwell and Maren Oldstrand.',
  },
]
