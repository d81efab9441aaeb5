import { describe, expect, it } from 'vitest'
import { cellAt, cellsPerSheet, PAPERS, TAG_SHEETS, TAG_SIZES } from '#shared/engine/tag-layout.ts'

const SHEETS = PAPERS.flatMap((paper) =>
  TAG_SIZES.map((size) => [paper, size, TAG_SHEETS[paper][size]] as const),
)

describe('tag sheets', () => {
  it.each(SHEETS)('%s %s keeps every cell on the page and apart from the others', (_paper, _size, sheet) => {
    const cells = Array.from({ length: cellsPerSheet(sheet) }, (_, index) => cellAt(sheet, index))
    for (const [index, cell] of cells.entries()) {
      expect(cell.xMm).toBeGreaterThan(3.9)
      expect(cell.yMm).toBeGreaterThan(9)
      expect(cell.xMm + cell.widthMm).toBeLessThan(sheet.pageWidthMm - 3.9)
      expect(cell.yMm + cell.heightMm).toBeLessThan(sheet.pageHeightMm - 9)
      for (const other of cells.slice(index + 1)) {
        const apart =
          other.xMm >= cell.xMm + cell.widthMm - 1e-9 || other.yMm >= cell.yMm + cell.heightMm - 1e-9
        expect(apart).toBe(true)
      }
    }
  })

  it('counts cells along the rows', () => {
    const sheet = TAG_SHEETS.a4.item
    expect(cellsPerSheet(sheet)).toBe(24)
    expect(cellAt(sheet, 0)).toEqual({ xMm: 7.25, yMm: (297 - 8 * 33.9) / 2, widthMm: 63.5, heightMm: 33.9 })
    expect(cellAt(sheet, 4).xMm).toBeCloseTo(73.25)
    expect(cellAt(sheet, 4).yMm).toBeCloseTo(46.8)
  })
})
