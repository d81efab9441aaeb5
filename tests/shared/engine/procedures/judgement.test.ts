import { describe, expect, it } from 'vitest'
import { figure, judgeAtLeast, judgeAtMost, percent, worstOf } from '#shared/engine/procedures/judgement.ts'

describe('judging a value against a limit', () => {
  it.each([
    [2.5, null, 'pass'],
    [2.51, null, 'fail'],
    [2.4, 0.05, 'pass'],
    [2.48, 0.05, 'marginal'],
    [2.5, 0.05, 'marginal'],
    [2.52, 0.05, 'marginal'],
    [2.6, 0.05, 'fail'],
    [2.5, 0, 'pass'],
  ] as const)('calls %s with an uncertainty of %s under a limit of 2.5: %s', (value, uncertainty, word) => {
    expect(judgeAtMost(value, 2.5, uncertainty)).toBe(word)
  })

  it.each([
    [0.8, null, 'pass'],
    [0.799, null, 'fail'],
    [0.82, 0.03, 'marginal'],
    [0.78, 0.03, 'marginal'],
    [0.84, 0.03, 'pass'],
    [0.76, 0.03, 'fail'],
  ] as const)('calls %s with an uncertainty of %s over a limit of 0.8: %s', (value, uncertainty, word) => {
    expect(judgeAtLeast(value, 0.8, uncertainty)).toBe(word)
  })

  it('takes the worst finding for the whole', () => {
    expect(worstOf([])).toBe('pass')
    expect(worstOf([{ finding: 'pass' }, { finding: 'marginal' }])).toBe('marginal')
    expect(worstOf([{ finding: 'marginal' }, { finding: 'fail' }])).toBe('fail')
  })

  it('writes figures without more digits than were asked for', () => {
    expect([figure(85, 1), figure(8.2, 1), figure(8.25, 1), figure(0.8, 2)]).toEqual([
      '85',
      '8.2',
      '8.3',
      '0.8',
    ])
    expect(percent(0.8)).toBe('80 %')
    expect(percent(0.7955, 1)).toBe('79.5 %')
  })
})
