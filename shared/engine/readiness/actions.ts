import type { Band, Procedure } from '../vocabulary.ts'
import type { Action } from './period-types.ts'
import { capital, onBand, PROCEDURE_WORDS } from './words.ts'

/** What would lift a reason, with attended minutes. */

/** Attended minutes; a capacity run is unattended after its first ten (common practice, no source). */
export const MINUTES: Readonly<Record<Procedure, number>> = {
  'heat-test': 60,
  'pair-loss': 20,
  'open-short-load': 20,
  'antenna-sweep': 15,
  'feedline-loss': 15,
  'battery-capacity': 10,
  'radio-check': 15,
  inspection: 10,
  count: 30,
  calibration: 60,
  'session-check': 10,
  'boot-and-update': 60,
  'on-air-check': 15,
}
/** Common practice, no source. */
export const SWAP_MINUTES = 15
export const FETCH_MINUTES = 120
export const REPAIR_MINUTES = 45

const KINDS: Readonly<Partial<Record<Procedure, Action['kind']>>> = {
  count: 'count',
  calibration: 'calibrate',
}

/** What lifts a missing, lapsed or doubted check. */
export function testAction(name: string, procedure: Procedure, band: Band | null): Action {
  const text =
    procedure === 'count'
      ? `Count ${name}`
      : `${capital(PROCEDURE_WORDS[procedure])} of ${name}${onBand(band)}`
  return { kind: KINDS[procedure] ?? 'test', text, minutes: MINUTES[procedure] }
}

export function replaceAction(name: string): Action {
  return { kind: 'replace', text: `Replace ${name}`, minutes: SWAP_MINUTES }
}

export function repairAction(name: string, procedure: Procedure): Action {
  const text = `Put ${name} right: ${PROCEDURE_WORDS[procedure]} after it`
  return { kind: 'repair', text, minutes: REPAIR_MINUTES + MINUTES[procedure] }
}

export function strongerAction(name: string): Action {
  return { kind: 'buy', text: `Fit a stronger part than ${name}`, minutes: FETCH_MINUTES }
}

export function bringBackAction(name: string): Action {
  return { kind: 'find', text: `Bring ${name} back, or replace it`, minutes: FETCH_MINUTES }
}

export function fillAction(position: string): Action {
  return { kind: 'buy', text: `Find or buy what belongs in ${position}`, minutes: FETCH_MINUTES }
}

export const BATTERIES_ACTION: Action = {
  kind: 'replace',
  text: 'Fit batteries that passed their capacity test',
  minutes: SWAP_MINUTES,
}

export const MEASURE_LOAD_ACTION: Action = {
  kind: 'test',
  text: 'Read what the radio draws, receiving and at full power, in a radio check',
  minutes: SWAP_MINUTES,
}

export const SETTLE_ACTION: Action = {
  kind: 'decide',
  text: 'Settle it with whoever lowered the verdict',
  minutes: null,
}
