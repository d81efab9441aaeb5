import type { ItemDetails } from '#shared/contracts/item-details.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { Pack } from './batteries.ts'
import { BUILD_SHEETS } from './builds.ts'
import { HF_BANDS, VHF_BANDS, type KindCode } from './kit-kinds.ts'

/** What the things of the scenario are like: sections 3 and 4. */

export const HF_LINE_DB = { '40 m': 0.4, '20 m': 0.6, '15 m': 0.75, '10 m': 0.9 } as const
export const VHF_LINE_DB = 1.4

/** Measured mean load of a station of each kind at the duty of its kind, A. */
const MEAN_LOAD_A: Readonly<Partial<Record<KindCode, number>>> = { 'HF-E': 3.06, VU: 3.48, DG: 7.24, XB: 4 }

const HF_RADIO_BANDS: Band[] = ['80 m', '40 m', '30 m', '20 m', '17 m', '15 m', '12 m', '10 m']

export function radio(kind: KindCode): ItemDetails {
  const meanLoadA = MEAN_LOAD_A[kind]
  const common = { category: 'radio', minV: 11.8, meanLoadA, connector: '30 A two-pole' } as const
  if (kind === 'HF-E' || kind === 'DG') {
    const drawA = [
      { watts: 100, amps: 20 },
      { watts: 50, amps: 13 },
      { watts: 20, amps: 8 },
    ]
    return { ...common, bands: HF_RADIO_BANDS, ratedWatts: 100, receiveA: 1.2, drawA }
  }
  const drawA = [
    { watts: 50, amps: 11 },
    { watts: 25, amps: 7 },
    { watts: 10, amps: 4.5 },
  ]
  return { ...common, bands: bandsOf(kind), ratedWatts: 50, receiveA: 0.6, drawA }
}

/** Bands of the antennas and lines of a kind. */
export function bandsOf(kind: KindCode): Band[] {
  if (kind === 'XB') return ['2 m']
  return kind === 'VU' ? [...VHF_BANDS] : [...HF_BANDS]
}

export function antenna(kind: KindCode): ItemDetails {
  if (bandsOf(kind)[0] === '40 m') return { ...BUILD_SHEETS.wire.details, bands: [...HF_BANDS] }
  const design = kind === 'XB' ? 'folded dipole' : 'dual-band vertical'
  return { category: 'antenna', design, bands: bandsOf(kind), feedOhms: 50, ratedWatts: 100, connector: 'N' }
}

export const formerTransformer = (): ItemDetails => ({ ...BUILD_SHEETS.former.details, bands: [...HF_BANDS] })

export const transformer = (): ItemDetails => ({ ...BUILD_SHEETS.transformer.details, bands: [...HF_BANDS] })

export function feedline(kind: KindCode): ItemDetails {
  const isHf = bandsOf(kind)[0] === '40 m'
  return {
    category: 'feedline',
    cable: isHf ? 'coaxial, 5 mm' : 'coaxial, 7 mm',
    lengthM: isHf ? 15 : 12,
    connectorA: isHf ? 'UHF plug' : 'N plug',
    connectorB: isHf ? 'UHF plug' : 'N plug',
    impedanceOhms: 50,
    velocityFactor: isHf ? 0.66 : 0.83,
    lossDb: isHf ? HF_LINE_DB : Object.fromEntries(bandsOf(kind).map((band) => [band, VHF_LINE_DB])),
  }
}

export function battery({ chemistry, ratedAh }: Pack): ItemDetails {
  const nominalV = chemistry === 'agm' ? 12 : 12.8
  return { category: 'battery', chemistry, ratedAh, nominalV, maxA: 30, connector: '30 A two-pole' }
}

/** 25 A leads for HF; the leads of the VHF kits carry 15 A. */
export function lead(kind: KindCode): ItemDetails {
  const amps = kind === 'VU' ? 15 : 25
  const connector = '30 A two-pole'
  return {
    category: 'dc-lead',
    ratedA: amps,
    fuseA: amps,
    connectorA: connector,
    connectorB: connector,
    lengthM: 3,
    awg: kind === 'VU' ? 12 : 10,
  }
}

/** Everything whose details do not depend on its kit. */
export const PLAIN_DETAILS = {
  jumper: {
    category: 'jumper',
    cable: 'coaxial, 5 mm',
    lengthM: 1,
    connectorA: 'UHF plug',
    connectorB: 'UHF plug',
  },
  charger: {
    category: 'charger',
    outputV: 14.4,
    outputA: 10,
    chemistries: ['lifepo4', 'agm'],
    supply: 'mains',
  },
  'adapter-pouch': {
    category: 'adapter-pouch',
    contents: 'UHF, N and BNC adapters, barrels, spare fuses, a halyard',
  },
  mast: { category: 'mast', design: 'telescopic, glass fibre', heightM: 10, sections: 9 },
  headset: { category: 'headset', connector: 'two 3.5 mm plugs', impedanceOhms: 32 },
  computer: { category: 'computer', software: 'Message and digital-mode programs', supplyV: 19, supplyA: 3 },
  interface: { category: 'interface', design: 'USB sound and keying' },
  filter: { category: 'filter', design: 'six-cavity duplexer', bands: ['2 m'], ratedWatts: 100 },
  'solar-panel': { category: 'solar-panel', ratedWatts: 100, openCircuitV: 21.6, shortCircuitA: 6.1 },
  'solar-controller': { category: 'solar-controller', design: 'mppt', ratedA: 20, maxInputV: 50 },
  'distribution-box': { category: 'distribution-box', ratedA: 40, fuseA: 40, outputs: 6 },
  analyzer: { category: 'analyzer', minMhz: 0.1, maxMhz: 900, connector: 'SMA' },
  wattmeter: { category: 'wattmeter', minMhz: 1.8, maxMhz: 470, fullScale: 200, unit: 'W', connector: 'N' },
  'dummy-load': { category: 'dummy-load', ratedWatts: 250, loadOhms: 50, connector: 'N' },
  thermometer: { category: 'thermometer', sensor: 'contact', unit: '°C' },
  'battery-tester': { category: 'battery-tester', maxA: 20 },
  multimeter: { category: 'multimeter' },
  'clamp-meter': { category: 'clamp-meter' },
  'calibration-kit': { category: 'calibration-kit', minMhz: 0.1, maxMhz: 900, connector: 'SMA' },
  'test-fixture': { category: 'test-fixture', loadOhms: 2450, ratedWatts: 100, connector: 'binding posts' },
} as const satisfies Partial<Record<ItemDetails['category'], ItemDetails>>
