import { checkNumber, type Outcome } from '../outcome.ts'

/** IEEE 485 Table 1 (existence and range confirmed; values from memory, verify): °C and the factor to divide by. */
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
/** Common practice, no standard; the pack's own data wins. */
const LITHIUM: readonly (readonly [number, number])[] = [
  [-20, 0.6],
  [-10, 0.8],
  [0, 0.9],
  [20, 1],
]

/** Capacity at a temperature as a fraction of that at 25 °C. Lead-acid from -3.9 °C, lithium from -20 °C. `E_RANGE`. */
export function temperatureFactor(chemistry: string, atC: number): Outcome<number> {
  const lithium = chemistry === 'lifepo4' || chemistry === 'lithium-ion'
  const table = lithium ? LITHIUM : LEAD_ACID
  const bad = checkNumber('temperature', atC, table[0]![0], 80)
  if (bad) return bad
  const value = interpolate(table, atC)
  return lithium ? value : 1 / value
}

function interpolate(table: readonly (readonly [number, number])[], x: number): number {
  const above = table.findIndex(([key]) => key >= x)
  if (above === -1) return table.at(-1)![1]
  const [x1, y1] = table[above]!
  if (above === 0 || x1 === x) return y1
  const [x0, y0] = table[above - 1]!
  return y0 + ((y1 - y0) * (x - x0)) / (x1 - x0)
}
