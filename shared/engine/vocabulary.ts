/** The closed lists of words that the database, the contracts and the screens share. */

/** Item categories. The two letters begin the tags of that category (calculation sheet, section 13; our choice). */
export const CATEGORIES = {
  radio: 'RD',
  transformer: 'XF',
  antenna: 'AN',
  feedline: 'FD',
  jumper: 'JM',
  battery: 'BT',
  charger: 'CH',
  'dc-lead': 'DC',
  'adapter-pouch': 'AD',
  mast: 'MS',
  headset: 'HD',
  computer: 'CM',
  interface: 'NF',
  filter: 'FT',
  'solar-panel': 'SP',
  'solar-controller': 'SC',
  'distribution-box': 'DB',
  analyzer: 'AZ',
  wattmeter: 'WM',
  'dummy-load': 'DM',
  thermometer: 'TH',
  'battery-tester': 'BC',
  multimeter: 'MM',
  'clamp-meter': 'CP',
  'calibration-kit': 'CK',
  'test-fixture': 'FX',
  accessory: 'AC',
} as const

export type Category = keyof typeof CATEGORIES

/** The two letters that begin every kit's tag. */
export const KIT_TAG_PREFIX = 'KT'

/** Categories that measure: their calibration decides whether results stand. */
export const INSTRUMENT_CATEGORIES = [
  'analyzer',
  'wattmeter',
  'thermometer',
  'battery-tester',
  'multimeter',
  'clamp-meter',
  'calibration-kit',
  'test-fixture',
  'dummy-load',
] as const satisfies readonly Category[]

export const PROCEDURES = [
  'heat-test',
  'pair-loss',
  'open-short-load',
  'antenna-sweep',
  'feedline-loss',
  'battery-capacity',
  'radio-check',
  'inspection',
  'count',
  'calibration',
  'session-check',
  'boot-and-update',
  'on-air-check',
] as const

export type Procedure = (typeof PROCEDURES)[number]

/** Amateur bands by wavelength, longest first: the order of every band strip. */
export const BANDS = [
  '160 m',
  '80 m',
  '60 m',
  '40 m',
  '30 m',
  '20 m',
  '17 m',
  '15 m',
  '12 m',
  '10 m',
  '6 m',
  '2 m',
  '1.25 m',
  '70 cm',
] as const

export type Band = (typeof BANDS)[number]

export const MODES = ['voice', 'digital', 'relay'] as const
export type Mode = (typeof MODES)[number]

/** Best first; a verdict's rank is its place in this list. */
export const VERDICTS = ['proven', 'proven-with-limits', 'not-proven', 'not-fit'] as const
export type Verdict = (typeof VERDICTS)[number]

/** Whether a kit of this verdict can go, if it is available. */
export const isDeployable = (verdict: Verdict): boolean =>
  verdict === 'proven' || verdict === 'proven-with-limits'

/** The three words of NIMS, unchanged. */
export const AVAILABILITIES = ['available', 'assigned', 'out-of-service'] as const
export type Availability = (typeof AVAILABILITIES)[number]

export const CONDITIONS = ['serviceable', 'unserviceable', 'missing', 'away'] as const
export type Condition = (typeof CONDITIONS)[number]

export const FINDINGS = ['pass', 'marginal', 'fail'] as const
export type FindingWord = (typeof FINDINGS)[number]

/** How strictly a thing must come back, strictest first. */
export const ACCOUNTABILITIES = ['accountable', 'durable', 'expendable'] as const
export type Accountability = (typeof ACCOUNTABILITIES)[number]

/** Battery chemistries: lithium iron phosphate, other lithium, three kinds of lead-acid, nickel. */
export const CHEMISTRIES = ['lifepo4', 'lithium-ion', 'agm', 'gel', 'flooded', 'nimh'] as const
export type Chemistry = (typeof CHEMISTRIES)[number]
