import { describe, expect, it } from 'vitest'
import { judgeAntennaSweep } from '#shared/engine/procedures/antenna-sweep.ts'
import { judgeFeedlineLoss } from '#shared/engine/procedures/feedline-loss.ts'
import { judgeRadioCheck } from '#shared/engine/procedures/radio-check.ts'
import { valueOf } from '../../../support/value-of.ts'

const NOTHING_KNOWN = { analyzer: null, baseline: null }

describe('an antenna sweep', () => {
  const points = [
    { band: '20 m', frequencyMHz: 14.2, swr: 1.8 },
    { band: '40 m', frequencyMHz: 7.05, swr: 1.4 },
    { band: '40 m', frequencyMHz: 7.2, swr: 2.7 },
  ] as const

  it('judges each band by its worst working point, in the order of the bands', () => {
    const judged = valueOf(judgeAntennaSweep({ points }, { maxSwr: 2.5 }, NOTHING_KNOWN))
    expect(judged.findings).toMatchObject([
      { band: '40 m', finding: 'fail', value: 2.7, text: 'SWR 2.7 at 7.2 MHz' },
      { band: '20 m', finding: 'pass', value: 1.8 },
    ])
    expect(judged.finding).toBe('fail')
  })

  it('passes exactly at the limit', () => {
    expect(valueOf(judgeAntennaSweep({ points }, { maxSwr: 2.7 }, NOTHING_KNOWN)).finding).toBe('pass')
  })
})

describe('a feedline test', () => {
  const limits = { maxRiseDb: 0.8 }
  const reading = (lossDb: number, swrAtRadio?: number) => ({ band: '2 m' as const, lossDb, swrAtRadio })
  const judge = (lossDb: number, history: { baselineDb: object; last?: object[] }, swr?: number) =>
    valueOf(
      judgeFeedlineLoss(
        { readings: [reading(lossDb, swr)], setsBaseline: false },
        { limits, history: { last: [], ...history } as never, line: {}, instrument: null },
      ),
    )

  it.each([
    [2.2, 'pass'],
    [2.21, 'fail'],
  ])('over a baseline of 1.4 dB calls %s dB a %s', (lossDb, word) => {
    expect(judge(lossDb, { baselineDb: { '2 m': 1.4 } }).finding).toBe(word)
  })

  it('says on which side of its baseline a line is', () => {
    const said = (lossDb: number) => judge(lossDb, { baselineDb: { '2 m': 1.4 } }).findings[0]?.text
    expect([said(1.6), said(1.1)]).toEqual([
      '1.6 dB, 0.2 dB over its baseline',
      '1.1 dB, 0.3 dB under its baseline',
    ])
  })

  it('makes the first test of a line its baseline', () => {
    const [finding] = judge(1.4, { baselineDb: {} }).findings
    expect(finding).toMatchObject({ finding: 'pass', text: '1.4 dB, the baseline for later tests' })
  })

  it('sets the baseline anew where the test says so', () => {
    const inputs = { readings: [reading(3)], setsBaseline: true }
    const history = { baselineDb: { '2 m': 1.4 }, last: [] }
    expect(valueOf(judgeFeedlineLoss(inputs, { limits, history, line: {}, instrument: null })).finding).toBe(
      'pass',
    )
  })

  it('warns of an SWR that improves while the loss rises', () => {
    const history = { baselineDb: { '2 m': 1.4 }, last: [reading(1.5, 1.51)] }
    expect(judge(2.2, history, 1.42).warnings).toMatchObject([{ code: 'W_SWR_FLATTERS' }])
    expect(judge(2.2, history, 1.5).warnings).toEqual([])
    expect(judge(1.4, history, 1.42).warnings).toEqual([])
  })
})

describe('a radio check', () => {
  const limits = { minPowerFraction: 0.8 }
  const readings = [
    { band: '40 m', settingW: 20, measuredW: 12 },
    { band: '40 m', settingW: 100, measuredW: 80 },
    { band: '10 m', settingW: 100, measuredW: 79 },
  ] as const

  it('judges each band at its highest setting', () => {
    const judged = valueOf(judgeRadioCheck({ readings, receives: true }, limits, null))
    expect(judged.findings).toMatchObject([
      { band: '40 m', finding: 'pass', value: 80, powerW: 100 },
      { band: '10 m', finding: 'fail', value: 79, text: '79 W of 100 W' },
    ])
  })

  it('fails a radio that does not receive', () => {
    const judged = valueOf(judgeRadioCheck({ readings: readings.slice(1, 2), receives: false }, limits, null))
    expect(judged.finding).toBe('fail')
    expect(judged.findings.at(-1)).toMatchObject({ band: null, measure: 'receives', finding: 'fail' })
  })
})
