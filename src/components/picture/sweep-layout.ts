import type { AxisTick } from '@/components/chart/axis-tick.ts'
import { extentOf, linearScale, padded, type Scale } from '@/components/chart/scale.ts'
import { highestSwr, swrScale, swrTicks } from '@/components/chart/swr-scale.ts'
import { linePath, thinned } from '@/components/chart/paths.ts'
import { numberText } from '@/format/quantity.ts'
import type { SwrTrace } from '#shared/engine/swr-trace.ts'
import type { FindingWord } from '#shared/engine/vocabulary.ts'
import { swrText } from './sweep-words.ts'
import type { SweepPanel, SweepPicture, SweepPoint } from './sweep-picture.ts'

interface Mark {
  readonly x: number
  readonly y: number
  readonly said: string
}

export interface PlacedPanel {
  readonly band: SweepPanel['band']
  readonly left: number
  readonly right: number
  readonly top: number
  readonly foot: number
  /** The amateur band. */
  readonly zone: { readonly left: number; readonly right: number } | null
  readonly ticks: readonly AxisTick[]
  readonly yTicks: readonly AxisTick[]
  readonly startsRow: boolean
  readonly limitY: number | null
  readonly points: readonly (Mark & {
    kind: FindingWord | 'reading'
    low: number
    high: number
    label: string
  })[]
  readonly before: readonly Mark[]
  /** The whole sweep of a file, as far as it runs through the panel; empty without one. */
  readonly trace: string
  /** Where it resonates, now and at first, on the foot. */
  readonly resonance: { readonly now: number; readonly before: number | null } | null
}

const ROW_HEIGHT = 250
const AXIS = 44
const GAP = 10

export const panelsInRow = (count: number, narrow: boolean) =>
  narrow ? Math.min(2, count) : Math.min(5, count)

export function sweepHeight(count: number, narrow: boolean): number {
  return Math.ceil(count / Math.max(1, panelsInRow(count, narrow))) * ROW_HEIGHT
}

/** Every band in a panel of its own, since a scale over all of them would shrink each to a dot. */
export function sweepLayout(
  picture: SweepPicture,
  place: { width: number; narrow: boolean },
  trace: SwrTrace | null = null,
): PlacedPanel[] {
  const { panels, limit } = picture
  const inRow = panelsInRow(panels.length, place.narrow)
  const width = Math.min(220, (place.width - AXIS) / inRow)
  const values = panels.flatMap(({ points, before }) => [...points, ...before.points].map(({ swr }) => swr))
  const highest = highestSwr([...values, limit ?? 1])
  return panels.map((panel, index) => {
    const [column, row] = [index % inRow, Math.floor(index / inRow)]
    const left = AXIS + column * width
    const [top, foot] = [row * ROW_HEIGHT + 42, (row + 1) * ROW_HEIGHT - 40]
    const y = swrScale(highest, foot, top)
    const box = { left, right: left + width - GAP, top, foot, startsRow: column === 0 }
    return { ...box, ...placed(panel, { ...box, y, highest, limit, trace }) }
  })
}

interface Box {
  readonly left: number
  readonly right: number
  readonly y: Scale
  readonly highest: number
  readonly limit: number | null
  readonly trace: SwrTrace | null
}

function placed(panel: SweepPanel, { left, right, y, highest, limit, trace }: Box) {
  const { band, edges, points, before, resonanceMHz, worst } = panel
  const span = frequencySpan(panel)
  const x = linearScale(span, left, right)
  const mark = ({ frequencyMHz, swr }: SweepPoint): Mark => ({
    x: x(frequencyMHz),
    y: y(swr),
    said: `SWR ${swrText(swr)} at ${numberText(frequencyMHz, 3)} MHz`,
  })
  return {
    band,
    zone: edges && { left: x(edges.lowMHz), right: x(edges.highMHz) },
    ticks: edges
      ? [edges.lowMHz, edges.highMHz].map((mhz) => ({ at: x(mhz), label: numberText(mhz, 3) }))
      : [],
    yTicks: swrTicks(highest, y, 22).map((swr) => ({
      at: y(swr),
      label: swr === Infinity ? 'all' : numberText(swr, 1),
    })),
    limitY: limit === null ? null : y(limit),
    points: points.map((point) => {
      const isWorst = point.frequencyMHz === worst.frequencyMHz
      const spread = (isWorst ? worst.uncertainty : null) ?? 0
      return {
        ...mark(point),
        kind: isWorst ? worst.finding : ('reading' as const),
        low: y(Math.max(1, point.swr - spread)),
        high: y(point.swr + spread),
        label: isWorst && point.swr < Infinity ? swrText(point.swr) : '',
      }
    }),
    before: before.points.map(mark),
    trace: trace ? tracePath(trace, { span, x, y }) : '',
    resonance:
      resonanceMHz === null
        ? null
        : { now: x(resonanceMHz), before: before.resonanceMHz === null ? null : x(before.resonanceMHz) },
  }
}

function tracePath(
  { frequencyHz, swr }: SwrTrace,
  { span, x, y }: { span: { low: number; high: number }; x: Scale; y: Scale },
): string {
  const points: [number, number][] = []
  for (const [at, hz] of frequencyHz.entries()) {
    const frequencyMHz = hz / 1e6
    if (frequencyMHz >= span.low && frequencyMHz <= span.high) points.push([x(frequencyMHz), y(swr[at]!)])
  }
  return linePath(thinned(points))
}

/** The whole band with a margin, and whatever was read outside it. */
function frequencySpan({ edges, points, before, resonanceMHz }: SweepPanel) {
  const band = edges && padded({ low: edges.lowMHz, high: edges.highMHz }, 0.18)
  const read = extentOf([...points, ...before.points].map(({ frequencyMHz }) => frequencyMHz))
  const dips = extentOf([resonanceMHz, before.resonanceMHz])
  const outside = [read, dips].flatMap((range) => (range ? [padded(range, 0.1)] : []))
  const all = extentOf([...(band ? [band] : []), ...outside].flatMap(({ low, high }) => [low, high]))
  return all && all.high > all.low ? all : padded(all ?? { low: 0, high: 1 }, 0, (all?.low ?? 1) * 0.02)
}
