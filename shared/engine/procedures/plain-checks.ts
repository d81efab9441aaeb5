/** The procedures whose result a person states: inspection, calibration, boot and update. */
import type { Outcome } from '../outcome.ts'
import { findingOf, judgementOf, type Judgement } from './judgement.ts'

export interface InspectionInputs {
  readonly serviceable: boolean
  readonly found: string
}

/** "Unserviceable" makes the item so. Source: common practice, no source. */
export function judgeInspection({ serviceable, found }: InspectionInputs): Outcome<Judgement> {
  const said = found === '' ? '' : `: ${found}`
  const finding = findingOf({
    measure: 'serviceable',
    value: serviceable ? 1 : 0,
    finding: serviceable ? 'pass' : 'fail',
    limit: 'serviceable',
    text: `${serviceable ? 'serviceable' : 'unserviceable'}${said}`,
  })
  return judgementOf({ serviceable }, [finding])
}

export interface CalibrationInputs {
  readonly passed: boolean
  readonly certificate: string
  readonly deviation: string
}

/** A failed calibration puts the results since the last good one in doubt. Source: ISO/IEC 17025 practice. */
export function judgeCalibration({ passed, certificate, deviation }: CalibrationInputs): Outcome<Judgement> {
  const parts = [
    passed ? 'calibration passed' : 'calibration failed',
    ...(certificate === '' ? [] : [`certificate ${certificate}`]),
    ...(deviation === '' ? [] : [deviation]),
  ]
  const finding = findingOf({
    measure: 'calibration',
    value: passed ? 1 : 0,
    finding: passed ? 'pass' : 'fail',
    limit: 'within its data sheet',
    text: parts.join(', '),
  })
  return judgementOf({ passed }, [finding])
}

export interface BootAndUpdateInputs {
  readonly boots: boolean
  readonly updatesDone: boolean
  readonly clockRight?: boolean | undefined
  readonly softwareVersion: string
}

/** Source: common practice, no source. */
export function judgeBootAndUpdate(inputs: BootAndUpdateInputs): Outcome<Judgement> {
  const { boots, updatesDone, clockRight, softwareVersion } = inputs
  const isUpToDate = boots && updatesDone
  const text = boots ? `boots, ${updatesDone ? 'updates done' : 'updates not done'}` : 'does not boot'
  const finding = findingOf({
    measure: 'upToDate',
    value: isUpToDate ? 1 : 0,
    finding: isUpToDate ? 'pass' : 'fail',
    limit: 'boots, updates done',
    text: softwareVersion === '' ? text : `${text}, ${softwareVersion}`,
  })
  const warnings =
    clockRight === false
      ? [
          {
            code: 'W_CLOCK',
            message: 'The clock is wrong: its battery may be flat, and digital modes need it.',
          },
        ]
      : []
  return judgementOf({ boots, updatesDone }, [finding], warnings)
}
