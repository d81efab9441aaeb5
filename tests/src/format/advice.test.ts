import { describe, expect, it } from 'vitest'
import type { AdvicePlan } from '#shared/contracts/advice.ts'
import { headline } from '@/format/advice.ts'

const planOf = (...works: [text: string, minutes: number][]): AdvicePlan => ({
  works: works.map(([text, minutes]) => ({ text, minutes, steps: [] })),
  minutes: works.reduce((sum, [, minutes]) => sum + minutes, 0),
  changes: [],
  countAfter: [],
  deployable: 0,
  proven: 0,
  returned: 0,
})

describe('the heading of an advice', () => {
  it('is the one work, or both', () => {
    expect(headline(planOf(['Fetch XFM-10', 20]))).toBe('Fetch XFM-10')
    expect(headline(planOf(['Fetch XFM-10', 20], ['Heat test XFM-10', 30]))).toBe(
      'Fetch XFM-10, then heat test XFM-10',
    )
  })

  it('counts the others where there are many, and leaves out what takes no time', () => {
    const plan = planOf(['Fetch XFM-10', 20], ['Swap it', 10], ['Test it', 30], ['Say so', 0])
    expect(headline(plan)).toBe('Fetch XFM-10, then 2 more things')
  })

  it('is there where nothing takes time', () => {
    expect(headline(planOf(['Say that K-18 is available again', 0]))).toBe('Say that K-18 is available again')
  })
})
