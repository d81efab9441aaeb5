import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'

/** How much there is: a change here is meant, or a mistake in the data. */

let demo: DemoApp

beforeAll(async () => {
  demo = await startDemoApp()
}, LOADING_MS)
afterAll(() => demo.close())

const TESTS = {
  'antenna-sweep': 73,
  'battery-capacity': 95,
  'boot-and-update': 25,
  calibration: 14,
  count: 88,
  'feedline-loss': 65,
  'heat-test': 83,
  inspection: 13,
  'pair-loss': 39,
  'radio-check': 51,
}

const ROWS = {
  batch: 3,
  build_sheet: 3,
  consumable: 14,
  consumable_lot: 15,
  item: 268,
  kit: 24,
  kit_kind: 6,
  member: 25,
  movement: 256,
  place: 3,
  policy: 1,
  position: 55,
  raised_check: 25,
  rule: 15,
  stock_change: 41,
  test: 546,
}

describe('the records of the demo', () => {
  it('are this many tests by procedure', async () => {
    const rows = await demo.rows<{ procedure: string; n: number }>(
      'SELECT procedure, count(*)::int AS n FROM test GROUP BY procedure',
    )
    expect(Object.fromEntries(rows.map(({ procedure, n }) => [procedure, n]))).toEqual(TESTS)
  })

  it('are this many rows by table', async () => {
    const counts = Object.keys(ROWS).map(
      (table) => `SELECT '${table}' AS name, count(*)::int AS n FROM ${table}`,
    )
    const rows = await demo.rows<{ name: string; n: number }>(counts.join(' UNION ALL '))
    expect(Object.fromEntries(rows.map(({ name, n }) => [name, n]))).toEqual(ROWS)
  })

  it('mail nobody', async () => {
    expect(await demo.rows('SELECT 1 FROM mail')).toEqual([])
  })

  it('are each signed by the member who made them, the founding and the opening aside', async () => {
    const rows = await demo.rows<{ actor: string; n: number }>(
      `SELECT actor, count(*)::int AS n FROM audit_event GROUP BY actor HAVING bool_or(member_id IS NULL)`,
    )
    expect(rows).toEqual([{ actor: 'Halyard', n: 2 }])
  })

  it('lie in the past of D0, none recorded before it was performed', async () => {
    const [row] = await demo.rows<{ last: Date; early: number }>(
      `SELECT max(recorded_at) AS last, count(*) FILTER (WHERE recorded_at < performed_at)::int AS early FROM test`,
    )
    expect(row!.early).toBe(0)
    expect(row!.last.toISOString() < '2026-10-31T07:00:00.000Z').toBe(true)
  })

  it('reached the record hours later from a phone without a signal', async () => {
    const late = await demo.rows<{ procedure: string }>(
      `SELECT t.procedure FROM test t JOIN member m ON m.id = t.recorded_by
        WHERE t.performed_on = '2026-06-13' AND m.name = 'Lupe Santaroya'
          AND t.recorded_at - t.performed_at > interval '2 hours' ORDER BY t.performed_at`,
    )
    expect(late.map(({ procedure }) => procedure)).toEqual(['heat-test', 'heat-test', 'pair-loss', 'count'])
  })
})
