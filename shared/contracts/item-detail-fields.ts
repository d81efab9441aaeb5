/**
 * The fields of their own that each category of item has. All may be left out: absent means not known yet.
 * Units stand in the names; lengths in metres, temperatures in °C. The readiness engine reads bands, ratedWatts,
 * ratedAh, chemistry, maxA, ratedA, fuseA, drawA, receiveA, meanLoadA, supplyV, supplyA and lossDb.
 */
import { z } from 'zod'
import { BANDS, CHEMISTRIES, INSTRUMENT_CATEGORIES, type Category } from '#shared/engine/vocabulary.ts'
import { amount, line, text } from './fields.ts'
import { bands } from './kit-kinds.ts'

const name = line(60, 1).optional()
const contents = text(2000).optional()
const watts = amount(0.1, 100_000).optional()
const amps = amount(0.01, 1000).optional()
const volts = amount(0.1, 1000).optional()
const lengthM = amount(0.01, 1000).optional()
const ohms = amount(0.1, 100_000).optional()

const cable = { cable: name, lengthM, connectorA: name, connectorB: name }

/** Accuracy as data sheets give it; each limit is taken as rectangular (calculation sheet, section 3). */
const accuracy = {
  accuracyPercentOfReading: amount(0, 100).optional(),
  accuracyPercentOfFullScale: amount(0, 100).optional(),
  /** A fixed part, in `unit`. */
  accuracyAbsolute: amount(0, 10_000).optional(),
  fullScale: amount(0, 1_000_000).optional(),
  resolution: amount(0, 10_000).optional(),
  unit: line(12, 1).optional(),
}

/** Of a part that is kept as a reference: what an instrument that has not drifted reads on it. */
const reference = {
  referenceReads: line(120, 1).optional(),
  referenceFor: z.enum(INSTRUMENT_CATEGORIES).optional(),
  referenceValue: amount(-1_000_000, 1_000_000).optional(),
  referenceTolerance: amount(0, 1_000_000).optional(),
  referenceUnit: line(12, 1).optional(),
}

const frequencyRange = {
  minMhz: amount(0.001, 100_000).optional(),
  maxMhz: amount(0.001, 100_000).optional(),
}

/** Current drawn at each power setting, A at W. */
const drawA = z
  .array(z.strictObject({ watts: amount(0, 10_000), amps: amount(0.01, 1000) }))
  .max(12)
  .refine((list) => new Set(list.map((entry) => entry.watts)).size === list.length, 'Name each power once.')

export const DETAIL_FIELDS = {
  radio: {
    bands: bands.optional(),
    ratedWatts: watts,
    drawA: drawA.optional(),
    receiveA: amount(0, 100).optional(),
    /** Mean load of the whole station at the duty of its kind, A; a radio check with currents comes before it. */
    meanLoadA: amps,
    minV: volts,
    connector: name,
  },
  transformer: {
    core: name,
    cores: z.int().min(1).max(20).optional(),
    mix: line(20, 1).optional(),
    /** All cores together, weighed without wire: what warms in a heat test. */
    coreMassG: amount(0.1, 10_000).optional(),
    turnsPrimary: amount(0.5, 200).optional(),
    turnsSecondary: amount(0.5, 500).optional(),
    wire: name,
    insulation: name,
    capacitorPf: amount(0, 100_000).optional(),
    capacitorV: amount(1, 100_000).optional(),
    bands: bands.optional(),
    ratedWatts: watts,
    connector: name,
  },
  antenna: {
    design: name,
    bands: bands.optional(),
    lengthM,
    wire: name,
    feedOhms: ohms,
    ratedWatts: watts,
    connector: name,
  },
  feedline: {
    ...cable,
    impedanceOhms: ohms,
    velocityFactor: amount(0.3, 1).optional(),
    /** Loss when it was new or last put right: the line that later tests are judged from. */
    baselineDb: amount(0, 60).optional(),
    /** Radio to antenna in its kit, the antenna's SWR included, dB by band. */
    lossDb: z.partialRecord(z.enum(BANDS), amount(0, 60)).optional(),
  },
  jumper: { ...cable, lossDb: z.partialRecord(z.enum(BANDS), amount(0, 60)).optional() },
  battery: {
    chemistry: z.enum(CHEMISTRIES).optional(),
    ratedAh: amount(0.1, 10_000).optional(),
    nominalV: volts,
    maxA: amps,
    connector: name,
  },
  charger: {
    outputV: volts,
    outputA: amps,
    chemistries: z.array(z.enum(CHEMISTRIES)).max(CHEMISTRIES.length).optional(),
    supply: name,
    connector: name,
  },
  'dc-lead': {
    ratedA: amps,
    fuseA: amps,
    connectorA: name,
    connectorB: name,
    lengthM,
    awg: z.int().min(-3).max(40).optional(),
  },
  'adapter-pouch': { contents },
  mast: { design: name, heightM: amount(0.1, 100).optional(), sections: z.int().min(1).max(50).optional() },
  headset: { connector: name, impedanceOhms: ohms },
  computer: { operatingSystem: name, software: contents, supplyV: volts, supplyA: amps },
  interface: { design: name, connectorA: name, connectorB: name },
  filter: {
    design: name,
    bands: bands.optional(),
    ratedWatts: watts,
    insertionLossDb: amount(0, 60).optional(),
  },
  'solar-panel': { ratedWatts: watts, openCircuitV: volts, shortCircuitA: amps, connector: name },
  'solar-controller': { design: z.enum(['pwm', 'mppt']).optional(), ratedA: amps, maxInputV: volts },
  'distribution-box': {
    ratedA: amps,
    fuseA: amps,
    outputs: z.int().min(1).max(50).optional(),
    connector: name,
  },
  analyzer: {
    ...accuracy,
    ...frequencyRange,
    /** Standard error of the real and of the imaginary part of a reflection; absent: 0.01. */
    reflectionError: amount(0.0001, 0.5).optional(),
    connector: name,
  },
  wattmeter: { ...accuracy, ...frequencyRange, connector: name },
  'dummy-load': { ...accuracy, ratedWatts: watts, loadOhms: ohms, connector: name, ...reference },
  thermometer: { ...accuracy, sensor: z.enum(['contact', 'infrared']).optional() },
  'battery-tester': { ...accuracy, maxA: amps },
  multimeter: { ...accuracy },
  'clamp-meter': { ...accuracy },
  'calibration-kit': { ...accuracy, ...frequencyRange, connector: name, ...reference },
  'test-fixture': { ...accuracy, loadOhms: ohms, ratedWatts: watts, connector: name, ...reference },
  accessory: { contents, ...reference },
} as const satisfies Record<Category, z.ZodRawShape>

export type DetailField<C extends Category> = keyof (typeof DETAIL_FIELDS)[C]
