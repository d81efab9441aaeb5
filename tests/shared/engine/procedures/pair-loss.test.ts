import { describe, expect, it } from 'vitest'
import { judgePairLoss } from '#shared/engine/procedures/pair-loss.ts'
import { valueOf } from '../../../support/value-of.ts'

const LIMITS = { minEfficiency: 0.8 }

describe('the efficiency of a pair', () => {
  it('judges each band by the mean of both devices', () => {
    const inputs = {
      meters: 'two' as const,
      bands: [
        { band: '40 m' as const, inW: 100, outW: 66 },
        { band: '10 m' as const, inW: 50, outW: 28.125 },
      ],
    }
    const judged = valueOf(judgePairLoss(inputs, LIMITS, null))
    expect(judged.finding).toBe('fail')
    expect(judged.findings).toMatchObject([
      { band: '40 m', finding: 'pass', value: expect.closeTo(0.812404, 6), uncertainty: null },
      { band: '10 m', finding: 'fail', value: expect.closeTo(0.75, 6), text: '75 % efficient, 1.25 dB lost' },
    ])
    expect(judged.warnings).toEqual([])
  })

  it('passes exactly at the limit', () => {
    const inputs = { meters: 'two' as const, bands: [{ band: '40 m' as const, inW: 100, outW: 64 }] }
    expect(valueOf(judgePairLoss(inputs, LIMITS, null)).finding).toBe('pass')
  })

  it('is not rounded onto the limit that it misses', () => {
    const inputs = { meters: 'two' as const, bands: [{ band: '40 m' as const, inW: 100, outW: 63.4 }] }
    const [finding] = valueOf(judgePairLoss(inputs, LIMITS, null)).findings
    expect([finding?.finding, finding?.text, finding?.limit]).toEqual([
      'fail',
      '79.6 % efficient, 0.99 dB lost',
      '80 % at least',
    ])
  })

  it('is marginal where the meters cannot tell', () => {
    const wattmeter = { accuracyPercentOfReading: 5 * Math.sqrt(3) }
    const inputs = { meters: 'two' as const, bands: [{ band: '20 m' as const, inW: 100, outW: 66 }] }
    const judged = valueOf(judgePairLoss(inputs, LIMITS, wattmeter))
    expect(judged.findings[0]).toMatchObject({
      finding: 'marginal',
      uncertainty: expect.closeTo(2 * 0.0287228, 6),
    })
  })

  it('knows less of two meters than of one that was moved', () => {
    const wattmeter = { accuracyPercentOfReading: 5 }
    const bands = [{ band: '20 m' as const, inW: 100, outW: 66 }]
    const uncertaintyOf = (meters: 'two' | 'one-moved') =>
      valueOf(judgePairLoss({ meters, bands }, LIMITS, wattmeter)).findings[0]!.uncertainty!
    expect(uncertaintyOf('one-moved')).toBeLessThan(uncertaintyOf('two'))
  })

  it('refuses more power out than in, and says on which band', () => {
    const inputs = { meters: 'two' as const, bands: [{ band: '20 m' as const, inW: 50, outW: 51 }] }
    expect(judgePairLoss(inputs, LIMITS, null)).toMatchObject({ code: 'E_GAIN', line: 1 })
    expect(judgePairLoss(inputs, LIMITS, null)).toHaveProperty('message', expect.stringContaining('20 m'))
  })
})
