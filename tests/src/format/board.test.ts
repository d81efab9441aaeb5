import { describe, expect, it } from 'vitest'
import type { BoardRow } from '#shared/contracts/board.ts'
import { hoursOf, sectionOf, updatedText, wattsOf } from '@/format/board.ts'

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
