import type { BuildFiguresAnswer } from '#shared/contracts/build-figures.ts'
import type { ControlChart } from '#shared/engine/builds/control-chart.ts'
import type { MeasureWriter } from './build.ts'
import { apartLabels, axisFromZero } from './chart-scale.ts'

/** A unit of the chart with the figure that is drawn. */
export interface ChartUnitFigure {
  readonly unit: { readonly id: string; readonly designation: string }
  readonly figure: BuildFiguresAnswer['units'][number]['figures'][number]
}

interface ChartInput {
  readonly chart: ControlChart
  readonly units: readonly ChartUnitFigure[]
  readonly write: MeasureWriter
  readonly narrow: boolean
}

/** A name written flat takes this much room. */
const NAME_WIDTH = 58
const LABEL_GAP = 30

/** Where everything of a control chart stands, in the units of its view box. */
export function batchChartLayout({ chart, units, write, narrow }: ChartInput) {
  const [width, left, top] = [narrow ? 360 : 860, 44, 26]
  const right = width - (narrow ? 94 : 120)
  /** Names beside each other need room; where there is none they stand upright. */
  const upright = (right - left) / units.length < NAME_WIDTH
  const height = upright ? 370 : 330
  const bottom = height - (upright ? 88 : 50)
  const { limit, lines } = chart
  const reach = units.map(({ figure }) => figure.value + (figure.uncertainty ?? 0))
  const axis = axisFromZero(write.value(Math.max(limit ?? 0, lines?.upper ?? 0, ...reach)))
  const scaled = (value: number) => bottom - (value / axis.top) * (bottom - top)
  const y = (stored: number) => scaled(write.value(stored))
  const placed = linesOf(chart).map((label) => ({ ...label, y: y(label.stored) }))
  return {
    width,
    height,
    left,
    right,
    bottom,
    upright,
    ticks: axis.ticks.map((tick) => ({ text: String(Number(tick.toPrecision(6))), y: scaled(tick) })),
    x: (at: number) => left + ((at + 0.5) / units.length) * (right - left),
    y,
    lines: apartLabels(placed, { gap: LABEL_GAP, bottom: bottom + 4 }),
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
