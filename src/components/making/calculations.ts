import type { Procedure } from '#shared/engine/vocabulary.ts'

/** How the figures of a procedure are calculated, in words a person can follow with a pocket calculator. */
export interface Calculation {
  readonly name: string
  /** Where the calculation sheet describes it. */
  readonly section: string
  readonly formulas: readonly string[]
  readonly source: string
}

const STATED: Calculation = {
  name: 'Stated by the person who looked',
  section: '',
  formulas: ['Nothing is calculated: the finding is what was stated.'],
  source: 'common practice, no source',
}

export const CALCULATIONS: Readonly<Record<Procedure, Calculation>> = {
  'pair-loss': {
    name: 'Two like devices back to back',
    section: 'Calculation sheet, sections 3 and 5',
    formulas: [
      'loss of the pair in dB = 10 log (power in / power out), half of it for each device',
      'efficiency = 10^(−loss / 10)',
      'accuracy limits of both readings are taken as even between their ends, added as squares and halved; ± is twice the standard uncertainty',
    ],
    source: 'JCGM 100:2008 (GUM), 4.3.7 and 5.1',
  },
  'open-short-load': {
    name: 'Open, short and load at the secondary',
    section: 'Calculation sheet, section 4',
    formulas: [
      'three reflections at the 50 ohm side, with the secondary open, shorted and loaded, give the loss between',
      'loss in dB = −10 log (efficiency); the worst point of each band counts',
    ],
    source: 'worked out in the calculation sheet',
  },
  'heat-test': {
    name: 'Key-down heat test',
    section: 'Calculation sheet, section 6',
    formulas: [
      'T = T0 + A (1 − e^(−t / τ)), fitted to the readings while keyed by least squares',
      'the curve is shown only where a straight line fits significantly worse and the interval of τ is no wider than τ',
      'the 95 % interval holds every curve that the readings cannot tell from the best one',
    ],
    source:
      'lumped capacitance: Incropera and DeWitt, ch. 5; profile intervals: Bates and Watts 1988, ch. 6 (not yet checked against the books)',
  },
  'antenna-sweep': {
    name: 'Sweep of an antenna',
    section: 'Calculation sheet, sections 2 and 7',
    formulas: [
      'SWR = (1 + |Γ|) / (1 − |Γ|); the worst working point of a band is judged, else the worst of the band',
    ],
    source: 'Pozar, Microwave Engineering, 2.3 (not yet checked against the book)',
  },
  'feedline-loss': {
    name: 'Loss of a feedline against its baseline',
    section: 'Calculation sheet, section 8',
    formulas: [
      'with the far end open or shorted the loss is half the return loss',
      'limit = baseline + the rise that the rule allows',
    ],
    source: 'common practice, no source',
  },
  'battery-capacity': {
    name: 'Capacity referred to 25 °C',
    section: 'Calculation sheet, section 10',
    formulas: [
      'capacity at 25 °C = ampere-hours taken out / temperature factor',
      'fraction = capacity at 25 °C / rated capacity',
    ],
    source: 'IEEE 1188-2005 and 450-2002, written for stationary batteries',
  },
  'radio-check': {
    name: 'Output power against the power setting',
    section: '',
    formulas: [
      'limit = power setting × the least fraction of the rule, at the highest setting that was tried',
    ],
    source: 'common practice, no source',
  },
  count: {
    ...STATED,
    name: 'Counted against the load plan',
    formulas: ['missing = quantity of the load plan − found'],
  },
  'session-check': {
    name: 'Reading against the agreed value of a reference part',
    section: '',
    formulas: [
      'off = reading − agreed value; it passes when it is no further off than the tolerance of the part',
      'it shows that the instrument repeats itself at this one value, and nothing about the rest of its range',
    ],
    source: 'common practice, no source',
  },
  inspection: STATED,
  calibration: STATED,
  'boot-and-update': STATED,
  'on-air-check': STATED,
}
