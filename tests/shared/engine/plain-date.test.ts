import { addMonths as addMonthsOracle, differenceInCalendarDays } from 'date-fns'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  addDays,
  addMonths,
  compareDates,
  daysBetween,
  earliestDate,
  epochDay,
  fromEpochDay,
  isPlainDate,
  parseDate,
} from '#shared/engine/plain-date.ts'

const anyDate = fc.integer({ min: -350_000, max: 350_000 }).map(fromEpochDay)

/** A local Date of the test process, built from numbers: the form date-fns works on. */
function asLocalDate(date: string): Date {
  const [year = 0, month = 0, day = 0] = date.split('-').map(Number)
  return new Date(year, month - 1, day)
}

describe('parseDate', () => {
  it.each(['2026-01-31', '2028-02-29', '2000-02-29', '0001-01-01', '9999-12-31'])('accepts %s', (date) => {
    expect(parseDate(date)).toBe(date)
  })

  it.each(['2027-02-29', '2026-13-01', '2026-00-10', '2026-04-31', '2100-02-29', '0000-01-01', '2026-1-3'])(
    'refuses %s',
    (date) => expect(parseDate(date, 'testedOn')).toMatchObject({ code: 'E_DATE', field: 'testedOn' }),
  )

  it('refuses a missing date and anything that is no text', () => {
    for (const value of [undefined, null, '']) expect(parseDate(value)).toMatchObject({ code: 'E_MISSING' })
    for (const value of [20260131, {}, [], new Date(2026, 0, 31), '2026-01-31T00:00:00Z', ' 2026-01-31'])
      expect(parseDate(value)).toMatchObject({ code: 'E_DATE' })
  })

  it('answers any input without throwing', () => {
    fc.assert(fc.property(fc.anything(), (value) => void [parseDate(value), isPlainDate(value)]))
  })
})

describe('date arithmetic', () => {
  // Calculation sheet, section 14: 31 Jan + 1 + 1 month and 31 Jan + 2 months.
  it('clamps to the last day of the month and counts from the day given', () => {
    expect(addMonths(addMonths('2026-01-31', 1), 1)).toBe('2026-03-28')
    expect(addMonths('2026-01-31', 2)).toBe('2026-03-31')
    expect(addMonths('2026-03-31', -1)).toBe('2026-02-28')
  })

  it('agrees with date-fns on months added and calendar days counted', () => {
    const later = fc.integer({ min: 0, max: 47_000 }).map(fromEpochDay) // 1970 to 2098
    fc.assert(
      fc.property(later, later, fc.integer({ min: -400, max: 400 }), (a, b, months) => {
        expect(asLocalDate(addMonths(a, months))).toEqual(addMonthsOracle(asLocalDate(a), months))
        expect(daysBetween(a, b)).toBe(differenceInCalendarDays(asLocalDate(b), asLocalDate(a)))
      }),
    )
  })

  it('adds days so that counting them gives the same number back', () => {
    fc.assert(
      fc.property(anyDate, fc.integer({ min: -3000, max: 3000 }), (date, days) => {
        expect(daysBetween(date, addDays(date, days))).toBe(days)
        expect(fromEpochDay(epochDay(date))).toBe(date)
      }),
    )
  })

  it('visits every day of 400 years once, in order', () => {
    let previous = fromEpochDay(0)
    for (let day = 1; day <= 146_097; day++) {
      const date = fromEpochDay(day)
      if (!(isPlainDate(date) && date > previous)) expect.fail(`${date} after ${previous}`)
      previous = date
    }
    expect(previous).toBe('2370-01-01')
  })

  it('sorts and finds the earliest', () => {
    expect(['2026-03-01', '2025-12-31', '2026-03-01'].sort(compareDates)).toEqual([
      '2025-12-31',
      '2026-03-01',
      '2026-03-01',
    ])
    expect(earliestDate(['2026-03-01', null, '2025-12-31', undefined])).toBe('2025-12-31')
    expect(earliestDate([null])).toBeUndefined()
  })

  it('throws on text that was never parsed, and off the end of the calendar', () => {
    expect(() => addDays('2026-02-30', 1)).toThrow(RangeError)
    expect(() => addDays('9999-12-31', 1)).toThrow(RangeError)
    expect(() => addMonths('2026-01-31', 0.5)).toThrow(RangeError)
    expect(() => daysBetween('today', '2026-01-01')).toThrow(RangeError)
  })
})
