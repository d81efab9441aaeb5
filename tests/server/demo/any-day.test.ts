import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { BoardAnswer } from '#shared/contracts/board.ts'
import { systemClock } from '#server/clock.ts'
import { DEMO_SIGN_INS, LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'

/** The demo as scripts/start loads it: its last day is today. */

let demo: DemoApp
let atD0: DemoApp

beforeAll(async () => {
  demo = await startDemoApp(systemClock.now())
  atD0 = await startDemoApp()
}, 2 * LOADING_MS)
afterAll(() => Promise.all([demo.close(), atD0.close()]))

/** What people and services wrote; periods and the board follow from it by the calendar. */
const TABLES = [
  'member',
  'place',
  'kit_kind',
  'position',
  'kit',
  'build_sheet',
  'batch',
  'item',
  'movement',
  'rule',
  'test',
]
const MORE_TABLES = ['consumable', 'consumable_lot', 'stock_change', 'raised_check', 'audit_event']

/** Rows with every day, instant and id blotted out. */
async function blotted(app: DemoApp, table: string): Promise<string[]> {
  const rows = await app.rows<{ row: string }>(
    `SELECT (to_jsonb(t) - 'content_hash')::text AS row FROM ${table} t`,
  )
  const days = /\d{4}-\d\d-\d\d(T[\d:.]+(Z|\+00:00))?|\b\d{1,2} [A-Z][a-z]{2} \d{4}\b/g
  const ids = /[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}/g
  return rows.map(({ row }) => row.replace(ids, '#').replace(days, '@')).sort()
}

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

  it.each([...TABLES, ...MORE_TABLES])(
    'has the same rows of %s as at D0, but for the days',
    async (table) => {
      const rows = await blotted(demo, table)
      expect(rows.length).toBeGreaterThan(0)
      expect(rows).toEqual(await blotted(atD0, table))
    },
  )

  it('is marked as a demonstration', async () => {
    expect(await demo.rows('SELECT demo, archived_at FROM groups')).toEqual([
      { demo: true, archived_at: null },
    ])
  })
})

describe('the sign-ins that scripts/start prints', () => {
  it.each(DEMO_SIGN_INS)('lets $name in', async ({ address, password }) => {
    const answer = await demo.app.request().post('/api/v1/sign-in', { email: address, password })
    expect(answer.status, JSON.stringify(answer.body)).toBeLessThan(300)
  })
})
