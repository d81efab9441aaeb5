/** Round steps for an axis that begins at 0 and reaches past the largest value: about `wanted` of them. */
export function axisFromZero(
  largest: number,
  wanted = 5,
): { readonly top: number; readonly ticks: readonly number[] } {
  const reach = largest > 0 ? largest : 1
  const rough = reach / wanted
  const power = 10 ** Math.floor(Math.log10(rough))
  const step = power * ([1, 2, 5, 10].find((one) => one * power >= rough) ?? 10)
  const count = Math.ceil((reach * 1.02) / step)
  return { top: count * step, ticks: Array.from({ length: count + 1 }, (_none, at) => at * step) }
}

/** Labels on one side of a chart moved apart, so that each has `gap` to itself; in the order of their places. */
export function apartLabels<Label extends { readonly y: number }>(
  labels: readonly Label[],
  { gap, bottom }: { gap: number; bottom: number },
): (Label & { readonly textY: number })[] {
  let next = bottom
  return labels
    .toSorted((a, b) => b.y - a.y)
    .map((label) => {
      const textY = Math.min(label.y, next)
      next = textY - gap
      return { ...label, textY }
    })
}
