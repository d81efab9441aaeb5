/**
 * Unit conversions on finite numbers. The engine computes in deg C, K and m; people type deg F and ft.
 * These are straight lines, exact to the last bit a double holds; whoever takes the result checks its range.
 */

/** Exact by the international yard and pound agreement of 1959. */
export const METRES_PER_FOOT = 0.3048

/** Temperature, deg F to deg C. */
export function celsiusFromFahrenheit(temperatureF: number): number {
  return ((temperatureF - 32) * 5) / 9
}

/** Temperature, deg C to deg F. */
export function fahrenheitFromCelsius(temperatureC: number): number {
  return (temperatureC * 9) / 5 + 32
}

/** A difference or rise, deg F to K: no offset of 32. */
export function kelvinFromFahrenheitDifference(differenceF: number): number {
  return (differenceF * 5) / 9
}

/** A difference or rise, K to deg F: no offset of 32. */
export function fahrenheitDifferenceFromKelvin(differenceK: number): number {
  return (differenceK * 9) / 5
}

export function metresFromFeet(lengthFt: number): number {
  return lengthFt * METRES_PER_FOOT
}

export function feetFromMetres(lengthM: number): number {
  return lengthM / METRES_PER_FOOT
}
