import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addDays, daysBetween } from '#shared/engine/plain-date.ts'
import { loadByWeek } from '#shared/engine/readiness/due-load.ts'
import { forecast, type ForecastKit } from '#shared/engine/readiness/forecast.ts'
import { AVAILABILITIES, VERDICTS } from '#shared/engine/vocabulary.ts'

const END = 1000

/** Kits with periods that tile the time from 0 on. */
const kits = fc.array(
  fc.record({
    availability: fc.constantFrom(...AVAILABILITIES),
    cuts: fc.uniqueArray(fc.integer({ min: 1, max: 1200 }), { maxLength: 5 }),
    verdicts: fc.array(fc.constantFrom(...VERDICTS), { minLength: 6, maxLength: 6 }),
  }),
  { maxLength: 8 },
)

const kitOf = (
  {
    availability,
    cuts,
    verdicts,
  }: {
    availability: ForecastKit['availability']
    cuts: number[]
    verdicts: ForecastKit['periods'][number]['verdict'][]
  },
  place: number,
): ForecastKit => {
  const ends = [...cuts].sort((a, b) => a - b)
  const periods = [...ends, null].map((to, index) => {
    return {
      from: ends[index - 1] ?? 0,
      to,
      verdict: verdicts[index]!,
      reasons: [{ text: `reason ${index}` }],
    }
  })
  return { kitId: `k${place}`, designation: `K-${place}`, availability, periods }
}

describe('forecast', () => {
  it('says for every moment what counting the periods of that moment says', () => {
    fc.assert(
      fc.property(kits, fc.integer({ min: 0, max: END - 1 }), (drawn, moment) => {
        const all = drawn.map(kitOf)
        const { start, steps } = forecast(all, END)
        const said = steps.findLast(({ at }) => at <= moment)?.tally ?? start
        const counted = all
          .filter(({ availability }) => availability === 'available')
          .map(({ periods }) =>
            periods.find(({ from, to }) => from <= moment && (to === null || moment < to))!,
          )
        for (const verdict of VERDICTS)
          expect(said[verdict]).toBe(counted.filter((period) => period.verdict === verdict).length)
      }),
    )
  })

  it('names each change once, in the order of time, with its cause', () => {
    const periods = [
      { from: 0, to: 10, verdict: 'proven' as const, reasons: [] },
      { from: 10, to: null, verdict: 'not-proven' as const, reasons: [{ text: 'its count has lapsed' }] },
    ]
    const kit = { kitId: 'a', designation: 'K-02', availability: 'available' as const, periods }
    const { steps } = forecast([kit, { ...kit, kitId: 'b', designation: 'K-01' }], END)
    expect(steps).toHaveLength(1)
    expect(steps[0]).toMatchObject({
      at: 10,
      tally: { proven: 0, 'not-proven': 2 },
      changes: [
        { designation: 'K-01', before: 'proven', after: 'not-proven', cause: 'its count has lapsed' },
        { designation: 'K-02' },
      ],
    })
  })
})

describe('work that falls due by week', () => {
  it('puts every check of the span into the one week that begins on the Monday before it', () => {
    const day = fc.integer({ min: 0, max: 370 }).map((days) => addDays('2026-10-31', days))
    fc.assert(
      fc.property(fc.array(day, { maxLength: 30 }), (days) => {
        const checks = days.map((dueOn) => ({ procedure: 'count' as const, vital: true, dueOn }))
        const weeks = loadByWeek(checks, '2026-10-31', '2027-10-31')
        expect(weeks[0]!.monday).toBe('2026-10-26')
        expect(weeks.every(({ monday }, place) => daysBetween(weeks[0]!.monday, monday) === 7 * place)).toBe(
          true,
        )
        const last = addDays(weeks.at(-1)!.monday, 6)
        const within = days.filter((dueOn) => dueOn <= last)
        expect(weeks.reduce((sum, week) => sum + week.checks, 0)).toBe(within.length)
        expect(weeks.reduce((sum, week) => sum + week.minutes, 0)).toBe(within.length * 30)
      }),
    )
  })
})
