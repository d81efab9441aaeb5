import { describe, expect, it } from 'vitest'
import { heatLayout } from '@/components/picture/heat-layout.ts'
import { heatPicture } from '@/components/picture/heat-picture.ts'
import { heatTable } from '@/components/picture/heat-table.ts'
import { heatAnswer, heatOutlook } from '@/components/picture/heat-words.ts'
import { quantityText } from '@/format/quantity.ts'
import type { HeatTestInputs } from '#shared/engine/procedures/heat-test.ts'
import { storedTest } from '../../../support/stored-test.ts'

const text = (value: number, unit: string, digits = 1) => quantityText(value, unit, digits)
const plain = (words: string) => words.replaceAll('\u00a0', ' ')

/** Warms with a time constant of 20 min by `riseK` in the end; read at the usual minutes. */
function run(riseK: number, fields: Partial<HeatTestInputs> & { at?: readonly number[] } = {}) {
  const { at = [0, 1, 2, 3, 5, 8, 10], ...more } = fields
  const warmed = (minute: number) => Number((22 + riseK * (1 - Math.exp(-minute / 20))).toFixed(1))
  const inputs: HeatTestInputs = {
    band: '10 m',
    powerW: 50,
    ambientC: 22,
    readings: at.map((minute) => ({ atS: minute * 60, temperatureC: warmed(minute) })),
    keyUpAtS: at.at(-1)! * 60,
    stoppedAtLimit: false,
    ...more,
  }
  return heatPicture(storedTest({ procedure: 'heat-test', inputs }))
}

describe('what a heat test says', () => {
  it('is how hot it got and what is left to the limit', () => {
    expect(plain(heatAnswer(run(100), text))).toBe(
      'It got to 61.3 °C in 10 min at 50 W on 10 m, 23.7 K below the limit of 85 °C.',
    )
  })

  it('counts what was read while keyed, as the judgement does, and draws what came after it', () => {
    const picture = run(100, { at: [0, 1, 2, 3, 5, 8, 10, 12], keyUpAtS: 600 })
    expect(picture.peakC).toBe(61.3)
    const hotter = picture.inputs.readings.with(-1, { atS: 720, temperatureC: 140 })
    const later = { ...picture, curve: null, inputs: { ...picture.inputs, readings: hotter } }
    const { marks } = heatLayout(later, { width: 358, height: 380, narrow: true }, (celsius) => celsius)
    expect(marks.at(-1)!.y).toBeGreaterThan(0)
  })

  it('is when it reached the limit, and for how long the rule asks', () => {
    const stopped = run(180, { at: [0, 1, 2, 3, 5, 8, 8.6], stoppedAtLimit: true })
    expect(plain(heatAnswer(stopped, text))).toBe(
      'It reached 85 °C after 8.6 min at 50 W on 10 m; the rule asks for 10 min below that.',
    )
  })

  it('is where it would settle, with the interval, and that this lies beyond the log', () => {
    const [outlook = '', beyond = ''] = heatOutlook(run(100), text)
    expect(plain(outlook)).toMatch(
      /^Keyed on without a break it would reach 85 °C after about 19\.\d min and settle near 12\d °C \(95 %: \d+ °C to \d+ °C\); time constant/,
    )
    expect(beyond).toContain('a direction, not a forecast')
  })

  it('is an honest "too short to say" where the log carries no curve', () => {
    const picture = run(60, { at: [0, 3, 6, 10] })
    expect(picture.curve).toBeNull()
    const [only = '', ...rest] = heatOutlook(picture, text)
    expect(only).toMatch(/^This log is too short to say where it would end: it has too few readings/)
    expect(plain(only)).toMatch(/the limit comes \d+(\.\d)? min after the last reading at the soonest\.$/)
    expect(rest).toEqual([])
  })

  it('is that nothing warmed, where nothing did', () => {
    expect(heatOutlook(run(0), text).join()).toContain('did not rise')
  })
})

describe('the drawing of a heat test', () => {
  const place = { width: 358, height: 380, narrow: true }
  const inside = (numbers: readonly number[]) => numbers.every((y) => y >= 0 && y <= place.height)

  it.each([
    ['a curve', run(100)],
    ['a stop at the limit', run(180, { at: [0, 1, 2, 3, 5, 8, 8.6], stoppedAtLimit: true })],
    ['no curve', run(60, { at: [0, 3, 6, 10] })],
    ['no warming', run(0)],
  ])('stays within the picture with %s', (_, picture) => {
    for (const shown of [(c: number) => c, (c: number) => c * 1.8 + 32]) {
      const at = heatLayout(picture, place, shown)
      expect(inside([at.limitY, ...at.marks.map(({ y }) => y)])).toBe(true)
      const { upper = [], lower = [], within = [], beyond = [] } = at.curve ?? {}
      expect(inside([...upper, ...lower, ...within, ...beyond].map(([, y]) => y))).toBe(true)
      expect(at.marks.every(({ x }) => x >= at.left && x <= at.right + 1e-6)).toBe(true)
    }
  })

  it('draws the curve whole while keyed and dashed beyond', () => {
    const at = heatLayout(run(100), place, (c) => c)
    expect(at.curve!.within.at(-1)![0]).toBeLessThanOrEqual(at.curve!.beyond[0]![0] + 1e-6)
    expect(at.curve!.beyond.length).toBeGreaterThan(3)
    expect(at.asked).toBeNull()
  })

  it('says in its table what was read and what was fitted at each time', () => {
    const table = heatTable(run(100), text)
    expect(table.columns).toContain('Fitted (95 %)')
    expect(plain(table.rows[6]!.cells.slice(0, 5).join(' | '))).toBe(
      '10 min | down | 61.3 °C | 39.3 K | 23.7 K',
    )
  })
})
