import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checkZone, localDateOf, overdueFrom, startOfDayUtc } from '#shared/engine/local-day.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { addDays, fromEpochDay } from '#shared/engine/plain-date.ts'

const ZONES = [
  'UTC',
  'Europe/London',
  'America/New_York',
  'America/St_Johns',
  'America/Havana',
  'America/Sao_Paulo',
  'Asia/Kathmandu',
  'Asia/Beirut',
  'Africa/Cairo',
  'Australia/Lord_Howe',
  'Pacific/Kiritimati',
  'Pacific/Auckland',
]

const anything = fc.anything({ withNullPrototype: true, withDate: true, withBigInt: true })

const iso = (epochMs: unknown) => new Date(epochMs as number).toISOString()

describe('localDateOf', () => {
  // Calculation sheet, section 14.
  it.each([
    ['2026-03-31T23:30:00Z', 'Europe/London', '2026-04-01'],
    ['2026-04-01T03:30:00Z', 'America/New_York', '2026-03-31'],
    ['2026-12-31T11:00:00Z', 'Pacific/Auckland', '2027-01-01'],
    ['2026-06-30T18:45:00Z', 'Asia/Kathmandu', '2026-07-01'],
    ['2026-03-08T07:59:59Z', 'America/Los_Angeles', '2026-03-07'],
    ['2026-12-31T10:00:00Z', 'Pacific/Kiritimati', '2027-01-01'],
  ])('places %s in %s on %s', (instant, zone, date) => {
    expect(localDateOf(instant, zone)).toBe(date)
    expect(localDateOf(new Date(instant).getTime(), zone)).toBe(date)
  })

  it('reads an offset and refuses an instant without one', () => {
    expect(localDateOf('2026-04-01T00:30:00+01:00', 'UTC')).toBe('2026-03-31')
    expect(localDateOf('2026-04-01T00:30:00', 'UTC')).toMatchObject({ code: 'E_DATE' })
    expect(localDateOf('2026-13-01T00:30:00Z', 'UTC')).toMatchObject({ code: 'E_DATE' })
    expect(localDateOf(Number.NaN, 'UTC')).toMatchObject({ code: 'E_NUMBER' })
    expect(localDateOf(1e17, 'UTC')).toMatchObject({ code: 'E_RANGE' })
  })

  it.each(['', 'Mars/Base', '+05:30', 'Europe', '__proto__'])('refuses the zone "%s"', (zone) => {
    expect(localDateOf(0, zone)).toMatchObject({ code: 'E_ZONE' })
    expect(checkZone(zone)).toMatchObject({ code: 'E_ZONE' })
  })

  it('answers any input without throwing', () => {
    fc.assert(
      fc.property(anything, anything, (instant, zone) => {
        expect(isFailure(localDateOf(instant as number, String(typeof zone)))).toBe(true)
        void [localDateOf(instant as number, zone as string), startOfDayUtc(instant as string, 'UTC')]
      }),
    )
  })
})

describe('startOfDayUtc', () => {
  it.each([
    ['2026-07-01', 'UTC', '2026-07-01T00:00:00.000Z'],
    ['2026-07-01', 'Asia/Kathmandu', '2026-06-30T18:15:00.000Z'],
    ['2026-07-01', 'Pacific/Kiritimati', '2026-06-30T10:00:00.000Z'],
    // Midnight skipped: the clock went from 00:00 to 01:00 (IANA tz database).
    ['2018-11-04', 'America/Sao_Paulo', '2018-11-04T03:00:00.000Z'],
    ['2022-03-27', 'Asia/Beirut', '2022-03-26T22:00:00.000Z'],
    // Midnight shown twice: 01:00 went back to 00:00.
    ['2026-11-01', 'America/Havana', '2026-11-01T04:00:00.000Z'],
    // The clock went from 00:01 back to 23:01 of the day before: the first midnight counts.
    ['2006-10-29', 'America/St_Johns', '2006-10-29T02:30:00.000Z'],
    // The day was skipped whole when the country crossed the date line.
    ['2011-12-30', 'Pacific/Apia', '2011-12-30T10:00:00.000Z'],
  ])('starts %s in %s at %s', (date, zone, start) => {
    expect(iso(startOfDayUtc(date, zone))).toBe(start)
  })

  it('refuses what is no date, no zone, or outside the years it can print', () => {
    expect(startOfDayUtc('2026-02-30', 'UTC')).toMatchObject({ code: 'E_DATE' })
    expect(startOfDayUtc('2026-02-28', 'Mars/Base')).toMatchObject({ code: 'E_ZONE' })
    expect(startOfDayUtc('0999-02-28', 'UTC')).toMatchObject({ code: 'E_RANGE' })
    expect(startOfDayUtc('9999-12-31', 'UTC')).toMatchObject({ code: 'E_RANGE' })
  })

  it('is the first instant of its date in every zone', () => {
    const days = fc.integer({ min: 0, max: 47_000 }).map(fromEpochDay)
    fc.assert(
      fc.property(days, fc.constantFrom(...ZONES), (date, zone) => {
        const start = startOfDayUtc(date, zone) as number
        expect(localDateOf(start, zone)).toBe(date)
        expect(localDateOf(start - 1, zone)).toBe(addDays(date, -1))
      }),
    )
  })
})

describe('overdueFrom', () => {
  // Calculation sheet, section 14: the second day has 23 hours.
  it.each([
    ['2026-03-07', '2026-03-08T05:00:00.000Z'],
    ['2026-03-08', '2026-03-09T04:00:00.000Z'],
  ])('makes %s in New York overdue at %s', (due, at) => {
    expect(iso(overdueFrom(due, 'America/New_York'))).toBe(at)
  })

  it('refuses a day that is none and the last day of the calendar', () => {
    expect(overdueFrom('2026-02-30', 'UTC')).toMatchObject({ code: 'E_DATE', field: 'due' })
    expect(overdueFrom('9999-12-31', 'UTC')).toMatchObject({ code: 'E_RANGE' })
  })
})
