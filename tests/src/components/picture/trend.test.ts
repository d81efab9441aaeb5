import { describe, expect, it } from 'vitest'
import type { ItemResult } from '#shared/contracts/item-results.ts'
import { trendLayout, trendHeight } from '@/components/picture/trend-layout.ts'
import { dueOf, trendsOf } from '@/components/picture/trend.ts'
import { quantityText } from '@/format/quantity.ts'

const text = (value: number, unit: string, digits = 1) => quantityText(value, unit, digits)
const plain = (words: string) => words.replaceAll('\u00a0', ' ')

type Finding = ItemResult['findings'][number]
const finding = (fields: Partial<Finding>): Finding => ({
  band: null,
  finding: 'pass',
  measure: 'capacityFraction',
  value: null,
  uncertainty: null,
  powerW: null,
  positionId: null,
  limit: '',
  text: '',
  ...fields,
})

function result(on: string, fields: Partial<ItemResult> = {}): ItemResult {
  return {
    testId: on,
    procedure: 'battery-capacity',
    performedAt: `${on}T12:00:00.000Z`,
    performedOn: on,
    finding: 'pass',
    findings: [],
    figures: [],
    setsBaseline: false,
    instrument: null,
    limits: null,
    intervalMonths: 12,
    supersededBy: null,
    ...fields,
  }
}

const capacity = (on: string, value: number, more: Partial<ItemResult> = {}) =>
  result(on, { findings: [finding({ value, finding: value < 0.8 ? 'fail' : 'pass' })], ...more })

const line = (on: string, lossDb: number, swr: number, baselineDb?: number) =>
  result(on, {
    procedure: 'feedline-loss',
    findings: [
      finding({ band: '2 m', measure: 'lossDb', value: lossDb, finding: lossDb > 2.2 ? 'fail' : 'pass' }),
    ],
    figures: [
      { band: '2 m', measure: 'swrAtRadio', value: swr, frequencyMHz: null },
      ...(baselineDb === undefined
        ? []
        : [{ band: '2 m' as const, measure: 'baselineDb', value: baselineDb, frequencyMHz: null }]),
    ],
  })

const FADING = [capacity('2025-09-12', 0.88), capacity('2026-03-14', 0.84), capacity('2026-09-12', 0.79)]

describe('the history of an item', () => {
  it('says where a fading battery stood at first, where it stands and that it fails', () => {
    const [trend] = trendsOf(FADING, text)
    expect(plain(trend!.answer)).toBe(
      'Capacity: 88 % on 12 Sep 2025, 79 % on 12 Sep 2026; at least 80 % is asked: it fails.',
    )
    expect(trend!.table.rows.map(({ cells }) => plain(cells.join(' | ')))[0]).toBe(
      '12 Sep 2026 |  | Capacity | 79 % | 80 % at least | Fail',
    )
    expect(trend!.table.rows[0]!.testId).toBe('2026-09-12')
  })

  it('notices that a line hides its loss behind a better SWR', () => {
    const [trend] = trendsOf(
      [line('2025-10-11', 1.4, 1.52), line('2026-06-13', 2.2, 1.42, 1.4), line('2026-09-12', 3.1, 1.33, 1.4)],
      text,
    )
    expect(plain(trend!.answer)).toContain(
      'grew from 1.4 dB to 3.1 dB while the SWR at the radio fell from 1.52 to 1.33',
    )
    expect(trend!.series.map(({ word, not }) => [word, not])).toEqual([
      ['Loss', 'above'],
      ['SWR at the radio', null],
    ])
  })

  it('says one month of tests that lie close together', () => {
    const tests = [line('2026-08-29', 1.4, 1.52), line('2026-09-12', 3.1, 1.33, 1.4)]
    expect(trendsOf(tests, text)[0]!.answer).toMatch(/^In 1 month the loss on 2 m grew/)
  })

  it('leaves a corrected test out of what it says and draws it crossed', () => {
    const wrong = capacity('2026-09-01', 0.31, { supersededBy: { testId: 'x', reason: 'Wrong battery' } })
    const [trend] = trendsOf([FADING[0]!, wrong, FADING[2]!], text)
    expect(trend!.answer).not.toContain('31')
    expect(trend!.more.join()).toContain('1 test was corrected')
    expect(trend!.table.rows.map(({ cells }) => cells.at(-1))).toContain('Corrected: Wrong battery')
    const at = trendLayout(
      trend!.series,
      { width: 358, narrow: true, today: '2026-10-31' },
      { shown: (v) => v, unitOf: (u) => u },
    )
    expect(at.panels[0]!.marks.map(({ kind }) => kind)).toEqual(['pass', 'replaced', 'fail'])
    expect(at.panels[0]!.line).toHaveLength(2)
  })

  it('shows heat as rise above the ambient of its day, each power for itself', () => {
    const heat = (on: string, peakC: number, ambientC: number, powerW: number) =>
      result(on, {
        procedure: 'heat-test',
        findings: [finding({ band: '10 m', measure: 'peakC', value: peakC, powerW })],
        figures: [{ band: '10 m', measure: 'ambientC', value: ambientC, frequencyMHz: null }],
      })
    const [trend] = trendsOf(
      [heat('2025-10-01', 60, 20, 50), heat('2026-10-01', 70, 30, 50), heat('2026-10-01', 45, 30, 20)],
      text,
    )
    expect(trend!.series.map(({ word, points }) => [word, points.map(({ value }) => value)])).toEqual([
      ['Rise at 50 W', [40, 40]],
      ['Rise at 20 W', [15]],
    ])
    expect(plain(trend!.answer)).not.toContain('is asked')
  })

  it('is nothing where nothing was measured', () => {
    expect(trendsOf([], text)).toEqual([])
    expect(trendsOf([result('2026-01-01', { procedure: 'inspection' })], text)).toEqual([])
  })
})

describe('the day a figure falls due', () => {
  it('is counted from the newest test that counts', () => {
    const [trend] = trendsOf([capacity('2025-09-12', 0.9), capacity('2026-03-14', 0.88)], text)
    expect(dueOf(trend!.series[0]!)).toBe('2027-03-14')
  })

  it('is none after a failed test', () => {
    expect(dueOf(trendsOf(FADING, text)[0]!.series[0]!)).toBeNull()
  })
})

describe('the drawing of a history', () => {
  it('stays within its panels on a phone, today and the due day included', () => {
    const [trend] = trendsOf([line('2021-10-11', 1.4, 1.52), line('2026-06-13', 2.1, 1.42, 1.4)], text)
    const at = trendLayout(
      trend!.series,
      { width: 358, narrow: true, today: '2026-10-31' },
      { shown: (v) => v, unitOf: (u) => u },
    )
    expect(at.foot).toBeLessThan(trendHeight(2, true))
    for (const { marks, top, foot, limits, due } of at.panels) {
      for (const { x, y } of marks) {
        expect(x).toBeGreaterThan(at.left)
        expect(x).toBeLessThan(at.right)
        expect(y).toBeGreaterThanOrEqual(top)
        expect(y).toBeLessThanOrEqual(foot)
      }
      for (const { from, to } of limits) expect(from).toBeLessThan(to)
      if (due) expect(due.x).toBeLessThanOrEqual(at.right)
    }
    expect(at.today).toBeLessThan(at.right)
    expect(at.xTicks.length).toBeLessThanOrEqual(4)
  })
})
