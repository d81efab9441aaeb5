/** One budget: what was measured, its floor, and the ratio that the budget is about. */
export interface BenchRow {
  readonly id: string
  readonly what: string
  readonly measured: string
  readonly floor: string
  readonly ratio: number | null
  readonly goal: string
}

/** Of the columns: the rows of each bench are printed as soon as they are there. */
const WIDTHS = [4, 38, 12, 12, 8, 0]

export function printHead(): void {
  printCells(['', '', 'measured', 'floor', 'ratio', 'goal'])
}

export function printRows(rows: readonly BenchRow[]): void {
  const cells = rows.map(({ id, what, measured, floor, ratio, goal }) => [
    id,
    what,
    measured,
    floor,
    ratio === null ? '' : `${ratio.toFixed(2)}x`,
    goal,
  ])
  cells.forEach(printCells)
}

function printCells(cells: readonly string[]): void {
  console.log(cells.map((cell, column) => cell.padEnd(WIDTHS[column]!)).join('  '))
}

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  return sorted[Math.floor(sorted.length / 2)] ?? NaN
}

export function percentile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b)
  return sorted[Math.min(sorted.length - 1, Math.floor(sorted.length * share))] ?? NaN
}
