/** The scenario's seed. */
const SEED = 20_261_031

/** FNV-1a, 32 bits: spreads names over the streams. */
function hashOf(name: string): number {
  let hash = 0x811c9dc5
  for (const char of name) hash = Math.imul(hash ^ (char.codePointAt(0) ?? 0), 0x01000193)
  return hash >>> 0
}

/**
 * Numbers from 0 up to 1, the same for the same name every time. Each name has a stream of its own, so that a record
 * added to the demo leaves all others as they were. Generator: mulberry32, public domain.
 */
export function randomOf(name: string): () => number {
  let state = (hashOf(name) ^ SEED) >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296
  }
}

/** One value between `middle - reach` and `middle + reach`, rounded to so many digits. */
export function noisy(
  name: string,
  middle: number,
  { reach, digits }: { reach: number; digits: number },
): number {
  return rounded(middle + (randomOf(name)() * 2 - 1) * reach, digits)
}

export function rounded(value: number, digits: number): number {
  return Number(value.toFixed(digits))
}
