import { describe, expect, it } from 'vitest'
import { deviceName } from '@/format/device.ts'
import {
  heaviestFirst,
  minutesText,
  smallestFirst,
  stretchesOf,
  type KitFix,
  type KitReason,
} from '@/format/kit.ts'
import { unbrokenParts } from '@/format/sentence.ts'
import { fieldName } from '@/format/stored-field.ts'

describe('sentences that keep designations and quantities whole', () => {
  it.each([
    ['40 m is out: ANT-07 measured SWR 3.0 at 7.200 MHz', ['40 m', 'ANT-07', '7.200 MHz']],
    ['BAT-011 holds 74 % of rated capacity', ['BAT-011', '74 %']],
    ['reached 85 °C after 8.2 min', ['85 °C', '8.2 min']],
    ['last booted on 14 Mar 2026', ['14 Mar 2026']],
    ['two of 4 masts are here', []],
  ])('%s', (sentence, whole) => {
    const parts = unbrokenParts(sentence)
    expect(parts.map(({ text }) => text).join('')).toBe(sentence)
    expect(parts.filter((part) => part.whole).map(({ text }) => text)).toEqual(whole)
  })
})

describe('stored fields by their names', () => {
  it.each([
    ['peakC', 'Peak', '°C', 1],
    ['maxC', 'Most', '°C', 1],
    ['powerW', 'Power', 'W', 1],
    ['frequencyMHz', 'Frequency', 'MHz', 1],
    ['lossDb', 'Loss', 'dB', 1],
    ['minEfficiency', 'Least efficiency', '%', 100],
    ['capacityFraction', 'Capacity', '%', 100],
    ['measuredAh', 'Measured', 'Ah', 1],
    ['swrAtRadio', 'SWR at radio', '', 1],
    ['updatesDone', 'Updates done', '', 1],
    ['riseK', 'Rise', 'K', 1],
    ['keyUpAtS', 'Key up', 's', 1],
    ['kPerW', 'Value', 'K/W', 1],
    ['lowKPerW', 'Low', 'K/W', 1],
    ['initialSlopeKPerS', 'Initial slope', 'K/s', 1],
    ['rateKPerMin', 'Rate', 'K/min', 1],
  ])('%s is "%s" in %s', (name, label, unit, factor) => {
    expect(fieldName(name)).toEqual({ label, unit, factor })
  })
})

describe('fixes and reasons', () => {
  const fix = (minutes: number | null) =>
    ({ action: { kind: 'test', text: String(minutes), minutes } }) as KitFix
  const reason = (level: KitReason['level']) => ({ level }) as KitReason

  it('puts the smallest fix first and the open ones last', () => {
    expect(smallestFirst([fix(null), fix(60), fix(15)]).map(({ action }) => action.minutes)).toEqual([
      15,
      60,
      null,
    ])
  })

  it('puts the heaviest reason first', () => {
    expect(
      heaviestFirst([reason('note'), reason('limit'), reason('not-fit')]).map(({ level }) => level),
    ).toEqual(['not-fit', 'limit', 'note'])
  })

  it('writes attended time as people say it', () => {
    expect(minutesText(15)).toBe('15\u00a0min')
    expect(minutesText(60)).toBe('1\u00a0h')
    expect(minutesText(90)).toBe('1\u00a0h 30\u00a0min')
    expect(minutesText(119.7)).toBe('2\u00a0h')
    expect(minutesText(0)).toBe('0\u00a0min')
  })

  it('joins stored periods of one verdict into one stretch', () => {
    const period = (from: string, to: string | null, verdict: 'proven' | 'not-proven', text: string) => ({
      from,
      to,
      verdict,
      availability: 'available' as const,
      reasons: text ? [{ text } as KitReason] : [],
      oldestVitalOn: null,
    })
    const stretches = stretchesOf([
      period('2026-01-01T00:00:00Z', '2026-02-01T00:00:00Z', 'proven', ''),
      period('2026-02-01T00:00:00Z', '2026-03-01T00:00:00Z', 'proven', 'a note'),
      period('2026-03-01T00:00:00Z', null, 'not-proven', 'RAD-07 falls due'),
    ])
    expect(stretches).toEqual([
      { until: '2026-03-01T00:00:00.000Z', verdict: 'proven', cause: 'RAD-07 falls due' },
      { until: null, verdict: 'not-proven', cause: '' },
    ])
  })
})

describe('device names', () => {
  it.each([
    ['Mozilla/5.0 (X11; Linux x86_64) AppleWebKit/537.36 Chrome/140.0 Safari/537.36', 'Chrome on Linux'],
    [
      'Mozilla/5.0 (iPhone; CPU iPhone OS 17_0 like Mac OS X) Version/17.0 Mobile/15E148 Safari/604.1',
      'Safari on iPhone',
    ],
    ['Mozilla/5.0 (Android 14; Mobile; rv:130.0) Gecko/130.0 Firefox/130.0', 'Firefox on Android'],
    ['', 'Unknown device'],
    ['curl/8', 'curl/8'],
  ])('reads %s as %s', (userAgent, name) => {
    expect(deviceName(userAgent)).toBe(name)
  })
})
