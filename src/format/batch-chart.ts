import type { BuildFiguresAnswer } from '#shared/contracts/build-figures.ts'
import type { ControlChart, PointState } from '#shared/engine/builds/control-chart.ts'
import { MAX_SCORE } from '#shared/engine/robust-z.ts'
import { axisTicks } from '@/components/chart/axis-tick.ts'
import type { ChartRow, ChartTable } from '@/components/chart/chart-table.ts'
import { linearScale } from '@/components/chart/scale.ts'
import { spread } from '@/components/chart/spread.ts'
import { roundAxis } from '@/components/chart/ticks.ts'
import { counted, FINDING_WORDS } from '@/words.ts'
import type { MeasureWriter } from './build.ts'
import { dayText } from './day.ts'
import { numberText } from './quantity.ts'

/** A unit of the chart with the figure that is drawn. */
export interface ChartUnitFigure {
  readonly unit: { readonly id: string; readonly designation: string }
  readonly figure: BuildFiguresAnswer['units'][number]['figures'][number]
}

interface ChartInput {
  readonly chart: ControlChart
  readonly units: readonly ChartUnitFigure[]
  readonly write: MeasureWriter
}

interface Place {
  readonly width: number
  readonly height: number
  readonly narrow: boolean
}

/** A name written flat takes this much room. */
const NAME_WIDTH = 66
const LABEL_GAP = 34

/** Where everything of a control chart stands, px. Every measure begins at 0. */
export function batchChartLayout({ chart, units, write }: ChartInput, { width, height, narrow }: Place) {
  const [left, top] = [52, 34]
  const right = width - (narrow ? 92 : 130)
  /** Names beside each other need room; where there is none they stand upright. */
  const upright = (right - left) / units.length < NAME_WIDTH
  const bottom = height - (upright ? 72 : 34)
  const { limit, lines } = chart
  const reach = units.map(({ figure }) => figure.value + (figure.uncertainty ?? 0))
  const axis = roundAxis(0, write.value(Math.max(limit ?? 0, lines?.upper ?? 0, ...reach)), narrow ? 6 : 8)
  const scale = linearScale(axis, bottom, top)
  const y = (stored: number) => scale(write.value(stored))
  const drawn = linesOf(chart).map((line) => ({ ...line, y: y(line.stored) }))
  const textYs = spread(
    drawn.map((line) => line.y),
    LABEL_GAP,
    top,
    bottom + 4,
  )
  return {
    left,
    right,
    bottom,
    upright,
    ticks: axisTicks(axis, scale),
    x: (at: number) => left + ((at + 0.5) / units.length) * (right - left),
    y,
    lines: drawn.map((line, index) => ({ ...line, textY: textYs[index]! })),
  }
}

function linesOf({ limit, lines, batchMedian }: ControlChart) {
  const own = lines?.from === 'build-sheet' && batchMedian !== null
  return [
    ...(limit === null ? [] : [{ key: 'limit', text: 'limit', stored: limit }]),
    ...(lines ? [{ key: 'median', text: 'median', stored: lines.median }] : []),
    ...(lines ? [{ key: 'upper', text: 'robust limit', stored: lines.upper }] : []),
    ...(own ? [{ key: 'batch', text: 'of the batch', stored: batchMedian }] : []),
  ]
}

export const isApart = (score: number | null | undefined) => Math.abs(score ?? 0) > MAX_SCORE

/** What the chart answers: how many are over the limit, how many stand apart, or that all are in line. */
export function batchAnswer({ points, lines, limit }: ControlChart): string {
  const over = points.filter(({ state }) => state === 'over-limit').length
  const apart = points.filter(({ state }) => state === 'departs').length
  const all = counted(points.length, 'unit')
  if (over > 0) return `${over} of ${all} ${over === 1 ? 'is' : 'are'} over the limit.`
  if (apart > 0) return `${apart} of ${all} ${apart === 1 ? 'stands' : 'stand'} apart from the others.`
  if (lines)
    return `All units are in line with their siblings${limit === null ? '' : ' and under the limit'}.`
  return limit === null ? `${all} measured.` : 'All units are under the limit.'
}

const STATES: Readonly<Record<PointState, string>> = {
  'in-line': 'in line',
  'near-limit': 'near the limit',
  departs: 'departs',
  'over-limit': 'over the limit',
}

/** The numbers of the chart: each unit, then the lines that it is held against. */
export function batchTable({ chart, units, write }: ChartInput): ChartTable {
  const rows = units.map(({ unit, figure }, at): ChartRow => {
    const { value, uncertainty, finding, isInDoubt, performedOn, testId } = figure
    const point = chart.points[at]
    const about = uncertainty === null ? '' : ` ± ${write.number(uncertainty)}`
    const score = point?.score == null ? '' : numberText(point.score, 1, true)
    const found = `${FINDING_WORDS[finding]}${isInDoubt ? ', in doubt' : ''}`
    const stands = STATES[point?.state ?? 'in-line']
    const cells = [
      unit.designation,
      `${write.number(value)}${about}`,
      score,
      stands,
      found,
      dayText(performedOn),
    ]
    return { cells, testId }
  })
  const heading = write.unit === '' ? 'SWR' : write.unit
  return {
    columns: ['Unit', heading, 'Deviations from the median', 'Stands', 'Finding', 'Tested'],
    rows: [...rows, ...lineRows(chart, write)],
  }
}

function lineRows({ batchMedian, lines, limit, warnFrom }: ControlChart, write: MeasureWriter): ChartRow[] {
  const row = (name: string, text: string): ChartRow => ({ cells: [name, text, '', '', '', ''] })
  return [
    ...(batchMedian === null ? [] : [row('Median of the batch', write.number(batchMedian))]),
    ...(lines ? [row('Median of the siblings', write.number(lines.median))] : []),
    ...(lines ? [row('Robust limits', `${write.number(lines.lower)} to ${write.number(lines.upper)}`)] : []),
    ...(limit === null ? [] : [row('Limit of the policy', write.number(limit))]),
    ...(warnFrom === null ? [] : [row('Early warning from', write.number(warnFrom))]),
  ]
}
