/**
 * Places for labels that want to stand at `wanted` but must keep `gap` px from each other within `low` to `high`: each
 * as near to its own as its neighbours allow, in the same order.
 */
export function spread(wanted: readonly number[], gap: number, low: number, high: number): number[] {
  const order = wanted.map((_, index) => index).sort((a, b) => wanted[a]! - wanted[b]! || a - b)
  const placed = order.map((index) => Math.min(Math.max(wanted[index]!, low), high))
  for (let i = 1; i < placed.length; i += 1) placed[i] = Math.max(placed[i]!, placed[i - 1]! + gap)
  for (let i = placed.length - 1; i >= 0; i -= 1)
    placed[i] = Math.min(placed[i]!, i === placed.length - 1 ? high : placed[i + 1]! - gap)
  const result: number[] = []
  order.forEach((index, place) => (result[index] = placed[place]!))
  return result
}
