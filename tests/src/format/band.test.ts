import { describe, expect, it } from 'vitest'
import { bandColumns, bandSentence, fillHeight, fullWatts, shortBand, stripSentence } from '@/format/band.ts'

const forty = { band: '40 m', state: 'proven', fraction: 0.85, wattsAtAntenna: 85 } as const
const ten = {
  band: '10 m',
  state: 'limited',
  fraction: 0.6,
  wattsAtAntenna: 12,
  limit: '20 W at most',
} as const

describe('the band strip', () => {
  it('fills each cell against the full power of the kit', () => {
    expect(fullWatts([forty, ten])).toBeCloseTo(100)
    expect(fillHeight(forty, 100)).toBe('85%')
    expect(fillHeight(ten, 100)).toBe('12%')
    expect(fillHeight({ band: '40 m', state: 'proven', fraction: 0.7 }, null)).toBe('70%')
  })

  it('shows no power where a band is out or not proven, and all of the cell where nobody measured', () => {
    expect(fillHeight({ band: '40 m', state: 'out' }, 100)).toBe('0%')
    expect(fillHeight({ band: '40 m', state: 'not-proven', fraction: 0.8 }, 100)).toBe('0%')
    expect(fillHeight({ band: '40 m', state: 'proven' }, null)).toBe('100%')
  })

  it('says each band in words, longest wave first', () => {
    expect(bandSentence({ ...forty, lossDb: 0.7, testedOn: '2026-09-12' })).toBe(
      '40 m: 85\u00a0W at the antenna, loss 0.7\u00a0dB, tested 12 Sep 2026',
    )
    expect(stripSentence([ten, { band: '40 m', state: 'out', limit: 'SWR 3.0' }])).toBe(
      '40 m: out, SWR 3.0; 10 m: limited, 12\u00a0W at the antenna, 20 W at most',
    )
    expect(bandSentence({ band: '2 m', state: 'proven' })).toBe('2 m: proven')
    expect(bandSentence({ band: '2 m', state: 'out', limit: 'out' })).toBe('2 m: out')
  })

  it('lines several strips up by the bands that any of them has', () => {
    expect(bandColumns([[ten], [forty, { band: '2 m', state: 'proven' }]])).toEqual(['40 m', '10 m', '2 m'])
  })

  it('shortens metres and keeps other units', () => {
    expect(shortBand('40 m')).toBe('40')
    expect(shortBand('70 cm')).toBe('70\u2009cm')
  })
})
