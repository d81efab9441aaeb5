import { describe, expect, it } from 'vitest'
import type { BoardCount } from '#shared/contracts/board.ts'
import { sayTally, tallyOf } from '#shared/engine/readiness/board-sentence.ts'

const count = (
  availability: BoardCount['availability'],
  verdict: BoardCount['verdict'],
  n: number,
  station = true,
): BoardCount => ({ station, availability, verdict, n })

const SCENARIO = [
  count('available', 'proven', 5),
  count('available', 'proven-with-limits', 7),
  count('assigned', 'proven', 2),
  count('out-of-service', 'not-proven', 2),
  count('out-of-service', 'not-fit', 4),
  count('available', 'proven', 1, false),
  count('available', 'not-proven', 1, false),
]

describe('the sentence of the board', () => {
  it('counts stations only', () => {
    expect(tallyOf(SCENARIO)).toEqual({ stations: 20, canGo: 12, withLimits: 7, onIssue: 2, cannot: 6 })
  })

  it('says what can go now', () => {
    const { lead, rest } = sayTally(tallyOf(SCENARIO), 'now')
    expect(`${lead} ${rest}`).toBe(
      '12 of 20 stations can go, 7 of them with limits. 2 are out on issue. 6 cannot be used now.',
    )
  })

  it('speaks of the past and of the future as such', () => {
    expect(sayTally(tallyOf(SCENARIO), 'past').lead).toBe('12 of 20 stations could go,')
    expect(sayTally(tallyOf(SCENARIO), 'past').rest).toContain('2 were out on issue. 6 could not be used.')
    expect(sayTally(tallyOf(SCENARIO), 'future').lead).toBe('12 of 20 stations will be able to go,')
  })

  it('leaves out what is nought', () => {
    expect(sayTally(tallyOf([count('available', 'proven', 1)]), 'now')).toEqual({
      lead: '1 of 1 station can go.',
      rest: '',
    })
    expect(sayTally(tallyOf([count('available', 'not-fit', 2)]), 'now')).toEqual({
      lead: 'None of 2 stations can go.',
      rest: '2 cannot be used now.',
    })
    expect(sayTally(tallyOf([]), 'now').lead).toBe('No stations yet.')
  })

  it('does not say "of them" when all are limited', () => {
    expect(sayTally(tallyOf([count('available', 'proven-with-limits', 3)]), 'now').rest).toBe(
      'all with limits.',
    )
  })
})
