import type { PlainDate } from '#shared/engine/plain-date.ts'

/** Batteries of the scenario, section 3: numbered through, by kit. */
export interface Pack {
  readonly chemistry: 'lifepo4' | 'agm'
  readonly ratedAh: number
  readonly acquiredOn: PlainDate
}

const LITHIUM_30: Pack = { chemistry: 'lifepo4', ratedAh: 30, acquiredOn: '2023-05-06' }
const LITHIUM_50: Pack = { chemistry: 'lifepo4', ratedAh: 50, acquiredOn: '2024-02-10' }
const LITHIUM_100: Pack = { chemistry: 'lifepo4', ratedAh: 100, acquiredOn: '2024-02-10' }
const AGM_26: Pack = { chemistry: 'agm', ratedAh: 26, acquiredOn: '2020-03-07' }
export const AGM_35: Pack = { chemistry: 'agm', ratedAh: 35, acquiredOn: '2020-03-07' }
const AGM_100: Pack = { chemistry: 'agm', ratedAh: 100, acquiredOn: '2021-04-03' }

/** First and last number of the batteries of a kit, with what they are. */
const BY_KIT: Readonly<Record<string, readonly [first: number, last: number, pack: Pack]>> = {
  'K-01': [1, 2, LITHIUM_30],
  'K-02': [3, 4, LITHIUM_30],
  'K-03': [5, 6, LITHIUM_30],
  'K-04': [7, 8, LITHIUM_30],
  'K-05': [9, 10, LITHIUM_30],
  'K-06': [11, 12, AGM_26],
  'K-07': [13, 14, AGM_26],
  'K-08': [15, 16, AGM_26],
  'K-09': [17, 17, LITHIUM_50],
  'K-10': [18, 18, LITHIUM_50],
  'K-11': [19, 19, LITHIUM_50],
  'K-12': [20, 20, LITHIUM_50],
  'K-13': [21, 21, AGM_35],
  'K-14': [22, 22, AGM_35],
  'K-15': [23, 23, AGM_35],
  'K-16': [24, 25, LITHIUM_50],
  'K-17': [26, 27, LITHIUM_50],
  'K-18': [28, 29, LITHIUM_50],
  'K-19': [30, 31, LITHIUM_30],
  'K-20': [32, 33, LITHIUM_30],
  'K-21': [34, 37, LITHIUM_100],
  'K-22': [38, 41, AGM_100],
}

export interface DemoBattery {
  readonly designation: string
  readonly pack: Pack
}

const range = (first: number, last: number, pack: Pack): DemoBattery[] =>
  Array.from({ length: last - first + 1 }, (_, step) => ({
    designation: `BAT-${String(first + step).padStart(3, '0')}`,
    pack,
  }))

export function batteriesOf(kit: string): DemoBattery[] {
  const known = BY_KIT[kit]
  return known ? range(...known) : []
}

export const SPARE_BATTERIES: readonly DemoBattery[] = [
  ...range(42, 43, LITHIUM_30),
  ...range(44, 45, AGM_35),
]

/** Every battery that counts, in kits and on the shelf. */
export const BATTERIES: readonly DemoBattery[] = [
  ...Object.keys(BY_KIT).flatMap(batteriesOf),
  ...SPARE_BATTERIES,
]

export function packOf(designation: string): Pack {
  const found = BATTERIES.find((battery) => battery.designation === designation)
  return found?.pack ?? AGM_35
}
