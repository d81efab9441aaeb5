import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checkTestedOn, dueOn, dueState } from '#shared/engine/due-date.ts'
import { addDays, fromEpochDay } from '#shared/engine/plain-date.ts'

const days = fc.integer({ min: 0, max: 47_000 }).map(fromEpochDay)

describe('dueOn', () => {
  // Calculation sheet, section 14 (date-fns 4).
  it.each([
    ['2026-01-31', 1, '2026-02-28'],
    ['2028-01-31', 1, '2028-02-29'],
    ['2026-08-31', 6, '2027-02-28'],
    ['2028-02-29', 12, '2029-02-28'],
    ['2028-02-29', 48, '2032-02-29'],
    ['2027-02-28', 12, '2028-02-28'],
    ['2026-12-15', 1, '2027-01-15'],
    ['2096-02-29', 48, '2100-02-28'],
  ])('makes a test of %s due after %i months on %s', (testedOn, months, due) => {
    expect(dueOn(testedOn, months)).toBe(due)
  })

  it('accepts 1 and 120 months and refuses what lies outside or between', () => {
    expect(dueOn('2026-01-31', 120)).toBe('2036-01-31')
    for (const months of [0, 121, -1, 1.5])
      expect(dueOn('2026-01-31', months)).toMatchObject({ code: 'E_RANGE' })
    expect(dueOn('2026-01-31', Number.NaN)).toMatchObject({ code: 'E_NUMBER' })
    expect(dueOn('2027-02-29', 12)).toMatchObject({ code: 'E_DATE', field: 'testedOn' })
    expect(dueOn('9995-01-01', 120)).toMatchObject({ code: 'E_RANGE' })
  })

  it('is later than the test, never earlier for more months, and within 31 days a month', () => {
    fc.assert(
      fc.property(days, fc.integer({ min: 1, max: 119 }), (testedOn, months) => {
        const due = dueOn(testedOn, months) as string
        expect(due > testedOn).toBe(true)
        expect(due <= addDays(testedOn, 31 * months)).toBe(true)
        expect((dueOn(testedOn, months + 1) as string) > due).toBe(true)
      }),
    )
  })

  it('keeps the order of two tests', () => {
    fc.assert(
      fc.property(days, days, fc.integer({ min: 1, max: 120 }), (a, b, months) => {
        if (a <= b) expect((dueOn(a, months) as string) <= (dueOn(b, months) as string)).toBe(true)
      }),
    )
  })
})

describe('dueState', () => {
  // Calculation sheet, section 14.
  it.each([
    ['2026-03-31', '2026-03-01', 30, 'DUE_SOON'],
    ['2026-03-31', '2026-03-31', 0, 'DUE_SOON'],
    ['2026-03-31', '2026-04-01', -1, 'OVERDUE'],
    ['2026-11-15', '2026-10-15', 31, 'CURRENT'],
    ['2028-03-01', '2028-02-01', 29, 'DUE_SOON'],
  ])('calls due %s on %s: %i days, %s', (due, today, left, state) => {
    expect(dueState(today, due, 30)).toEqual({ state, days: left })
    expect(dueState(today, due)).toEqual({ state, days: left })
  })

  it('has a state of its own for an item without a passed test', () => {
    expect(dueState('2026-03-01', null)).toEqual({ state: 'NEVER_TESTED', days: null })
  })

  it('takes a window of 0 to 365 whole days', () => {
    expect(dueState('2026-03-30', '2026-03-31', 0)).toMatchObject({ state: 'CURRENT' })
    expect(dueState('2026-03-31', '2026-03-31', 0)).toMatchObject({ state: 'DUE_SOON' })
    for (const window of [-1, 366, 1.5])
      expect(dueState('2026-03-31', '2026-03-31', window)).toMatchObject({ code: 'E_RANGE' })
  })

  it('moves only from current to due soon to overdue as days pass', () => {
    const order = ['CURRENT', 'DUE_SOON', 'OVERDUE']
    fc.assert(
      fc.property(days, days, fc.integer({ min: 0, max: 365 }), (due, today, window) => {
        const now = dueState(today, due, window) as { state: string }
        const next = dueState(addDays(today, 1), due, window) as { state: string }
        expect(order.indexOf(next.state)).toBeGreaterThanOrEqual(order.indexOf(now.state))
        expect(now.state === 'OVERDUE').toBe(today > due)
      }),
    )
  })

  it('answers any input without throwing', () => {
    fc.assert(
      fc.property(fc.anything(), fc.anything(), fc.anything(), (a, b, c) => {
        void [dueState(a as string, b as string, c as number), dueOn(a as string, b as number)]
        void checkTestedOn(a as string, c as string)
      }),
    )
  })
})

describe('checkTestedOn', () => {
  it('accepts today and refuses tomorrow', () => {
    expect(checkTestedOn('2026-03-31', '2026-03-31')).toBeUndefined()
    expect(checkTestedOn('2026-04-01', '2026-03-31')).toMatchObject({ code: 'E_FUTURE', field: 'testedOn' })
    expect(checkTestedOn('2026-02-30', '2026-03-31')).toMatchObject({ code: 'E_DATE', field: 'testedOn' })
  })
})
