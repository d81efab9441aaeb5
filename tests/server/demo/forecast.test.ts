import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import type { readForecast } from '#shared/contracts/forecast.ts'
import type { ResponseOf } from '#shared/contracts/endpoint.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'

let demo: DemoApp
let oona: TestMember
let year: ResponseOf<typeof readForecast>

beforeAll(async () => {
  demo = await startDemoApp()
  oona = await demo.as('oona')
  year = (await oona.get('/api/v1/forecast').expect(200)).body as typeof year
}, LOADING_MS)
afterAll(() => demo.close())

/** The stations that are available at an instant, as the board counts them. */
async function boardTally(asOf: string): Promise<Record<string, number>> {
  const answer = await oona.get(`/api/v1/board?asOf=${encodeURIComponent(asOf)}`).expect(200)
  const { counts } = answer.body as BoardAnswer
  const here = counts.filter(({ station, availability }) => station && availability === 'available')
  return Object.fromEntries(here.map(({ verdict, n }) => [verdict, n]))
}

const withoutNone = (tally: Record<string, number>) =>
  Object.fromEntries(Object.entries(tally).filter(([, n]) => n > 0))

describe('the forecast of the demo at D0', () => {
  it('begins with what the board says now, and counts the same overdue checks', () => {
    expect(year.start.proven + year.start['proven-with-limits']).toBe(12)
    expect(year.start['proven-with-limits']).toBe(7)
    expect(year.overdue).toBe(31)
  })

  it('says after each of its steps what the board says for that instant', async () => {
    expect(year.steps.length).toBeGreaterThan(3)
    for (const { at, tally } of year.steps)
      expect(withoutNone(tally), at).toEqual(withoutNone(await boardTally(at)))
  })

  it('names a cause with every change', () => {
    const causes = year.steps.flatMap(({ changes }) => changes.map(({ cause }) => cause))
    expect(causes.filter((cause) => cause === '')).toEqual([])
  })

  it('has the work of the year in weeks from Mondays, a year of them', () => {
    expect(year.weeks.length).toBeGreaterThanOrEqual(53)
    expect(year.weeks.every(({ monday }) => new Date(`${monday}T00:00:00Z`).getUTCDay() === 1)).toBe(true)
    expect(year.weeks.reduce((sum, { checks }) => sum + checks, 0)).toBeGreaterThan(100)
  })
})
