/** Any past result can be derived again from what is stored: on the demo data nothing differs. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { recomputeTests } from '#server/services/evidence/recompute-tests.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'

let demo: DemoApp

beforeAll(async () => {
  demo = await startDemoApp()
}, LOADING_MS)
afterAll(() => demo.close())

const recompute = () => demo.app.inGroup({ id: demo.groupId }, recomputeTests)

describe('the tests of the demo', () => {
  it('come out the same with the engine of today, all of them', async () => {
    const [stored] = await demo.rows<{ n: number }>('SELECT count(*)::int AS n FROM test')
    const { tests, without, differences } = await recompute()
    expect(differences).toEqual([])
    expect([tests, without]).toEqual([stored?.n, 0])
  })

  it('come out the same after the instruments that they were made with were edited', async () => {
    await demo.rows(
      `UPDATE item SET details = '{}' WHERE category IN ('wattmeter', 'thermometer', 'analyzer')`,
    )
    expect((await recompute()).differences).toEqual([])
  })
})
