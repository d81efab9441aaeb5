/** Round numbers for an axis: steps of 1, 2, 2.5 or 5 times a power of ten, and the decimals that write them apart. */
export interface Ticks {
  readonly values: readonly number[]
  readonly digits: number
}

const STEPS = [1, 2, 2.5, 5, 10] as const

/** Every round number from `low` to `high`, at most `most` of them; of one value alone, that value. */
export function ticksBetween(low: number, high: number, most: number): Ticks {
  const span = high - low
  if (!(span > 0) || !Number.isFinite(span) || most < 2) return { values: [low], digits: 0 }
  return multiples(stepFor(span, most), low, high)
}

/** An axis that holds both ends and begins and ends on a round number. */
export function roundAxis(low: number, high: number, most: number): Ticks & { low: number; high: number } {
  const top = high > low ? high : low + 1
  let step = stepFor(top - low, most)
  // Rounded outwards, the steps may be one or two more than were asked for.
  while (Math.ceil(top / step - SLACK) - Math.floor(low / step + SLACK) + 1 > most) step = nextStep(step)
  const from = Math.floor(low / step + SLACK) * step
  const to = Math.ceil(top / step - SLACK) * step
  const ticks = multiples(step, from, to)
  return { ...ticks, low: ticks.values[0] ?? from, high: ticks.values.at(-1) ?? to }
}

/** What binary fractions may leave over: 0.6 / 0.2 is a little under 3. */
const SLACK = 1e-9

function stepFor(span: number, most: number): number {
  let step = 10 ** Math.floor(Math.log10(span / most))
  while (Math.floor(span / step + SLACK) + 1 > most) step = nextStep(step)
  return step
}

function nextStep(step: number): number {
  const power = 10 ** Math.floor(Math.log10(step) + SLACK)
  const next = STEPS.find((one) => one > step / power + SLACK) ?? 10
  return next * power
}

function multiples(step: number, low: number, high: number): Ticks {
  const digits = decimalsOf(step)
  const first = Math.ceil(low / step - SLACK)
  const last = Math.floor(high / step + SLACK)
  const values = Array.from({ length: last - first + 1 }, (_, count) =>
    // Adding 0 turns -0 into 0.
    Number(((first + count) * step + 0).toFixed(digits + 2)),
  )
  return { values, digits }
}

/** Decimals that write every multiple of a step: 0.25 needs two, 50 none. */
function decimalsOf(step: number): number {
  let digits = 0
  while (digits < 9 && Math.abs(step * 10 ** digits - Math.round(step * 10 ** digits)) > SLACK) digits += 1
  return digits
}
