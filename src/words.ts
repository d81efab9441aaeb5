import type {
  Availability,
  Category,
  Condition,
  FindingWord,
  Procedure,
  Verdict,
} from '#shared/engine/vocabulary.ts'
import type { Role } from '#shared/contracts/roles.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'

export { counted } from '#shared/engine/plain-words.ts'

/** The vocabulary as the screens write it. One word per notion; see the glossary of the design. */

export const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
  proven: 'Proven',
  'proven-with-limits': 'Proven with limits',
  'not-proven': 'Not proven',
  'not-fit': 'Not fit',
}

export const AVAILABILITY_WORDS: Readonly<Record<Availability, string>> = {
  available: 'Available',
  assigned: 'Assigned',
  'out-of-service': 'Out of service',
}

export const CONDITION_WORDS: Readonly<Record<Condition, string>> = {
  serviceable: 'Serviceable',
  unserviceable: 'Unserviceable',
  missing: 'Missing',
  away: 'Away',
}

export const FINDING_WORDS: Readonly<Record<FindingWord, string>> = {
  pass: 'Pass',
  marginal: 'Marginal',
  fail: 'Fail',
}

export const CHECK_WORDS: Readonly<Record<CheckState['state'], string>> = {
  current: 'In date',
  'due-soon': 'Due soon',
  overdue: 'Overdue',
  never: 'Never done',
  failed: 'Failed',
  'in-doubt': 'In doubt',
}

export const PROCEDURE_WORDS: Readonly<Record<Procedure, string>> = {
  'heat-test': 'Heat test',
  'pair-loss': 'Pair loss',
  'open-short-load': 'Open, short and load sweep',
  'antenna-sweep': 'Antenna sweep',
  'feedline-loss': 'Feedline loss',
  'battery-capacity': 'Capacity test',
  'radio-check': 'Radio check',
  inspection: 'Inspection',
  count: 'Count',
  calibration: 'Calibration',
  'session-check': 'Session check',
  'boot-and-update': 'Boot and update',
  'on-air-check': 'On-air check',
}

export const CATEGORY_WORDS: Readonly<Record<Category, string>> = {
  radio: 'Radio',
  transformer: 'Transformer',
  antenna: 'Antenna',
  feedline: 'Feedline',
  jumper: 'Jumper',
  battery: 'Battery',
  charger: 'Charger',
  'dc-lead': 'DC lead',
  'adapter-pouch': 'Adapter pouch',
  mast: 'Mast',
  headset: 'Headset',
  computer: 'Computer',
  interface: 'Interface',
  filter: 'Filter',
  'solar-panel': 'Solar panel',
  'solar-controller': 'Solar controller',
  'distribution-box': 'Distribution box',
  analyzer: 'Analyzer',
  wattmeter: 'Wattmeter',
  'dummy-load': 'Dummy load',
  thermometer: 'Thermometer',
  'battery-tester': 'Battery tester',
  multimeter: 'Multimeter',
  'clamp-meter': 'Clamp meter',
  'calibration-kit': 'Calibration kit',
  'test-fixture': 'Test fixture',
  accessory: 'Accessory',
}

export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  administrator: 'Administrator',
  'net-coordinator': 'Net coordinator',
  quartermaster: 'Quartermaster',
  volunteer: 'Volunteer',
  observer: 'Observer',
}

export const SIGN_IN_WORDS = {
  active: 'Signs in',
  invited: 'Invited',
  'no-sign-in': 'No sign-in',
} as const
