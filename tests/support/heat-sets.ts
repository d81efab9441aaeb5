import type { HeatLog } from '#shared/engine/heat-log.ts'

/** Logged sets of the calculation sheet, section 6, and NIST StRD data for the same model. */

export function logOf(ambientC: number, stepS: number, temperatures: readonly number[]): HeatLog {
  const readings = temperatures.map((temperatureC, i) => ({ atS: i * stepS, temperatureC }))
  return { ambientC, readings, thermometerStepK: 0 }
}

export const SET_A = logOf(
  21.5,
  60,
  [21.7, 31.8, 39.9, 46.7, 52.7, 57.8, 61.7, 64.8, 67.3, 69.8, 71.5, 72.5, 73.5, 74.7, 75.5, 76.5],
)
export const SET_B = logOf(21.5, 15, [20.7, 24.2, 27.5, 29.0, 31.4, 33.9, 35.5, 38.1, 40.1, 42.0, 43.4])
/** Warm start: 6 K over ambient. */
export const SET_C = logOf(
  21.5,
  100,
  [27.9, 36.8, 43.2, 48.7, 52.8, 55.5, 58.1, 60.4, 61.8, 62.9, 63.7, 64.5, 65.5],
)
export const SET_D = logOf(23.0, 10, [23.0, 24.1, 25.4, 26.2, 27.6, 28.4, 29.7])

function nist(x: readonly number[], y: readonly number[]): HeatLog {
  const readings = x.map((atS, i) => ({ atS, temperatureC: y[i] ?? 0 }))
  return { ambientC: 0, readings, thermometerStepK: 0, start: 'ambient' }
}

/** NIST Statistical Reference Datasets, Misra1a. */
export const MISRA1A = nist(
  [77.6, 114.9, 141.1, 190.8, 239.9, 289.0, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760.0],
  [10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.4, 75.47, 81.78],
)

/** NIST Statistical Reference Datasets, BoxBOD. */
export const BOXBOD = nist([1, 2, 3, 5, 7, 10], [109, 149, 149, 191, 213, 224])
