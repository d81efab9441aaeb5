import type { AxisTick } from '@/components/chart/axis-tick.ts'
import { axisTicks } from '@/components/chart/axis-tick.ts'
import { extentOf, linearScale, type Scale } from '@/components/chart/scale.ts'
import { roundAxis } from '@/components/chart/ticks.ts'
import type { BandColumn, BandPicture } from './band-picture.ts'

export interface PlacedColumn extends BandColumn {
  readonly x: number
  readonly left: number
  readonly y: number
  readonly low: number
  readonly high: number
  readonly limitY: number | null
  readonly baseY: number | null
  /** The words stand over the value unless the limit runs there. */
  readonly labelY: number
  readonly labelBelow: boolean
}

export interface ColumnLayout {
  readonly left: number
  readonly right: number
  readonly top: number
  readonly foot: number
  readonly columnWidth: number
  readonly ticks: readonly AxisTick[]
  readonly columns: readonly PlacedColumn[]
  /** One limit for all bands, drawn across; null: each has its own. */
  readonly sharedLimitY: number | null
}

interface Place {
  readonly width: number
  readonly height: number
  readonly narrow: boolean
}

const WIDEST_COLUMN = 64
const WIDEST_SLOT = 150
const LABEL_HEIGHT = 24

/** Where the columns of a picture by band stand. Nothing is cut off: the axis begins at zero and holds every limit. */
export function columnLayout(picture: BandPicture, { width, height, narrow }: Place): ColumnLayout {
  const [left, top, foot] = [narrow ? 44 : 48, 34, height - (narrow ? 54 : 50)]
  const slot = Math.min(WIDEST_SLOT, (width - left) / Math.max(picture.columns.length, 1))
  const right = Math.min(width, left + slot * picture.columns.length)
  const axis = axisOf(picture)
  const scale = linearScale(axis, foot, top)
  const columnWidth = Math.min(WIDEST_COLUMN, slot * 0.62)
  return {
    left,
    right,
    top,
    foot,
    columnWidth,
    ticks: axisTicks(axis, scale),
    columns: picture.columns.map((column, index) =>
      place(column, left + slot * (index + 0.5), { columnWidth, scale }),
    ),
    sharedLimitY: sharedLimit(picture, scale),
  }
}

function axisOf({ columns, top }: BandPicture) {
  const extent = extentOf(
    columns.flatMap(({ value, uncertainty, limit, base }) => [value + (uncertainty ?? 0), limit, base]),
  )
  return roundAxis(0, top ?? (extent?.high ?? 1) * 1.05, 6)
}

function place(
  column: BandColumn,
  x: number,
  { columnWidth, scale }: { columnWidth: number; scale: Scale },
): PlacedColumn {
  const { value, uncertainty, limit, base } = column
  const spread = uncertainty ?? 0
  const y = scale(value)
  const [low, high] = [scale(Math.max(0, value - spread)), scale(value + spread)]
  const above = Math.min(high, y - 8)
  const lines = [limit, base].filter((line) => line !== null).map(scale)
  const labelBelow = lines.some((line) => line < above + 4 && line > above - LABEL_HEIGHT)
  return {
    ...column,
    x,
    left: x - columnWidth / 2,
    y,
    low,
    high,
    limitY: limit === null ? null : scale(limit),
    baseY: base === null ? null : scale(base),
    labelY: labelBelow ? Math.max(low, y + 8) : above,
    labelBelow,
  }
}

function sharedLimit({ columns }: BandPicture, scale: Scale): number | null {
  const limits = new Set(columns.map(({ limit }) => limit))
  const [only] = limits
  return limits.size === 1 && typeof only === 'number' ? scale(only) : null
}
