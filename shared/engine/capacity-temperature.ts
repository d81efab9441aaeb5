/**
 * How much of a battery's capacity at 25 deg C is there at another temperature.
 * Lead-acid: IEEE 485 Table 1 (existence and range confirmed; values from memory, verify). Lithium: common practice,
 * no standard; the pack's own data wins. Source: calculation sheet, section 10.
 */
import { failure, type Outcome } from './outcome.ts'
import type { Chemistry } from './vocabulary.ts'

/** Temperature in deg C and the factor by which a lead-acid battery must be larger. */
const LEAD_ACID: readonly (readonly [number, number])[] = [
  [-3.9, 1.52],
  [-1.1, 1.43],
  [1.7, 1.35],
  [4.4, 1.3],
  [7.2, 1.25],
  [10, 1.19],
  [12.8, 1.15],
  [15.6, 1.11],
  [18.3, 1.08],
  [21.1, 1.04],
  [25, 1],
]

/** Temperature in deg C and the fraction of the capacity that is there. */
const LITHIUM: readonly (readonly [number, number])[] = [
  [-20, 0.6],
  [-10, 0.8],
  [0, 0.9],
  [20, 1],
]

/** Fraction 0..1 of the capacity at 25 deg C; no bonus above. `E_RANGE` where no figure is known. */
export function capacityFactor(chemistry: Chemistry | undefined, temperatureC: number): Outcome<number> {
  if (chemistry === 'agm' || chemistry === 'gel' || chemistry === 'flooded') {
    const factor = interpolate(LEAD_ACID, temperatureC)
    return typeof factor === 'number' ? 1 / factor : factor
  }
  if (chemistry === 'lifepo4' || chemistry === 'lithium-ion') return interpolate(LITHIUM, temperatureC)
  return 1
}

function interpolate(table: readonly (readonly [number, number])[], temperatureC: number): Outcome<number> {
  const lowest = table[0]!
  const highest = table.at(-1)!
  if (temperatureC < lowest[0]) {
    const message = `${temperatureC} °C is too cold to say: test at ${lowest[0]} °C or warmer, best at 25 °C.`
    return failure('E_RANGE', message, { field: 'temperatureC' })
  }
  if (temperatureC >= highest[0]) return highest[1]
  const above = table.findIndex(([celsius]) => celsius > temperatureC)
  const [lowC, low] = table[above - 1]!
  const [highC, high] = table[above]!
  return low + ((high - low) * (temperatureC - lowC)) / (highC - lowC)
}
