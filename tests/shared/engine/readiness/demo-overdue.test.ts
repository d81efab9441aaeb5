import { describe, expect, it } from 'vitest'
import { checksAt } from '#shared/engine/readiness/checks.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import * as hf from './support/demo/hf-kits.ts'
import * as other from './support/demo/other-kits.ts'
import { D0 } from './support/instants.ts'

/** Story S5 of the demo scenario: which checks are overdue in kits at D0, one a subject and procedure. */

const overdue = (kit: KitState) => [
  ...new Set(
    checksAt(kit, D0)
      .filter(({ state }) => state === 'overdue')
      .map(({ subjectId, procedure }) => `${subjectId} ${procedure}`),
  ),
]

const OVERDUE: [kit: KitState, checks: string[]][] = [
  [hf.K_08, ['XFM-09 heat-test', 'BAT-015 battery-capacity', 'BAT-016 battery-capacity', 'K-08 count']],
  [
    other.K_13,
    [
      'RAD-13 radio-check',
      'ANT-13 antenna-sweep',
      'FDL-13 feedline-loss',
      'BAT-021 battery-capacity',
      'K-13 count',
    ],
  ],
  [
    other.K_14,
    [
      'RAD-14 radio-check',
      'ANT-14 antenna-sweep',
      'FDL-14 feedline-loss',
      'BAT-022 battery-capacity',
      'K-14 count',
    ],
  ],
  [hf.K_17, ['CMP-17 boot-and-update']],
  [other.K_23, ['WTM-23 calibration', 'DMM-23 calibration', 'K-23 count']],
]

describe('overdue checks of the demo kits', () => {
  for (const [kit, checks] of OVERDUE)
    it(`lists ${checks.length} at ${kit.kit.designation}`, () => {
      expect(overdue(kit).sort()).toEqual([...checks].sort())
    })

  const SOUND = [
    hf.K_01,
    hf.K_03,
    hf.K_04,
    hf.K_05,
    hf.K_06,
    hf.K_07,
    hf.K_16,
    other.K_09,
    other.K_10,
    other.K_12,
  ]
  it.each([...SOUND, other.K_19, other.K_20, other.K_21, other.K_22])(
    'lists none at $kit.designation',
    (kit) => {
      expect(overdue(kit)).toEqual([])
    },
  )

  it('does not call the computer of K-17 vital', () => {
    const check = checksAt(hf.K_17, D0).find(({ subjectId }) => subjectId === 'CMP-17')
    expect(check).toMatchObject({ vital: false, testedOn: '2026-03-14', dueOn: '2026-04-14' })
  })
})
