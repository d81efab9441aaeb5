import { INSTRUMENT_CATEGORIES, type Category, type Procedure } from '../vocabulary.ts'

/** What each procedure is done to; `any`: every category. Procedures on a whole kit name none. */
export const SUBJECTS: Readonly<Record<Procedure, readonly Category[] | 'any' | 'kit'>> = {
  'heat-test': ['transformer'],
  'pair-loss': ['transformer'],
  'open-short-load': ['transformer'],
  'antenna-sweep': ['antenna'],
  'feedline-loss': ['feedline', 'jumper'],
  'battery-capacity': ['battery'],
  'radio-check': ['radio'],
  inspection: 'any',
  count: 'kit',
  calibration: INSTRUMENT_CATEGORIES,
  'session-check': INSTRUMENT_CATEGORIES,
  'boot-and-update': ['computer'],
  'on-air-check': 'kit',
}

/** The instruments that a procedure is read from, the usual one first. */
export const INSTRUMENTS: Readonly<Record<Procedure, readonly Category[]>> = {
  'heat-test': ['thermometer', 'multimeter'],
  'pair-loss': ['wattmeter', 'analyzer'],
  'open-short-load': ['analyzer'],
  'antenna-sweep': ['analyzer', 'wattmeter'],
  'feedline-loss': ['analyzer', 'wattmeter'],
  'battery-capacity': ['battery-tester', 'multimeter', 'clamp-meter'],
  'radio-check': ['wattmeter'],
  inspection: [],
  count: [],
  calibration: [],
  'session-check': [],
  'boot-and-update': [],
  'on-air-check': ['wattmeter'],
}

/** Every kind of instrument that something is read from. */
export const READ_FROM: readonly Category[] = [...new Set(Object.values(INSTRUMENTS).flat())]

export function canBeTested(category: Category, procedure: Procedure): boolean {
  const subjects = SUBJECTS[procedure]
  return subjects === 'any' || (subjects !== 'kit' && subjects.includes(category))
}
