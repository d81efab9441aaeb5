export type Point = readonly [x: number, y: number]

const at = ([x, y]: Point) => `${x.toFixed(1)} ${y.toFixed(1)}`

/** A polyline; empty for less than two points. */
export function linePath(points: readonly Point[]): string {
  return points.length < 2 ? '' : `M${points.map(at).join('L')}`
}

/** The area between an upper and a lower line over the same places. */
export function areaPath(upper: readonly Point[], lower: readonly Point[]): string {
  return upper.length < 2 ? '' : `M${[...upper, ...[...lower].reverse()].map(at).join('L')}Z`
}

/**
 * A long line with no more points than the picture can show: of each column of pixels the first, the lowest, the
 * highest and the last, so that no spike is lost. Points in order of x.
 */
export function thinned(points: readonly Point[]): Point[] {
  const kept: Point[] = []
  for (let from = 0; from < points.length;) {
    let to = from
    while (to < points.length && Math.floor(points[to]![0]) === Math.floor(points[from]![0])) to += 1
    kept.push(...extremes(points.slice(from, to)))
    from = to
  }
  return kept
}

function extremes(column: readonly Point[]): Point[] {
  if (column.length <= 4) return [...column]
  let [low, high] = [0, 0]
  column.forEach(([, y], index) => {
    if (y < column[low]![1]) low = index
    if (y > column[high]![1]) high = index
  })
  const places = [...new Set([0, low, high, column.length - 1])].sort((a, b) => a - b)
  return places.map((index) => column[index]!)
}
