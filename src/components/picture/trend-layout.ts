import { addDays, daysBetween, type PlainDate } from '#shared/engine/plain-date.ts'
import type { FindingWord } from '#shared/engine/vocabulary.ts'
import { axisTicks, type AxisTick } from '@/components/chart/axis-tick.ts'
import { dayScale, dayTicks } from '@/components/chart/day-axis.ts'
import type { Point } from '@/components/chart/paths.ts'
import { extentOf, linearScale, padded } from '@/components/chart/scale.ts'
import { roundAxis } from '@/components/chart/ticks.ts'
import { dayText, shortDayText } from '@/format/day.ts'
import { numberText } from '@/format/quantity.ts'
import { counting, dueOf } from './trend.ts'
import type { TrendPoint, TrendSeries } from './trend-series.ts'

interface Place {
  readonly width: number
  readonly narrow: boolean
}

export interface TrendPanel {
  readonly name: string
  readonly nameY: number
  readonly unit: string
  readonly top: number
  readonly foot: number
  readonly yTicks: readonly AxisTick[]
  readonly line: readonly Point[]
  /** The limit of each test holds from that test to the next. */
  readonly limits: readonly { readonly from: number; readonly to: number; readonly y: number }[]
  readonly not: 'above' | 'below'
  readonly marks: readonly {
    readonly x: number
    readonly y: number
    readonly low: number
    readonly high: number
    readonly kind: FindingWord | 'reading' | 'replaced'
    readonly said: string
  }[]
  readonly last: {
    readonly x: number
    readonly y: number
    readonly label: string
    readonly before: boolean
  } | null
  readonly due: { readonly x: number; readonly label: string; readonly before: boolean } | null
}

export interface TrendLayout {
  readonly left: number
  readonly right: number
  readonly xTicks: readonly AxisTick[]
  readonly foot: number
  readonly today: number | null
  readonly panels: readonly TrendPanel[]
}

const PLOT_HEIGHT = 84
/** Between a plot and the name of the next. */
const GAP = 10
const FOOT_HEIGHT = 40
/** Over a plot: its name, and on a phone the words of its due day under that. */
const headOf = (narrow: boolean) => (narrow ? 54 : 34)
const panelHeight = (narrow: boolean) => headOf(narrow) + PLOT_HEIGHT + GAP
const AXIS = 52
const MARGIN = 12
const WORDS = 120

export const trendHeight = (panels: number, narrow: boolean) => panels * panelHeight(narrow) + FOOT_HEIGHT

interface Convert {
  /** Differences of temperature in the member's degrees; everything else as it is. */
  readonly shown: (value: number, unit: string) => number
  readonly unitOf: (unit: string) => string
}

/** One panel a figure, one above the other over the same years. */
export function trendLayout(
  series: readonly TrendSeries[],
  { width, narrow, today }: Place & { today: PlainDate },
  convert: Convert,
): TrendLayout {
  const [from, to] = spanOf(series, today)
  const [left, right] = [AXIS, width - MARGIN]
  const x = dayScale(from, to, left, right)
  return {
    left,
    right,
    foot: series.length * panelHeight(narrow),
    xTicks: dayTicks(from, to, narrow ? 4 : 8).map(({ day, label }) => ({ at: x(day), label })),
    today: today <= to && today >= from ? x(today) : null,
    panels: series.map((one, index) => panelOf(one, { ...rowOf(index, narrow), left, right, x, convert })),
  }
}

function rowOf(index: number, narrow: boolean) {
  const start = index * panelHeight(narrow)
  return { top: start + headOf(narrow), nameY: start + 20 }
}

/** From the first test to the last due day, today included, with a little room. */
function spanOf(series: readonly TrendSeries[], today: PlainDate): [PlainDate, PlainDate] {
  const days = [...series.flatMap(({ points }) => points.map(({ on }) => on)), today]
  const dues = series.flatMap((one) => dueOf(one) ?? [])
  const first = days.reduce((a, b) => (b < a ? b : a))
  const last = [...days, ...dues].reduce((a, b) => (b > a ? b : a))
  const room = Math.max(7, Math.round(daysBetween(first, last) * 0.04))
  return [addDays(first, -room), addDays(last, room)]
}

interface Box {
  readonly top: number
  readonly nameY: number
  readonly left: number
  readonly right: number
  readonly x: (day: PlainDate) => number
  readonly convert: Convert
}

function panelOf(series: TrendSeries, { top, nameY, left, right, x, convert }: Box): TrendPanel {
  const foot = top + PLOT_HEIGHT
  const shown = (value: number) => convert.shown(value, series.unit)
  const axis = axisOf(series, shown)
  const scale = linearScale(axis, foot, top)
  const y = (value: number) => scale(shown(value))
  const counted = counting(series)
  const last = counted.at(-1)
  const due = dueOf(series)
  const text = (value: number) => numberText(shown(value), series.digits)
  return {
    name: series.band === null ? series.word : `${series.band}: ${series.word}`,
    nameY,
    unit: convert.unitOf(series.unit),
    top,
    foot,
    yTicks: axisTicks(axis, scale),
    line: counted.map(({ on, value }) => [x(on), y(value)]),
    limits: limitsOf(counted, { x, y, right: due ? x(due) : right, left }),
    not: series.not ?? 'above',
    marks: series.points.map((point) => ({
      x: x(point.on),
      y: y(point.value),
      low: y(point.value - (point.uncertainty ?? 0)),
      high: y(point.value + (point.uncertainty ?? 0)),
      kind: point.replaced === null ? (point.finding ?? 'reading') : 'replaced',
      said: `${dayText(point.on)}: ${text(point.value)} ${convert.unitOf(series.unit)}`.trim(),
    })),
    last: last
      ? { x: x(last.on), y: y(last.value), label: text(last.value), before: x(last.on) > right - 60 }
      : null,
    due: due ? { x: x(due), label: `due ${shortDayText(due)}`, before: x(due) > right - WORDS } : null,
  }
}

function axisOf({ points }: TrendSeries, shown: (value: number) => number) {
  const values = points.flatMap(({ value, uncertainty, limit }) => [
    value - (uncertainty ?? 0),
    value + (uncertainty ?? 0),
    limit,
  ])
  const extent = extentOf(values.map((value) => (value === null ? null : shown(value)))) ?? {
    low: 0,
    high: 1,
  }
  const { low, high } = padded(extent, 0.12, Math.abs(extent.high) * 0.01)
  return roundAxis(extent.low >= 0 ? Math.max(0, low) : low, high, 4)
}

interface Lines {
  readonly x: (day: PlainDate) => number
  readonly y: (value: number) => number
  readonly left: number
  readonly right: number
}

function limitsOf(points: readonly TrendPoint[], { x, y, left, right }: Lines): TrendPanel['limits'] {
  return points.flatMap(({ on, limit }, index) => {
    if (limit === null) return []
    const next = points[index + 1]
    return [{ from: index === 0 ? left : x(on), to: next ? x(next.on) : right, y: y(limit) }]
  })
}
