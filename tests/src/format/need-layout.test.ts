import { describe, expect, it } from 'vitest'
import type { NeedAnswer } from '#shared/contracts/board-need.ts'
import { needLayout } from '@/format/need-layout.ts'

const near = (kitId: string) => ({ kitId, designation: kitId, missing: 'it were back', testId: null })
const answer: NeedAnswer = {
  lead: '',
  rest: '',
  can: ['c', 'a'],
  near: [near('e'), near('b'), near('gone')],
  others: 1,
  revision: 1,
  asOf: '2026-06-01T00:00:00Z',
  computedFor: 'now',
}

describe('the rows by what is needed', () => {
  it('put those that can in the board’s order, the near ones nearest first, and then the rest', () => {
    const board = [
      { section: 'can-go', kitIds: ['a', 'b', 'c'] },
      { section: 'cannot', kitIds: ['d', 'e'] },
    ]
    expect(needLayout(board, answer)).toEqual([
      { section: 'can', kitIds: ['a', 'c'] },
      { section: 'near', kitIds: ['e', 'b'] },
      { section: 'rest', kitIds: ['d'] },
    ])
  })

  it('leave out what a filter leaves out', () => {
    expect(
      needLayout([{ section: 'can-go', kitIds: ['c', 'd'] }], answer).map(({ kitIds }) => kitIds),
    ).toEqual([['c'], [], ['d']])
  })
})
