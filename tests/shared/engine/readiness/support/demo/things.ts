import type { ItemFacts, ReadinessItem } from '#shared/engine/readiness/types.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { anItem } from '../kits.ts'

/** The things of the scenario, sections 3 and 4. */

export const HF_BANDS: readonly Band[] = ['40 m', '20 m', '15 m', '10 m']
export const VHF_BANDS: readonly Band[] = ['2 m', '70 cm']

export const HF_LINE_DB = { '40 m': 0.4, '20 m': 0.6, '15 m': 0.75, '10 m': 0.9 }
export const VHF_LINE_DB = { '2 m': 1.4, '70 cm': 1.4 }

export const HF_RADIO: ItemFacts = {
  bands: HF_BANDS,
  ratedWatts: 100,
  drawA: [
    { watts: 100, amps: 20 },
    { watts: 50, amps: 13 },
    { watts: 20, amps: 8 },
  ],
  meanLoadA: 3.06,
}

export type Batch = 'A' | 'B' | 'C'

export const BATCH_EFFICIENCY = {
  A: { '40 m': 0.93, '20 m': 0.92, '15 m': 0.9, '10 m': 0.87 },
  B: { '40 m': 0.92, '20 m': 0.88, '15 m': 0.83, '10 m': 0.74 },
  C: { '40 m': 0.93, '20 m': 0.92, '15 m': 0.89, '10 m': 0.86 },
} as const

export interface Pack {
  readonly chemistry: 'lifepo4' | 'agm'
  readonly ratedAh: number
  readonly acquiredOn: string
}

export const LITHIUM_30: Pack = { chemistry: 'lifepo4', ratedAh: 30, acquiredOn: '2023-05-06' }
export const LITHIUM_50: Pack = { chemistry: 'lifepo4', ratedAh: 50, acquiredOn: '2024-02-10' }
export const LITHIUM_100: Pack = { chemistry: 'lifepo4', ratedAh: 100, acquiredOn: '2024-02-10' }
export const AGM_26: Pack = { chemistry: 'agm', ratedAh: 26, acquiredOn: '2020-03-07' }
export const AGM_35: Pack = { chemistry: 'agm', ratedAh: 35, acquiredOn: '2020-03-07' }
export const AGM_100: Pack = { chemistry: 'agm', ratedAh: 100, acquiredOn: '2021-04-03' }

export const battery = (id: string, positionId: string, pack: Pack): ReadinessItem =>
  anItem({ id, category: 'battery', positionId, facts: { ...pack } })

/** The other parts of a kit, by position: prefix of the designation and what decides. */
const PARTS: Readonly<Record<string, readonly [prefix: string, category: ReadinessItem['category']]>> = {
  radio: ['RAD', 'radio'],
  wire: ['ANT', 'antenna'],
  antenna: ['ANT', 'antenna'],
  feedline: ['FDL', 'feedline'],
  jumper: ['JMP', 'jumper'],
  charger: ['CHG', 'charger'],
  'DC lead': ['DCL', 'dc-lead'],
  'adapter pouch': ['ADP', 'adapter-pouch'],
  mast: ['MST', 'mast'],
  headset: ['HDS', 'headset'],
  computer: ['CMP', 'computer'],
  interface: ['SIF', 'interface'],
  filter: ['DPX', 'filter'],
  'solar panel': ['SOL', 'solar-panel'],
  controller: ['SCC', 'solar-controller'],
  'distribution box': ['DBX', 'distribution-box'],
  analyser: ['VNA', 'analyzer'],
  wattmeter: ['WTM', 'wattmeter'],
  'dummy load': ['DML', 'dummy-load'],
  thermometer: ['IRT', 'thermometer'],
  'battery tester': ['BTT', 'battery-tester'],
  multimeter: ['DMM', 'multimeter'],
  'cal kit': ['CAL', 'calibration-kit'],
  '2450-ohm fixture': ['FIX', 'test-fixture'],
}

/** The part of kit `number` in this position, such as RAD-07. */
export function part(number: string, positionId: string, facts: ItemFacts = {}): ReadinessItem {
  const [prefix, category] = PARTS[positionId] ?? ['ITM', 'accessory']
  return anItem({ id: `${prefix}-${number}`, category, positionId, facts })
}
