/**
 * A starting length for a wire antenna. The customary constants 143/f m and 468/f ft are two different
 * numbers (468 ft is 142.646 m), and both are shorter than a bare wire's modelled resonance: cut long, trim.
 * Source: amateur handbooks, common practice; free space from the speed of light (sheet, section 7).
 */
import { checkPositive, finiteResult } from './check-range.ts'
import { checkNumber, type Failure, type Outcome } from './outcome.ts'

/** Half a wavelength in free space times frequency, m MHz. */
export const HALF_WAVE_M_MHZ = 149.896229
/** Customary: k = 0.954 of free space. */
export const CUSTOMARY_M_MHZ = 143
/** Customary: k = 0.9516 of free space. */
export const CUSTOMARY_FT_MHZ = 468

/** Half a wavelength in free space, m; f above 0 to 100,000 MHz. `E_RANGE`. */
export function freeHalfWaveM(frequencyMhz: number): Outcome<number> {
  return checkFrequency(frequencyMhz) ?? finiteResult(HALF_WAVE_M_MHZ / frequencyMhz)
}

/** Half wave to cut, m: k times free space, k 0.5 to 1. A quarter wave is half of it. `E_RANGE`. */
export function halfWaveCutM(frequencyMhz: number, k: number): Outcome<number> {
  const bad = checkFrequency(frequencyMhz) ?? checkNumber('k', k, 0.5, 1)
  return bad ?? finiteResult((k * HALF_WAVE_M_MHZ) / frequencyMhz)
}

/** 143/f, m. `E_RANGE`. */
export function customaryHalfWaveM(frequencyMhz: number): Outcome<number> {
  return checkFrequency(frequencyMhz) ?? finiteResult(CUSTOMARY_M_MHZ / frequencyMhz)
}

/** 468/f, ft. `E_RANGE`. */
export function customaryHalfWaveFt(frequencyMhz: number): Outcome<number> {
  return checkFrequency(frequencyMhz) ?? finiteResult(CUSTOMARY_FT_MHZ / frequencyMhz)
}

function checkFrequency(frequencyMhz: number): Failure | undefined {
  return checkPositive('frequencyMhz', frequencyMhz, 100_000)
}
