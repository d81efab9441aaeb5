import { describe, expect, it } from 'vitest'
import { controlChart } from '#shared/engine/builds/control-chart.ts'
import { batchAnswer, batchChartLayout, batchTable, type ChartUnitFigure } from '@/format/batch-chart.ts'
import { measureWriter } from '@/format/build.ts'

describe('the picture of a control chart', () => {
  const units = (count: number): ChartUnitFigure[] =>
    Array.from({ length: count }, (_none, at) => ({
      unit: { id: `u${at}`, designation: `XFM-${at}` },
      figure: {
        band: '10 m',
        measure: 'lossDb',
        value: 0.6,
        uncertainty: null,
        finding: 'pass',
        testId: 't',
        performedOn: '2026-06-01',
        isInDoubt: false,
        run: null,
      },
    }))
  const given = (count: number) => {
    const drawn = units(count)
    const chart = controlChart({
      measure: 'lossDb',
      units: drawn.map(({ unit, figure }) => ({ unitId: unit.id, value: figure.value })),
      others: [],
      limit: 0.97,
    })
    const write = measureWriter('lossDb', { shown: (value) => value, unitOf: (unit) => unit })
    return { chart, units: drawn, write }
  }
  const layout = (count: number, narrow: boolean) =>
    batchChartLayout(given(count), { width: narrow ? 358 : 900, height: 340, narrow })

  it('writes names upright where they have no room beside each other', () => {
    expect(layout(5, false).upright).toBe(false)
    expect(layout(6, true).upright).toBe(true)
  })

  it('keeps every unit and every line inside the frame', () => {
    for (const narrow of [true, false]) {
      const at = layout(12, narrow)
      expect(at.x(0)).toBeGreaterThan(at.left)
      expect(at.x(11)).toBeLessThan(at.right)
      expect(at.y(0.97)).toBeGreaterThan(20)
      expect(at.y(0)).toBe(at.bottom)
      expect(at.lines.map(({ key }) => key).sort()).toEqual(['limit', 'median', 'upper'])
    }
  })

  it('answers in a sentence, and in a table with the lines under the units', () => {
    const input = given(5)
    expect(batchAnswer(input.chart)).toBe('All units are in line with their siblings and under the limit.')
    const { columns, rows } = batchTable(input)
    expect(columns[1]).toBe('dB')
    expect(rows[0]).toEqual({ cells: ['XFM-0', '0.60', '0.0', 'in line', 'Pass', '1 Jun 2026'], testId: 't' })
    expect(rows.slice(5).map(({ cells }) => cells.slice(0, 2))).toEqual([
      ['Median of the batch', '0.60'],
      ['Median of the siblings', '0.60'],
      ['Robust limits', '0.42 to 0.78'],
      ['Limit of the policy', '0.97'],
      ['Early warning from', '0.87'],
    ])
  })
})
