import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { ChartTable } from '@/components/chart/chart-table.ts'
import { axisTicks, type AxisTick } from '@/components/chart/axis-tick.ts'
import { thinned, type Point } from '@/components/chart/paths.ts'
import { extentOf, linearScale } from '@/components/chart/scale.ts'
import { spread } from '@/components/chart/spread.ts'
import { swrScale, swrTicks } from '@/components/chart/swr-scale.ts'
import { ticksBetween } from '@/components/chart/ticks.ts'
import type { RoleTrace } from '@/composables/useTraces.ts'
import { quantityText } from '@/format/quantity.ts'
import { bandEdgesMHz } from './sweep-picture.ts'
import { swrText } from './sweep-words.ts'

/** The trade looks at this SWR; see `FIVE_MEANS`. */
export const RULE_OF_THUMB_SWR = 5

export const FIVE_MEANS =
  'SWR 5 is the trade’s line for the open trace. In a core, which lies across the winding, it means about 0.8 dB lost and not 1.8: half the return loss holds for an attenuator only. The efficiency by band is calculated from all three traces together and not read off this line.'

interface BandRow {
  readonly band: Band
  readonly frequencyHz: number
  readonly swr?: { readonly open: number | null; readonly short: number | null; readonly load: number | null }
}

const rowsOf = ({ results }: StoredTest) =>
  ((results.bands ?? []) as readonly BandRow[]).filter((row) => row.swr !== undefined)

/** What the three traces say at a look: whether the open one keeps above the trade's line on the bands judged. */
export function reflectionAnswer(test: StoredTest): string {
  const rows = rowsOf(test)
  const below = rows.filter(({ swr }) => (swr?.open ?? Infinity) < RULE_OF_THUMB_SWR).map(({ band }) => band)
  if (rows.length === 0) return 'SWR at the 50 ohm side with the secondary open, shorted and loaded.'
  return below.length === 0
    ? 'With the secondary open, the SWR stays above 5 on every band judged.'
    : `With the secondary open, the SWR falls below 5 on ${below.join(', ')}: the core takes more there.`
}

export function reflectionTable(test: StoredTest): ChartTable {
  const text = (swr: number | null | undefined) => swrText(swr ?? Infinity)
  return {
    columns: ['Band', 'At', 'SWR open', 'SWR shorted', 'SWR loaded'],
    rows: rowsOf(test).map(({ band, frequencyHz, swr }) => ({
      cells: [
        band,
        quantityText(frequencyHz / 1e6, 'MHz', 3),
        text(swr?.open),
        text(swr?.short),
        text(swr?.load),
      ],
    })),
  }
}

interface Place {
  readonly width: number
  readonly height: number
  readonly narrow: boolean
}

export interface ReflectionLayout {
  readonly left: number
  readonly right: number
  readonly top: number
  readonly foot: number
  readonly yTicks: readonly AxisTick[]
  readonly xTicks: readonly AxisTick[]
  readonly fiveY: number
  readonly zones: readonly {
    readonly band: Band
    readonly left: number
    readonly right: number
    readonly labelX: number
  }[]
  readonly lines: readonly {
    readonly role: RoleTrace['role']
    readonly points: readonly Point[]
    readonly labelY: number
  }[]
}

/** A zone narrower than this would not be seen, px. */
const LEAST_ZONE = 3

export function reflectionLayout(
  test: StoredTest,
  traces: readonly RoleTrace[],
  place: Place,
): ReflectionLayout {
  const [left, right] = [44, place.width - (place.narrow ? 76 : 62)]
  const [top, foot] = [40, place.height - 48]
  const y = swrScale(Infinity, foot, top)
  const span = extentOf(traces.flatMap(({ frequencyHz }) => [frequencyHz[0], frequencyHz.at(-1)])) ?? {
    low: 0,
    high: 1,
  }
  const x = linearScale(span, left, right)
  const lines = traces.map(({ role, frequencyHz, swr }) => ({
    role,
    points: thinned(Array.from(frequencyHz, (hz, at): Point => [x(hz), y(swr[at]!)])),
  }))
  const labels = spread(
    lines.map(({ points }) => points.at(-1)?.[1] ?? foot),
    18,
    top,
    foot,
  )
  return {
    left,
    right,
    top,
    foot,
    yTicks: swrTicks(Infinity, y, 20).map((swr) => ({
      at: y(swr),
      label: swr === Infinity ? 'all' : String(swr),
    })),
    xTicks: axisTicks(ticksBetween(span.low / 1e6, span.high / 1e6, place.narrow ? 4 : 8), (mhz) =>
      x(mhz * 1e6),
    ),
    fiveY: y(RULE_OF_THUMB_SWR),
    zones: zonesOf(test, { x, left, right }),
    lines: lines.map((line, index) => ({ ...line, labelY: labels[index] ?? foot })),
  }
}

function zonesOf(test: StoredTest, at: { x: (hz: number) => number; left: number; right: number }) {
  return rowsOf(test).flatMap(({ band }) => {
    const edges = bandEdgesMHz(band, test.judgedBy.bandRegion)
    if (!edges) return []
    const from = Math.max(at.left, at.x(edges.lowMHz * 1e6))
    const to = Math.min(at.right, Math.max(at.x(edges.highMHz * 1e6), from + LEAST_ZONE))
    return to > from ? [{ band, left: from, right: to, labelX: (from + to) / 2 }] : []
  })
}
