import { checkNumber, failure, isFailure, type Outcome } from './outcome.ts'
import { reflectionFromGamma } from './reflection.ts'
import type { TerminationReadings } from './terminations.ts'

/**
 * Loss of a matched attenuator in front of a total reflection of SWR 1 or more: half the return loss, dB.
 * Infinite SWR is no loss, an SWR of 1 hides any loss: `E_RANGE`. Common practice, no source.
 */
export function matchedAttenuatorLossDb(swr: number): Outcome<number> {
  if (swr === Infinity) return 0
  const bad = checkNumber('swr', swr, 1)
  if (bad) return bad
  if (swr === 1) return failure('E_RANGE', 'At an SWR of 1 the reflection hides any loss.', { field: 'swr' })
  return -10 * Math.log10((swr - 1) / (swr + 1))
}

/**
 * Loss when all of it is a shunt (open trace) or all a series resistance (short trace): `10 log(1 + 1/X)` dB,
 * X an SWR of 1 or more. A ferrite transformer is the shunt case, so an SWR of 5 on the open trace is about
 * 0.8 dB and not 1.76 dB. Common practice, no source.
 */
export function shuntLossDb(swr: number): Outcome<number> {
  if (swr === Infinity) return 0
  return checkNumber('swr', swr, 1) ?? 10 * Math.log10(1 + 1 / swr)
}

/** Estimates from open and short alone. Show them only when the load file is missing, marked as estimates. */
export interface LossEstimate {
  readonly flag: 'ESTIMATE'
  readonly openHalfReturnLossDb: number
  readonly meanHalfReturnLossDb: number
  /** Good at low HF, half the truth at 28 MHz, where leakage hides the loss. */
  readonly twoResistorDb: number
}

/** 120 dB of return loss: no estimate comes from that. */
const NO_REFLECTION = 1e-6

/**
 * Half the return loss of the open trace, the mean of both halves, and `10 log((1+1/Xopen)(1+1/Xshort))`, in
 * dB. `E_ACTIVE` for a reflection above 1.05, `E_ILL_CONDITIONED` for none at all. Common practice, no
 * source.
 */
export function estimateLoss({
  open,
  short,
}: Pick<TerminationReadings, 'open' | 'short'>): Outcome<LossEstimate> {
  const atOpen = reflectionFromGamma(open)
  if (isFailure(atOpen)) return atOpen
  const atShort = reflectionFromGamma(short)
  if (isFailure(atShort)) return atShort
  if (Math.min(atOpen.magnitude, atShort.magnitude) < NO_REFLECTION) {
    return failure('E_ILL_CONDITIONED', 'Open or short reflects nothing: the device is not connected.')
  }
  return {
    flag: 'ESTIMATE',
    openHalfReturnLossDb: atOpen.returnLossDb / 2,
    meanHalfReturnLossDb: (atOpen.returnLossDb + atShort.returnLossDb) / 4,
    twoResistorDb: 10 * Math.log10((1 + 1 / atOpen.swr) * (1 + 1 / atShort.swr)),
  }
}
