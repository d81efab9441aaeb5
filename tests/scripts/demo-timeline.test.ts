import { describe, expect, it, vi } from 'vitest'
import { newId } from '#shared/contracts/fields.ts'
import { Calendar, later } from '../../scripts/demo/calendar.ts'
import type { Step } from '../../scripts/demo/deeds.ts'
import { Ids } from '../../scripts/demo/ids.ts'
import { noisy, randomOf } from '../../scripts/demo/random.ts'
import { TIMELINE } from '../../scripts/demo/timeline.ts'

const tests = TIMELINE.flatMap(({ deed, at, by }) =>
  deed.do === 'test' ? [{ at, by, test: deed.test }] : [],
)

describe('the timeline of the demo', () => {
  it('is the same every time it is made', async () => {
    vi.resetModules()
    const again = (await import('../../scripts/demo/timeline.ts')) as { TIMELINE: readonly Step[] }
    expect(JSON.stringify(again.TIMELINE)).toBe(JSON.stringify(TIMELINE))
  })

  it('goes forward only and ends before its last day', () => {
    const times = TIMELINE.map(({ at }) => at)
    expect(times).toEqual([...times].sort())
    expect(times[0]! > '2025-09-01').toBe(true)
    expect(times.at(-1)! < '2026-10-31').toBe(true)
  })

  it('records nothing before it was performed', () => {
    expect(tests.filter(({ at, test }) => at < test.performed)).toEqual([])
  })

  it('keeps work parties within a day that people can work', () => {
    const late = tests.filter(({ test }) => {
      const time = test.performed.slice(11)
      return test.procedure !== 'inspection' && (time < '09:00' || time > '22:00')
    })
    expect(late).toEqual([])
  })

  it('has nobody at two benches at once', () => {
    // What a phone sent later, or a certificate told, says nothing about when its member was free again.
    const atOnce = tests.filter(({ at, test }) => at <= later(test.performed, 60))
    const busyUntil = new Map<string, string>()
    for (const { at, by, test } of atOnce.sort((a, b) => (a.test.performed < b.test.performed ? -1 : 1))) {
      const until = busyUntil.get(by) ?? ''
      expect(until <= test.performed, `${by} until ${until}, again at ${test.performed}`).toBe(true)
      busyUntil.set(by, at)
    }
  })

  it('takes the seals 0401 to 0475 in order, each once, 0433 for K-11', () => {
    const counts = tests.flatMap(({ test }) => (test.procedure === 'count' ? [test] : []))
    const applied = counts.flatMap(({ inputs }) => inputs.sealApplied ?? [])
    expect([...applied].sort()).toEqual(Array.from({ length: 75 }, (_, n) => `0${401 + n}`))
    const spring = counts.find(
      ({ subject, performed }) => subject === 'K-11' && performed.startsWith('2026-03'),
    )
    expect(spring?.inputs.sealApplied).toBe('0433')
  })

  it('counts K-11 with its seal broken and two positions empty', () => {
    const raided = tests.find(
      ({ test }) => test.subject === 'K-11' && test.performed.startsWith('2026-09-12'),
    )
    expect(raided?.test.inputs).toMatchObject({ sealFound: null, sealApplied: null })
  })
})

describe('the calendar of the demo', () => {
  it('moves every day by the same number of days', () => {
    const calendar = new Calendar(new Date('2027-03-01T12:00:00Z'))
    expect(calendar.day('2026-10-31')).toBe('2027-03-01')
    expect(calendar.day('2026-03-14')).toBe('2026-07-13')
    expect(calendar.instant('2026-10-31 18:00')).toBe('2027-03-02T01:00:00.000Z')
  })

  it('takes the day of the group, seven hours behind', () => {
    expect(new Calendar(new Date('2026-11-01T06:59:00Z')).day('2026-10-31')).toBe('2026-10-31')
    expect(new Calendar(new Date('2026-11-01T07:00:00Z')).day('2026-10-31')).toBe('2026-11-01')
  })

  it('counts minutes over midnight and the end of a month', () => {
    expect(later('2026-01-31 23:50', 15)).toBe('2026-02-01 00:05')
    expect(later('2026-02-01 00:05', -15)).toBe('2026-01-31 23:50')
  })
})

describe('ids of the demo', () => {
  const at = new Date('2026-03-14T20:00:00Z')

  it('are those that a device would make, of their time and name', () => {
    const id = new Ids().make('K-01', at)
    expect(newId.safeParse(id).success).toBe(true)
    expect(Number.parseInt(id.slice(0, 8) + id.slice(9, 13), 16)).toBe(at.getTime())
    expect(new Ids().make('K-01', at)).toBe(id)
  })

  it('differ with the name and with the time', () => {
    const ids = new Set(['K-01', 'K-02'].map((name) => new Ids().make(name, at)))
    ids.add(new Ids().make('K-01', new Date(at.getTime() + 1)))
    expect(ids.size).toBe(3)
  })

  it('are made once and known only from then on', () => {
    const ids = new Ids()
    expect(() => ids.of('K-01')).toThrow('not there yet')
    ids.make('K-01', at)
    expect(() => ids.make('K-01', at)).toThrow('made before')
  })
})

describe('noise', () => {
  it('stays within its reach and is the same for the same name', () => {
    const values = Array.from({ length: 500 }, (_, n) => noisy(`x ${n}`, 10, { reach: 0.5, digits: 3 }))
    expect(Math.max(...values)).toBeLessThanOrEqual(10.5)
    expect(Math.min(...values)).toBeGreaterThanOrEqual(9.5)
    expect(Math.max(...values) - Math.min(...values)).toBeGreaterThan(0.9)
    expect(noisy('x 7', 10, { reach: 0.5, digits: 3 })).toBe(values[7])
  })

  it('spreads evenly from 0 up to 1', () => {
    const random = randomOf('even')
    const values = Array.from({ length: 10_000 }, random)
    expect(values.every((value) => value >= 0 && value < 1)).toBe(true)
    expect(Math.abs(values.reduce((sum, value) => sum + value) / values.length - 0.5)).toBeLessThan(0.02)
  })
})
