import type { ChartTable } from '@/components/chart/chart-table.ts'
import { quantityText } from '@/format/quantity.ts'
import type { HeatPicture } from './heat-picture.ts'
import type { UnitText } from './heat-words.ts'

/** The readings with what the fitted curve says for the same times. */
export function heatTable({ inputs, limits, curve }: HeatPicture, text: UnitText): ChartTable {
  const { readings, keyUpAtS, ambientC } = inputs
  return {
    columns: [
      'Since key-down',
      'Key',
      'Read',
      'Above ambient',
      'Below the limit',
      ...(curve ? ['Fitted (95 %)'] : []),
    ],
    rows: readings.map(({ atS, temperatureC }) => ({
      cells: [
        quantityText(atS / 60, 'min', 2),
        atS <= keyUpAtS ? 'down' : 'up',
        text(temperatureC, '°C', 1),
        text(temperatureC - ambientC, 'K', 1),
        text(limits.maxC - temperatureC, 'K', 1),
        ...(curve ? [fittedAt(curve, atS <= keyUpAtS ? atS : null, text)] : []),
      ],
    })),
  }
}

function fittedAt(curve: NonNullable<HeatPicture['curve']>, atS: number | null, text: UnitText): string {
  if (atS === null) return ''
  const after = curve.findIndex((point) => point.atS >= atS)
  const [a, b] = [curve[Math.max(after - 1, 0)], curve[after]]
  if (!a || !b) return ''
  const part = b.atS === a.atS ? 0 : (atS - a.atS) / (b.atS - a.atS)
  const between = (name: 'bestC' | 'lowC' | 'highC') => a[name] + (b[name] - a[name]) * part
  return `${text(between('bestC'), '°C', 1)} (${text(between('lowC'), '°C', 1)} to ${text(between('highC'), '°C', 1)})`
}
