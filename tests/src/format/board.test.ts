import { describe, expect, it } from 'vitest'
import type { BoardCount, BoardRow } from '#shared/contracts/board.ts'
import { hoursOf, sayTally, sectionOf, tallyOf, updatedText, wattsOf } from '@/format/board.ts'

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

describe('a row of the board', () => {
  const row = (part: Partial<BoardRow>) => part as BoardRow

  it('stands where the sentence counts it', () => {
    expect(sectionOf(row({ availability: 'available', verdict: 'proven-with-limits' }))).toBe('can-go')
    expect(sectionOf(row({ availability: 'assigned', verdict: 'proven' }))).toBe('on-issue')
    expect(sectionOf(row({ availability: 'available', verdict: 'not-proven' }))).toBe('cannot')
    expect(sectionOf(row({ availability: 'out-of-service', verdict: 'proven' }))).toBe('cannot')
  })

  it('says the watts at the antenna over the bands that stand', () => {
    expect(wattsOf({ bandCodes: '3p85:85,5l80:12,7o-:-,9n-:-', watts: 100 })).toEqual({
      text: '12\u201385\u00a0W',
      where: 'at the antenna',
    })
    expect(wattsOf({ bandCodes: 'bp72:36', watts: 50 })?.text).toBe('36\u00a0W')
  })

  it('falls back to the radio and then to nothing', () => {
    expect(wattsOf({ bandCodes: '', watts: 50 })).toEqual({ text: '50\u00a0W', where: 'at the radio' })
    expect(wattsOf({ bandCodes: '3o-:-', watts: null })).toBeNull()
  })

  it('says hours, mains where no battery counts, and nothing where no band stands', () => {
    expect(hoursOf({ bandCodes: '3p85:85', hours: 17 })?.text).toBe('17\u00a0h')
    expect(hoursOf({ bandCodes: '3p85:85', hours: 12.14 })?.text).toBe('12.1\u00a0h')
    expect(hoursOf({ bandCodes: '3p85:85', hours: null })?.text).toBe('mains')
    expect(hoursOf({ bandCodes: '3o-:-', hours: null })).toBeNull()
  })

  it('says "just now" for a minute', () => {
    const at = Date.parse('2026-11-01T01:00:00Z')
    expect(updatedText(at, at + 59_000, 'UTC')).toBe('updated just now')
    expect(updatedText(at, at + 60_000, 'UTC')).toBe('updated 01:00')
  })
})
