import { describe, expect, it } from 'vitest'
import type { ItemResult } from '#shared/contracts/item-results.ts'
import type { AntennaSweepInputs } from '#shared/engine/procedures/antenna-sweep.ts'
import {
  capacityAnswer,
  capacityNotes,
  capacityPicture,
  capacityTable,
} from '@/components/picture/capacity-picture.ts'
import { sweepHeight, sweepLayout } from '@/components/picture/sweep-layout.ts'
import { sweepPicture } from '@/components/picture/sweep-picture.ts'
import { sweepAnswer, sweepDrift, sweepTable } from '@/components/picture/sweep-words.ts'
import { quantityText } from '@/format/quantity.ts'
import { storedTest } from '../../../support/stored-test.ts'

const text = (value: number, unit: string, digits = 1) => quantityText(value, unit, digits)
const plain = (words: string) => words.replaceAll('\u00a0', ' ')

const INPUTS: AntennaSweepInputs = {
  points: [
    { band: '40 m', frequencyMHz: 7.2, swr: 3 },
    { band: '20 m', frequencyMHz: 14.2, swr: 1.5 },
  ],
  resonances: [{ band: '40 m', frequencyMHz: 6.968 }],
}

const before = (fields: Partial<ItemResult> = {}): ItemResult => ({
  testId: '019a0000-0000-7000-8000-00000000000a',
  procedure: 'antenna-sweep',
  performedAt: '2025-10-11T17:00:00.000Z',
  performedOn: '2025-10-11',
  finding: 'pass',
  findings: [],
  figures: [
    { band: '40 m', measure: 'swr', value: 1.3, frequencyMHz: 7.2 },
    { band: '40 m', measure: 'resonanceMHz', value: 7.15, frequencyMHz: 7.15 },
  ],
  setsBaseline: false,
  instrument: null,
  limits: null,
  intervalMonths: null,
  supersededBy: null,
  ...fields,
})

const sweep = (history: ItemResult[]) =>
  sweepPicture(storedTest({ procedure: 'antenna-sweep', inputs: INPUTS }), history)

describe('the picture of an antenna sweep', () => {
  it('names the band that fails, and how far it has drifted since the first sweep', () => {
    const picture = sweep([before()])
    expect(plain(sweepAnswer(picture))).toBe(
      '40 m fails: SWR 3 at 7.2 MHz where at most 2.5 is allowed. 20 m passes.',
    )
    expect(plain(sweepDrift(picture).join())).toBe(
      'Since the baseline of 11 Oct 2025 the resonance on 40 m went down by 182 kHz, from 7.15 MHz to 6.968 MHz.',
    )
    expect(plain(sweepTable(picture).rows[0]!.cells.join(' | '))).toBe(
      '40 m | 7.2 MHz | 3 | 2.5 at most | Fail | 1.3',
    )
  })

  it('takes neither a corrected sweep nor a later one as its baseline', () => {
    const corrected = before({ supersededBy: { testId: 'x', reason: 'y' } })
    const later = before({ performedAt: '2027-01-01T00:00:00.000Z' })
    expect(sweep([corrected, later]).baselineOn).toBeNull()
    expect(sweepDrift(sweep([corrected, later])).join()).toContain('No earlier sweep')
  })

  it('takes the newest sweep that set a baseline before the first of all', () => {
    const set = before({
      testId: 'set',
      performedAt: '2026-01-01T00:00:00.000Z',
      performedOn: '2026-01-01',
      setsBaseline: true,
    })
    expect(sweep([before(), set]).baselineOn).toBe('2026-01-01')
  })

  it('draws a total reflection at the end of the axis and says so', () => {
    const total = storedTest({ procedure: 'antenna-sweep', inputs: INPUTS })
    const findings = total.findings.map((one) => (one.band === '40 m' ? { ...one, value: null } : one))
    const points = INPUTS.points.map((one) => (one.band === '40 m' ? { ...one, swr: null } : one))
    const picture = sweepPicture({ ...total, findings, inputs: { points } }, [])
    expect(plain(sweepAnswer(picture))).toMatch(/^40 m fails: SWR beyond all measure at 7.2 MHz/)
    const [forty] = sweepLayout(picture, { width: 358, narrow: true })
    expect(forty!.points[0]!.y).toBeCloseTo(forty!.top)
    expect(forty!.yTicks.at(-1)!.label).toBe('all')
    expect(plain(sweepTable(picture).rows[0]!.cells.join(' | '))).toContain('7.2 MHz | beyond all measure | ')
    const noted = before({ figures: [{ band: '40 m', measure: 'swr', value: 1.3, frequencyMHz: 7.2 }] })
    expect(sweepDrift(sweepPicture({ ...total, findings, inputs: { points } }, [noted]))).toEqual([])
  })

  it('compares the SWR where no resonance was noted', () => {
    const noted = before({ figures: [{ band: '40 m', measure: 'swr', value: 1.3, frequencyMHz: 7.2 }] })
    expect(sweepDrift(sweep([noted])).join()).toContain('changed by 1.7 at most')
  })

  it('holds what was read outside the amateur band', () => {
    const [forty] = sweepLayout(sweep([before()]), { width: 358, narrow: true })
    expect(forty!.resonance!.now).toBeGreaterThanOrEqual(forty!.left)
    expect(forty!.resonance!.now).toBeLessThan(forty!.zone!.left)
    expect(forty!.points[0]!.x).toBeLessThan(forty!.right)
  })

  it('draws the whole sweep of a file through each panel, and nothing of it elsewhere', () => {
    const frequencyHz = Float64Array.from([1e6, 7e6, 7.1e6, 7.2e6, 7.3e6, 30e6])
    const swr = Float64Array.from([9, 2, 1.5, 3, Infinity, 9])
    const place = { width: 358, narrow: true }
    const [forty, twenty] = sweepLayout(sweep([]), place, { frequencyHz, swr })
    const places = [...forty!.trace.matchAll(/[ML]([\d.]+) ([\d.]+)/g)].map(([, x, y]) => [
      Number(x),
      Number(y),
    ])
    expect(places).toHaveLength(4)
    for (const [x] of places) {
      expect(x).toBeGreaterThanOrEqual(forty!.left)
      expect(x).toBeLessThanOrEqual(forty!.right)
    }
    expect(places.at(-1)![1]).toBeCloseTo(forty!.top, 0)
    expect(twenty!.trace).toBe('')
    expect(sweepLayout(sweep([]), place)[0]!.trace).toBe('')
  })

  it('shades a band as it is where the group transmits', () => {
    const edgesIn = (bandRegion: 'itu-1' | 'itu-2') => {
      const test = storedTest({ procedure: 'antenna-sweep', inputs: INPUTS })
      return sweepPicture({ ...test, judgedBy: { ...test.judgedBy, bandRegion } }, []).panels[0]!.edges
    }
    expect(edgesIn('itu-2')).toEqual({ lowMHz: 7, highMHz: 7.3 })
    expect(edgesIn('itu-1')).toEqual({ lowMHz: 7, highMHz: 7.2 })
  })

  it('sets its panels in rows of two on a phone', () => {
    expect(sweepHeight(4, true)).toBe(2 * sweepHeight(4, false))
    const panels = sweepLayout(sweep([]), { width: 358, narrow: true })
    expect(panels.every(({ right }) => right <= 358)).toBe(true)
  })
})

describe('the picture of a capacity test', () => {
  const battery = (temperatureC: number) =>
    capacityPicture(
      storedTest(
        {
          procedure: 'battery-capacity',
          inputs: { measuredAh: 20.54, currentA: 1.3, cutOffV: 10.5, temperatureC },
        },
        { battery: { ratedAh: 26, chemistry: 'agm' }, instrument: { accuracyPercentOfReading: 2 } },
      ),
    )!

  it('says what is left of the rating and what is asked', () => {
    const picture = battery(25)
    expect(plain(capacityAnswer(picture))).toBe(
      '79.0 ± 1.8 % of its rating: 20.5 Ah of 26 Ah at 25 °C; at least 80 % is asked.',
    )
    expect(capacityNotes(picture, text).join()).toContain('inside the uncertainty')
  })

  it('says at what temperature it was read where that was not 25 °C', () => {
    const picture = battery(10)
    expect(plain(capacityNotes(picture, text).join(' '))).toContain('Read as 20.5 Ah at 10 °C')
    expect(picture.percent).toBeGreaterThan(picture.measuredPercent)
    expect(capacityTable(picture, text).rows).toHaveLength(4)
  })
})
