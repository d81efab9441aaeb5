import { describe, expect, it } from 'vitest'
import { calibrationStanding } from '#shared/engine/readiness/calibration-state.ts'
import type { Evidence } from '#shared/engine/readiness/types.ts'
import type { FindingWord } from '#shared/engine/vocabulary.ts'

const calibrated = (performedOn: string, finding: FindingWord = 'pass'): Evidence => ({
  id: performedOn,
  procedure: 'calibration',
  subjectId: 'meter',
  performedAt: Date.parse(`${performedOn}T12:00:00Z`),
  performedOn,
  recordedAt: Date.parse(`${performedOn}T12:00:00Z`),
  instrumentId: null,
  finding,
  findings: [],
})

const sessionCheck = (performedOn: string, finding: FindingWord = 'pass', hour = 8): Evidence => ({
  ...calibrated(performedOn, finding),
  procedure: 'session-check',
  performedAt: Date.parse(`${performedOn}T00:00:00Z`) + hour * 3_600_000,
})

/** A measurement on 1 June 2026; calibrations newest first. */
const standing = (calibrations: Evidence[], months: number | null = 12, sessionChecks: Evidence[] = []) =>
  calibrationStanding({
    calibrations,
    sessionChecks,
    performedAt: Date.parse('2026-06-01T12:00:00Z'),
    performedOn: '2026-06-01',
    months,
  })

describe('the calibration of an instrument on the day of a measurement', () => {
  it('is in date to the last day of its interval, and lapsed the day after', () => {
    expect(standing([calibrated('2025-06-01')])).toMatchObject({ state: 'in-date', untilOn: '2026-06-01' })
    expect(standing([calibrated('2025-05-31')])).toMatchObject({ state: 'lapsed', untilOn: '2026-05-31' })
  })

  it('has no end where no rule asks for another', () => {
    expect(standing([calibrated('2019-01-01')], null)).toMatchObject({ state: 'in-date', untilOn: null })
  })

  it('is confirmed by a good calibration since, also after a lapse', () => {
    const found = standing([calibrated('2026-07-01'), calibrated('2024-01-01')])
    expect(found).toMatchObject({
      state: 'confirmed',
      before: { id: '2024-01-01' },
      after: { id: '2026-07-01' },
    })
  })

  it('has failed when the next one fails, or the last one did', () => {
    expect(standing([calibrated('2026-07-01', 'fail'), calibrated('2026-01-01')]).state).toBe('failed')
    expect(standing([calibrated('2026-01-01', 'fail')]).state).toBe('failed')
  })

  it('looks at the first calibration after it, not at the newest', () => {
    expect(standing([calibrated('2026-09-01', 'fail'), calibrated('2026-07-01')]).state).toBe('confirmed')
  })

  it('is none where none is on record', () => {
    expect(standing([])).toEqual({ state: 'none', before: null, after: null, untilOn: null, check: null })
  })
})

describe('a session check against a reference part', () => {
  const LAPSED = calibrated('2025-01-01')
  const GOOD = calibrated('2026-01-01')

  it('vouches after a lapse: on its own day from then on, and for all that was measured before it', () => {
    const same = sessionCheck('2026-06-01')
    expect(standing([LAPSED], 12, [same])).toMatchObject({ state: 'vouched', check: { id: same.id } })
    expect(standing([LAPSED], 12, [sessionCheck('2026-06-20')]).state).toBe('vouched')
  })

  it('vouches for nothing on a later day, nor where no calibration is on record or the last one failed', () => {
    expect(standing([LAPSED], 12, [sessionCheck('2026-05-31')]).state).toBe('lapsed')
    expect(standing([], 12, [sessionCheck('2026-06-01')]).state).toBe('none')
    expect(standing([calibrated('2026-01-01', 'fail')], 12, [sessionCheck('2026-06-01')]).state).toBe(
      'failed',
    )
  })

  it('puts in doubt what was measured between the last good one and the next when it fails', () => {
    expect(standing([GOOD], 12, [sessionCheck('2026-06-10', 'fail')]).state).toBe('check-failed')
    expect(standing([GOOD], 12, [sessionCheck('2026-06-01', 'fail')]).state).toBe('check-failed')
    const [fail, pass] = [sessionCheck('2026-06-10', 'fail'), sessionCheck('2026-06-05')]
    expect(standing([GOOD], 12, [fail, pass]).state).toBe('in-date')
    const again = [sessionCheck('2026-06-01', 'pass', 10), sessionCheck('2026-06-01', 'fail', 9)]
    expect(standing([GOOD], 12, again).state).toBe('in-date')
  })

  it('says nothing against a good calibration since, nor about the time before the last one', () => {
    const checks = [sessionCheck('2026-06-10', 'fail')]
    expect(standing([calibrated('2026-07-01'), GOOD], 12, checks).state).toBe('confirmed')
    expect(standing([GOOD], 12, [sessionCheck('2025-12-01', 'fail')]).state).toBe('in-date')
  })
})
