import { describe, expect, it } from 'vitest'
import type { BoardRow } from '#shared/contracts/board.ts'
import { changedKits, chunksOf, keepLayout, layoutOf, sameLayout } from '@/format/board-layout.ts'

const row = (kitId: string, verdict: BoardRow['verdict'] = 'proven', reasonTop = '') =>
  ({ kitId, verdict, availability: 'available', reasonTop }) as BoardRow

describe('the layout of the board', () => {
  it('keeps every row where it was when its verdict changes', () => {
    const shown = layoutOf([row('a'), row('b'), row('c')])
    const rows = [row('a'), row('c'), row('b', 'not-fit')]
    const kept = keepLayout(shown, rows)
    expect(kept).toEqual(shown)
    expect(sameLayout(kept, layoutOf(rows))).toBe(false)
  })

  it('drops rows that have gone and adds new ones at the end of their section', () => {
    const shown = layoutOf([row('a'), row('b')])
    const kept = keepLayout(shown, [row('n'), row('b'), row('x', 'not-proven')])
    expect(kept.map(({ kitIds }) => kitIds)).toEqual([['b', 'n'], [], ['x']])
  })

  it('names the kits whose row says something else', () => {
    const before = [row('a'), row('b', 'proven', 'x')]
    expect(changedKits(before, [row('a'), row('b', 'proven', 'y'), row('c')])).toEqual(['b', 'c'])
  })

  it('cuts sections into chunks of 25 and leaves empty ones out', () => {
    const rows = Array.from({ length: 51 }, (_none, index) => row(String(index)))
    const chunks = chunksOf(layoutOf(rows))
    expect(chunks.map(({ section, index, kitIds }) => [section, index, kitIds.length])).toEqual([
      ['can-go', 0, 25],
      ['can-go', 1, 25],
      ['can-go', 2, 1],
    ])
  })
})
