import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import { systemClock } from '#server/clock.ts'
import { DEMO_SIGN_INS, LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'

/** The demo as scripts/start loads it: its last day is today. */

let demo: DemoApp

beforeAll(async () => {
  demo = await startDemoApp(systemClock.now())
}, LOADING_MS)
afterAll(() => demo.close())

describe('the demo loaded as of today', () => {
  it('tells the same story: 8 proven, 8 with limits, 3 not proven, 5 not fit, 31 overdue', async () => {
    const ines = await demo.as('ines')
    const { rows } = (await ines.get('/api/v1/board?size=200')).body as BoardAnswer
    const count = (verdict: string) => rows.filter((row) => row.verdict === verdict).length
    const totals = ['proven', 'proven-with-limits', 'not-proven', 'not-fit'].map(count)
    expect(totals).toEqual([8, 8, 3, 5])
    const due = (await ines.get('/api/v1/due-checks?state=overdue')).body as { overdue: number }
    expect(due.overdue).toBe(31)
  })

  it.each(DEMO_SIGN_INS)('lets $name in', async ({ address, password }) => {
    const answer = await demo.app.request().post('/api/v1/sign-in', { email: address, password })
    expect(answer.status, JSON.stringify(answer.body)).toBeLessThan(300)
  })

  it('is marked as a demonstration', async () => {
    expect(await demo.rows('SELECT demo, archived_at FROM groups')).toEqual([
      { demo: true, archived_at: null },
    ])
  })
})
