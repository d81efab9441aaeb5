import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { DueCheck } from '#shared/contracts/due-checks.ts'
import type { Verdict } from '#shared/engine/vocabulary.ts'
import { LOADING_MS, startDemoApp, type DemoApp } from '../../support/demo.ts'
import type { TestMember } from '../../support/test-app.ts'
import { TABLE_6 } from './table-6.ts'

let demo: DemoApp
let josiah: TestMember

beforeAll(async () => {
  demo = await startDemoApp()
  josiah = await demo.as('josiah')
}, LOADING_MS)
afterAll(() => demo.close())

/** Story S5, by procedure. */
const OVERDUE: Readonly<Record<string, readonly string[]>> = {
  'battery-capacity': [
    ...['BAT-015', 'BAT-016', 'BAT-021', 'BAT-022', 'BAT-023', 'BAT-042', 'BAT-043', 'BAT-044', 'BAT-045'],
  ],
  'heat-test': ['XFM-09', 'XFM-14', 'XFM-15'],
  'antenna-sweep': ['ANT-13', 'ANT-14', 'ANT-91'],
  'boot-and-update': ['CMP-17'],
  'feedline-loss': ['FDL-13', 'FDL-14', 'FDL-91', 'FDL-92', 'FDL-93', 'FDL-94'],
  calibration: ['DMM-23', 'WTM-23'],
  count: ['K-08', 'K-13', 'K-14', 'K-23'],
  'radio-check': ['RAD-13', 'RAD-14', 'RAD-15'],
}

describe('overdue checks at D0', () => {
  let checks: DueCheck[]

  beforeAll(async () => {
    const answer = await josiah.get('/api/v1/due-checks?state=overdue&size=200')
    expect(answer.status).toBe(200)
    checks = (answer.body as { rows: DueCheck[] }).rows
  })

  it('are 31, of the things that story S5 names', () => {
    const found: Record<string, string[]> = {}
    for (const { procedure, subject } of checks) (found[procedure] ??= []).push(subject.designation)
    for (const names of Object.values(found)) names.sort()
    expect(found).toEqual(OVERDUE)
    expect(checks).toHaveLength(31)
  })

  it('belong to the locked kits in 14 cases', () => {
    const at = (kit: string) =>
      checks.filter(({ kit: packedIn, subject }) => (packedIn?.designation ?? subject.designation) === kit)
        .length
    expect([at('K-08'), at('K-13'), at('K-14')]).toEqual([4, 5, 5])
  })

  it('are not vital to any deployable kit; CMP-17 is the only one in such a kit', () => {
    const deployable: readonly Verdict[] = ['proven', 'proven-with-limits']
    const inDeployable = checks.filter(
      ({ kit }) => kit && deployable.includes(TABLE_6[kit.designation]!.verdict),
    )
    expect(inDeployable.map(({ subject, vital }) => [subject.designation, vital])).toEqual([
      ['CMP-17', false],
    ])
  })
})
