import { describe, expect, it } from 'vitest'
import { fittingCell, formatBody, sheetsNeeded, type TagFormat } from '@/format/tag-format.ts'

const A4_ITEM: TagFormat = {
  kind: 'sheet',
  paper: 'a4',
  size: 'item',
  startCell: 1,
  cropMarks: false,
  widthMm: 62,
  heightMm: 29,
}

describe('the sheets that a print takes', () => {
  it.each([
    [1, 24, { sheets: 1, free: 0 }],
    [1, 25, { sheets: 2, free: 23 }],
    [5, 20, { sheets: 1, free: 0 }],
    [5, 21, { sheets: 2, free: 23 }],
    [24, 1, { sheets: 1, free: 0 }],
  ])('from cell %d with %d tags', (startCell, labels, needed) => {
    expect(sheetsNeeded({ ...A4_ITEM, startCell }, labels)).toEqual(needed)
  })
})

describe('the format of a print', () => {
  it('begins at the first cell where the sheet has fewer than the last one', () => {
    expect(fittingCell({ ...A4_ITEM, startCell: 24 })).toBe(24)
    expect(fittingCell({ ...A4_ITEM, size: 'lid', startCell: 24 })).toBe(1)
    expect(fittingCell({ ...A4_ITEM, startCell: 0 })).toBe(1)
  })

  it('carries only what a sheet or a roll needs', () => {
    expect(formatBody(A4_ITEM)).toEqual({
      kind: 'sheet',
      paper: 'a4',
      size: 'item',
      startCell: 1,
      cropMarks: false,
    })
    expect(formatBody({ ...A4_ITEM, kind: 'roll', widthMm: '62' })).toEqual({
      kind: 'roll',
      widthMm: 62,
      heightMm: 29,
    })
  })
})
