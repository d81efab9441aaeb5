import { describe, expect, it } from 'vitest'
import type { HeatRun } from '@/components/heat-test/heat-run.ts'
import { withLog, withoutLog } from '@/components/heat-test/log-of-run.ts'

const run: HeatRun = {
  testId: 'x',
  step: 'review',
  setUp: {
    band: '10 m',
    powerW: 50,
    load: 'fixture-2450',
    enclosure: 'closed',
    ambientC: 22,
    method: 'Key-down',
    instrumentId: 'y',
    instrumentNote: '',
    conditions: '',
  },
  keyDownAt: 1_000_000,
  keyUpAt: 1_600_000,
  readings: [{ atS: 0, temperatureC: 22 }],
  stoppedAtLimit: false,
  swr: { start: null, highest: null, lowest: null },
  notes: 'windy',
}
const readings = [0, 30, 60, 90, 120].map((atS) => ({ atS, temperatureC: 22 + atS / 10 }))

describe('a log in the place of readings by hand', () => {
  it('keeps the moments of the run and everything else that was entered', () => {
    const taken = withLog(run, { readings, keyDownS: 0, keyed: null })
    expect(taken).toMatchObject({ keyDownAt: 1_000_000, keyUpAt: 1_600_000, notes: 'windy', readings })
  })

  it('sets what was read by hand aside, also when a second log follows, and puts it back', () => {
    const once = withLog(run, { readings, keyDownS: 0, keyed: null })
    const twice = withLog(once, { readings: readings.slice(2), keyDownS: 60, keyed: null })
    expect(twice.setAside).toEqual(run.readings)
    expect(withoutLog(twice)).toEqual(run)
  })

  it('begins with the last line before the key went down', () => {
    const taken = withLog(run, { readings, keyDownS: 45, keyed: null })
    expect(taken.readings).toEqual([
      { atS: 0, temperatureC: 25 },
      { atS: 15, temperatureC: 28 },
      { atS: 45, temperatureC: 31 },
      { atS: 75, temperatureC: 34 },
    ])
  })

  it('is the whole test where nothing was run on this device', () => {
    const fresh: HeatRun = { ...run, step: 'set-up', keyDownAt: null, keyUpAt: null, readings: [] }
    const taken = withLog(fresh, { readings, keyDownS: 30, keyed: { keyUpS: 90, startedAt: 5_000_000 } })
    expect(taken).toMatchObject({ step: 'review', keyDownAt: 5_000_000, keyUpAt: 5_060_000 })
  })
})
