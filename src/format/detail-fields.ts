import { CHEMISTRIES, INSTRUMENT_CATEGORIES, type Category } from '#shared/engine/vocabulary.ts'
import { CHEMISTRY_WORDS } from '@/registry-words.ts'
import { CATEGORY_WORDS } from '@/words.ts'

/**
 * How each field of an item's details is called, asked for and written. The fields of a category and their limits
 * stand in the contract `item-detail-fields.ts`; the stored unit is named here as the screens write it.
 */
export type DetailField =
  | {
      readonly kind: 'text' | 'long' | 'bands' | 'loss-by-band' | 'draw'
      readonly label: string
      readonly hint?: string
    }
  | {
      readonly kind: 'number'
      readonly label: string
      readonly unit: string
      readonly digits: number
      readonly hint?: string
    }
  | {
      readonly kind: 'choice' | 'choices'
      readonly label: string
      readonly options: readonly Option[]
      readonly hint?: string
    }

interface Option {
  readonly value: string
  readonly label: string
}

const text = (label: string, hint?: string): DetailField => ({ kind: 'text', label, hint })
const number = (label: string, unit: string, digits = 2, hint?: string): DetailField => ({
  kind: 'number',
  label,
  unit,
  digits,
  hint,
})

const CHEMISTRY_OPTIONS = CHEMISTRIES.map((value) => ({ value, label: CHEMISTRY_WORDS[value] }))

const FIELDS: Readonly<Record<string, DetailField>> = {
  bands: { kind: 'bands', label: 'Bands' },
  ratedWatts: number('Rated power', 'W', 1),
  drawA: { kind: 'draw', label: 'Current drawn at each power', hint: 'From the manual, or better measured.' },
  receiveA: number('Current on receive', 'A', 3),
  meanLoadA: number(
    'Mean load of the station',
    'A',
    2,
    'Of the whole station at its usual duty. A radio check that read the currents comes before it.',
  ),
  minV: number('Lowest supply voltage', 'V', 2),
  connector: text('Connector'),
  connectorA: text('Connector at one end'),
  connectorB: text('Connector at the other end'),
  core: text('Core', 'Size and maker’s number.'),
  cores: number('Cores stacked', '', 0),
  mix: text('Mix'),
  coreMassG: number('Mass of the cores', 'g', 1, 'Weighed without wire.'),
  turnsPrimary: number('Primary turns', '', 1),
  turnsSecondary: number('Secondary turns', '', 1),
  wire: text('Wire'),
  insulation: text('Insulation'),
  capacitorPf: number('Capacitor', 'pF', 1),
  capacitorV: number('Capacitor rated for', 'V', 0),
  design: text('Design'),
  lengthM: number('Length', 'm', 2),
  feedOhms: number('Impedance at the feed point', 'Ω', 1),
  cable: text('Cable'),
  impedanceOhms: number('Impedance', 'Ω', 1),
  velocityFactor: number('Velocity factor', '', 3),
  baselineDb: number('Loss when new', 'dB', 2, 'Or when last put right; later tests are judged from it.'),
  lossDb: {
    kind: 'loss-by-band',
    label: 'Loss by band',
    hint: 'Radio to antenna, the antenna’s SWR included.',
  },
  insertionLossDb: number('Insertion loss', 'dB', 2),
  chemistry: { kind: 'choice', label: 'Chemistry', options: CHEMISTRY_OPTIONS },
  ratedAh: number('Rated capacity', 'Ah', 2),
  nominalV: number('Nominal voltage', 'V', 2),
  maxA: number('Largest current', 'A', 2),
  outputV: number('Output voltage', 'V', 2),
  outputA: number('Output current', 'A', 2),
  chemistries: { kind: 'choices', label: 'Charges', options: CHEMISTRY_OPTIONS },
  supply: text('Supplied from', 'Mains, a vehicle, the sun.'),
  ratedA: number('Rated current', 'A', 2),
  fuseA: number('Fuse', 'A', 2),
  awg: number('Wire gauge', 'AWG', 0),
  contents: { kind: 'long', label: 'Contents' },
  heightM: number('Height', 'm', 2),
  sections: number('Sections', '', 0),
  operatingSystem: text('Operating system'),
  software: { kind: 'long', label: 'Software' },
  supplyV: number('Supply voltage', 'V', 2),
  supplyA: number('Supply current', 'A', 2),
  openCircuitV: number('Open-circuit voltage', 'V', 2),
  shortCircuitA: number('Short-circuit current', 'A', 2),
  maxInputV: number('Largest input voltage', 'V', 1),
  outputs: number('Outputs', '', 0),
  accuracyPercentOfReading: number('Accuracy, part of the reading', '%', 3),
  accuracyPercentOfFullScale: number('Accuracy, part of full scale', '%', 3),
  accuracyAbsolute: number('Accuracy, fixed part', '', 4, 'In the unit that it reads in.'),
  fullScale: number('Full scale', '', 4),
  resolution: number('Resolution', '', 4),
  reflectionError: number(
    'Error of a reflection',
    '',
    4,
    'Of its real and of its imaginary part; 0.01 when empty.',
  ),
  unit: text('Unit that it reads in', 'Such as W, V or °C.'),
  minMhz: number('Lowest frequency', 'MHz', 3),
  maxMhz: number('Highest frequency', 'MHz', 3),
  loadOhms: number('Load', 'Ω', 1),
  referenceReads: text('Kept as a reference: what is read on it', 'Such as SWR at 7.1 MHz, short lead.'),
  referenceFor: {
    kind: 'choice',
    label: 'Reference for',
    options: INSTRUMENT_CATEGORIES.map((value) => ({ value, label: CATEGORY_WORDS[value] })),
  },
  referenceValue: number('Agreed reading', '', 4, 'As read while the instrument was in date.'),
  referenceTolerance: number('Tolerance, either way', '', 4, 'In the unit of the reading.'),
  referenceUnit: text('Unit of the agreed reading', 'Empty for a ratio such as SWR.'),
  sensor: {
    kind: 'choice',
    label: 'Sensor',
    options: [
      { value: 'contact', label: 'Contact' },
      { value: 'infrared', label: 'Infrared' },
    ],
  },
}

/** Where a category means something else by a name. */
const OWN: Readonly<Partial<Record<Category, Readonly<Record<string, DetailField>>>>> = {
  'solar-controller': {
    design: {
      kind: 'choice',
      label: 'Design',
      options: [
        { value: 'pwm', label: 'PWM' },
        { value: 'mppt', label: 'MPPT' },
      ],
    },
  },
}

export function detailField(category: Category, name: string): DetailField {
  return OWN[category]?.[name] ?? FIELDS[name] ?? text(name)
}
