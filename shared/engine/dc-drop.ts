/**
 * Voltage lost between battery and radio: out and back, contacts and fuses included.
 * Source: Ohm's law; calculation sheet, section 10.
 */
import { finiteResult } from './check-range.ts'
import { checkNumber, failure, isFailure, type Failure, type Outcome } from './outcome.ts'
import { awgOhmPerM, STRANDED_FACTOR } from './wire-gauge.ts'

/** 13.8 V less 15 %: common practice, the radio's own manual wins. */
export const DEFAULT_LOWEST_RADIO_V = 11.7
/** All contacts and fuses of a lead. */
export const DEFAULT_CONTACTS_OHM = 0.004

export interface DcLead {
  /** AWG, -3 (4/0) to 40. */
  readonly gauge: number
  /** One way, 0 to 1000 m; the current runs out and back. */
  readonly lengthM: number
  /** 0 to 10 ohm. */
  readonly contactsOhm?: number
  /** Of the copper, -40 to 105 deg C; 20 unless given. */
  readonly conductorC?: number
  readonly stranded?: boolean
}

export interface DcDrop {
  readonly dropV: number
  readonly radioV: number
  /** Share of the battery's voltage that is lost. */
  readonly fraction: number
  readonly verdict: 'OK' | 'FAIL'
}

/** `2 l R' + Rc`, ohm. `E_AWG`, `E_RANGE`. */
export function leadOhm(lead: DcLead): Outcome<number> {
  const { gauge, lengthM, contactsOhm = DEFAULT_CONTACTS_OHM, conductorC = 20, stranded = false } = lead
  const bad = checkNumber('lengthM', lengthM, 0, 1000) ?? checkNumber('contactsOhm', contactsOhm, 0, 10)
  if (bad) return bad
  const ohmPerM = awgOhmPerM(gauge, conductorC)
  if (isFailure(ohmPerM)) return ohmPerM
  return 2 * lengthM * ohmPerM * (stranded ? STRANDED_FACTOR : 1) + contactsOhm
}

/**
 * Drop at a current (0 to 10,000 A) from the battery's voltage under that load (above 0 to 1000 V). `FAIL` below
 * the radio's lowest voltage. A drop above the battery's voltage means that the current cannot flow: `E_RANGE`.
 */
export function dcDrop(
  lead: DcLead,
  use: { currentA: number; batteryV: number; lowestRadioV?: number },
): Outcome<DcDrop> {
  const { currentA, batteryV, lowestRadioV = DEFAULT_LOWEST_RADIO_V } = use
  const bad = checkNumber('currentA', currentA, 0, 10_000) ?? checkVoltages(batteryV, lowestRadioV)
  if (bad) return bad
  const ohm = leadOhm(lead)
  if (isFailure(ohm)) return ohm
  const dropV = currentA * ohm
  if (dropV >= batteryV)
    return failure('E_RANGE', 'So much current cannot flow: the lead would take all the voltage.', {
      field: 'currentA',
    })
  const radioV = batteryV - dropV
  return { dropV, radioV, fraction: dropV / batteryV, verdict: radioV < lowestRadioV ? 'FAIL' : 'OK' }
}

/**
 * Largest current that leaves the radio its lowest voltage, A; 0 when the battery is already there.
 * `E_RANGE`, also for a lead without any resistance.
 */
export function largestCurrentA(
  lead: DcLead,
  use: { batteryV: number; lowestRadioV?: number },
): Outcome<number> {
  const { batteryV, lowestRadioV = DEFAULT_LOWEST_RADIO_V } = use
  const bad = checkVoltages(batteryV, lowestRadioV)
  if (bad) return bad
  const ohm = leadOhm(lead)
  return isFailure(ohm) ? ohm : finiteResult(Math.max(0, batteryV - lowestRadioV) / ohm)
}

function checkVoltages(batteryV: number, lowestRadioV: number): Failure | undefined {
  return checkNumber('batteryV', batteryV, 0.1, 1000) ?? checkNumber('lowestRadioV', lowestRadioV, 0, 1000)
}
