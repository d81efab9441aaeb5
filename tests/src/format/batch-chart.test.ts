import { describe, expect, it } from 'vitest'
import { controlChart } from '#shared/engine/builds/control-chart.ts'
import { batchChartLayout, type ChartUnitFigure } from '@/format/batch-chart.ts'
import { measureWriter } from '@/format/build.ts'
import { apartLabels, axisFromZero } from '@/format/chart-scale.ts'

describe('an axis from zero', () => {
  it.each([
    [0.97, 1, 0.2],
    [1.37, 1.5, 0.5],
    [3, 4, 1],
    [0, 1.2, 0.2],
  ])('reaches past %s in round steps', (largest, top, step) => {
    const axis = axisFromZero(largest)
    expect(axis.top).toBeCloseTo(top, 9)
    expect(axis.ticks[1]).toBeCloseTo(step, 9)
  })
})

describe('labels beside a chart', () => {
  it('are moved up until each has its own room', () => {
    const moved = apartLabels([{ y: 100 }, { y: 110 }, { y: 40 }], { gap: 30, bottom: 200 })
    expect(moved.map(({ y, textY }) => [y, textY])).toEqual([
      [110, 110],
      [100, 80],
      [40, 40],
    ])
  })
})

describe('the layout of a control chart', () => {
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
  const layout = (count: number, narrow: boolean) => {
    const drawn = units(count)
    const chart = controlChart({
      measure: 'lossDb',
      units: drawn.map(({ unit, figure }) => ({ unitId: unit.id, value: figure.value })),
      others: [],
      limit: 0.97,
    })
    const write = measureWriter('lossDb', { shown: (value) => value, unitOf: (unit) => unit })
    return batchChartLayout({ chart, units: drawn, write, narrow })
  }

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
})
