import { describe, expect, it } from 'vitest'
import { judgeCount } from '#shared/engine/procedures/count.ts'
import {
  judgeBootAndUpdate,
  judgeCalibration,
  judgeInspection,
} from '#shared/engine/procedures/plain-checks.ts'
import type { Position } from '#shared/engine/readiness/types.ts'
import { valueOf } from '../../../support/value-of.ts'

const positions: Position[] = [
  { id: 'radio', name: 'Radio', category: 'radio', quantity: 1, vital: true },
  { id: 'battery', name: 'Battery', category: 'battery', quantity: 2, vital: true },
  { id: 'mast', name: 'Mast', category: 'mast', quantity: 1, vital: false },
]
const plan = { positions, sealNumber: '0433' }

const count = (found: Record<string, number>, fields = {}) =>
  judgeCount(
    {
      positions: Object.entries(found).map(([positionId, n]) => ({ positionId, found: n })),
      extraItemIds: [],
      sealFound: '0433',
      sealApplied: '0476',
      ...fields,
    },
    plan,
  )

describe('a count', () => {
  it('passes when every position is full', () => {
    const judged = valueOf(count({ radio: 1, battery: 2, mast: 1 }))
    expect(judged.finding).toBe('pass')
    expect(judged.findings.map(({ text }) => text)).toEqual([
      'Radio present',
      'Battery present',
      'Mast present',
    ])
    expect(judged.results).toEqual({ counted: 3, short: 0, extra: 0, sealMatched: true })
  })

  it('fails when a vital position is short', () => {
    const judged = valueOf(count({ radio: 0, battery: 1, mast: 1 }))
    expect(judged.finding).toBe('fail')
    expect(judged.findings).toMatchObject([
      { positionId: 'radio', finding: 'fail', value: 0, text: 'Radio missing' },
      { positionId: 'battery', finding: 'fail', value: 1, text: 'Battery: 1 of 2' },
      { positionId: 'mast', finding: 'pass' },
    ])
  })

  it('stands with a supporting part missing, which is a finding of its own', () => {
    const judged = valueOf(count({ radio: 1, battery: 2, mast: 0 }))
    expect(judged.finding).toBe('pass')
    expect(judged.findings[2]).toMatchObject({ finding: 'fail', text: 'Mast missing' })
  })

  it('asks for every position of the load plan and for no other', () => {
    expect(count({ radio: 1, battery: 2 })).toMatchObject({ code: 'E_MISSING', field: 'positions' })
    expect(count({ radio: 1, battery: 2, mast: 1, tent: 1 })).toMatchObject({ code: 'E_RANGE' })
  })

  it('says when the seal was not the one on record', () => {
    const broken = valueOf(count({ radio: 1, battery: 2, mast: 1 }, { sealFound: null }))
    expect(broken.results).toMatchObject({ sealMatched: false })
    expect(broken.warnings).toMatchObject([{ message: 'no whole seal was on the lid; the record has 0433.' }])
  })
})

describe('checks that a person states', () => {
  it('keeps what an inspection found', () => {
    const judged = valueOf(judgeInspection({ serviceable: false, found: 'one cell dead' }))
    expect(judged).toMatchObject({ finding: 'fail', findings: [{ text: 'unserviceable: one cell dead' }] })
    expect(valueOf(judgeInspection({ serviceable: true, found: '' })).findings[0]!.text).toBe('serviceable')
  })

  it('passes or fails a calibration', () => {
    const given = { certificate: 'A-17', deviation: '2 % at 50 W' }
    const passed = valueOf(judgeCalibration({ passed: true, ...given }))
    expect(passed.findings[0]).toMatchObject({
      finding: 'pass',
      text: 'calibration passed, certificate A-17, 2 % at 50 W',
    })
    expect(valueOf(judgeCalibration({ passed: false, certificate: '', deviation: '' })).finding).toBe('fail')
  })

  it('passes a computer that boots and has its updates', () => {
    const judge = (boots: boolean, updatesDone: boolean, clockRight?: boolean) =>
      valueOf(judgeBootAndUpdate({ boots, updatesDone, clockRight, softwareVersion: '' }))
    expect(judge(true, true).finding).toBe('pass')
    expect(judge(true, false).findings[0]).toMatchObject({ finding: 'fail', text: 'boots, updates not done' })
    expect(judge(false, true).findings[0]).toMatchObject({ finding: 'fail', text: 'does not boot' })
    expect(judge(true, true, false).warnings).toMatchObject([{ code: 'W_CLOCK' }])
  })
})
