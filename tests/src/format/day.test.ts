import { describe, expect, it } from 'vitest'
import { dayText, daysAway, instantOfWall, instantText, shortDayText, wallClock } from '@/format/day.ts'

const ZONE = 'America/Los_Angeles'

describe('days in words', () => {
  it('writes the month as a word', () => {
    expect(dayText('2026-03-04')).toBe('4 Mar 2026')
    expect(shortDayText('2026-12-31')).toBe('31 Dec')
  })

  it.each([
    ['2026-10-31', 'today'],
    ['2026-11-01', 'tomorrow'],
    ['2026-10-30', 'yesterday'],
    ['2026-11-24', 'in 24 days'],
    ['2026-10-22', '9 days ago'],
    ['2026-12-29', 'in 59 days'],
    ['2026-12-30', 'in 2 months'],
    ['2025-10-31', '12 months ago'],
    ['2029-01-01', 'in 2 years'],
  ])('says how far %s is from 31 Oct 2026: %s', (day, words) => {
    expect(daysAway(day, '2026-10-31')).toBe(words)
  })
})

describe('instants on the wall clock of a zone', () => {
  it('reads the day and the time on 24 hours', () => {
    expect(wallClock('2026-11-01T01:00:00Z', ZONE)).toEqual({ day: '2026-10-31', time: '18:00' })
    expect(wallClock('2026-11-01T07:00:00Z', ZONE)).toEqual({ day: '2026-11-01', time: '00:00' })
    expect(instantText('2026-11-01T01:00:00Z', ZONE)).toBe('31 Oct 2026, 18:00')
  })

  it.each([
    ['2026-10-31', '18:00', '2026-11-01T01:00:00.000Z'],
    ['2026-12-24', '09:30', '2026-12-24T17:30:00.000Z'],
    ['2026-01-01', '00:00', '2026-01-01T08:00:00.000Z'],
  ])('finds the instant of %s %s', (day, time, instant) => {
    expect(instantOfWall(day, time, ZONE)).toBe(instant)
  })

  it('takes the first of a time that comes twice when the clocks go back', () => {
    expect(instantOfWall('2026-11-01', '01:30', ZONE)).toBe('2026-11-01T08:30:00.000Z')
  })

  it('goes past the gap when the clocks go forward', () => {
    const instant = instantOfWall('2026-03-08', '02:30', ZONE)
    expect(wallClock(instant, ZONE)).toEqual({ day: '2026-03-08', time: '03:30' })
  })
})
