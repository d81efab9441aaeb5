import { cellAt, cellsPerSheet, FLAG_WRAP_MM, type Cell, type TagSheet } from '#shared/engine/tag-layout.ts'
import { points, type Pen } from './pen.ts'

const HAIRLINE_PT = 0.25
const MARK_MM = 3
/** Marks end this far from the labels, so that none is left on one. */
const CLEAR_MM = 0.5
const GREY = '#777777'

/** Short lines in the margins where a guillotine or a knife goes along the edges of the cells. */
export function drawCropMarks(pen: Pen, sheet: TagSheet): void {
  const first = cellAt(sheet, 0)
  const last = cellAt(sheet, cellsPerSheet(sheet) - 1)
  const right = last.xMm + last.widthMm
  const bottom = last.yMm + last.heightMm
  for (const x of edges(sheet, (cell) => [cell.xMm, cell.xMm + cell.widthMm])) {
    line(pen, [x, first.yMm - CLEAR_MM - MARK_MM], [x, first.yMm - CLEAR_MM])
    line(pen, [x, bottom + CLEAR_MM], [x, bottom + CLEAR_MM + MARK_MM])
  }
  for (const y of edges(sheet, (cell) => [cell.yMm, cell.yMm + cell.heightMm])) {
    line(pen, [first.xMm - CLEAR_MM - MARK_MM, y], [first.xMm - CLEAR_MM, y])
    line(pen, [right + CLEAR_MM, y], [right + CLEAR_MM + MARK_MM, y])
  }
}

/** Where a flag is bent around its cable: ticks at the edges of the part between its faces. */
export function drawFoldMarks(pen: Pen, cell: Cell): void {
  const middle = cell.xMm + cell.widthMm / 2
  for (const x of [middle - FLAG_WRAP_MM / 2, middle + FLAG_WRAP_MM / 2]) {
    line(pen, [x, cell.yMm + 1], [x, cell.yMm + 3])
    line(pen, [x, cell.yMm + cell.heightMm - 3], [x, cell.yMm + cell.heightMm - 1])
  }
}

type Point = readonly [xMm: number, yMm: number]

function line(pen: Pen, [x1, y1]: Point, [x2, y2]: Point): void {
  pen.doc.lineWidth(HAIRLINE_PT).strokeColor(GREY)
  pen.doc.moveTo(points(x1), points(y1)).lineTo(points(x2), points(y2)).stroke()
}

function edges(sheet: TagSheet, of: (cell: Cell) => readonly number[]): Set<number> {
  const all = Array.from({ length: cellsPerSheet(sheet) }, (_, index) => of(cellAt(sheet, index)))
  return new Set(all.flat().map((mm) => Math.round(mm * 1000) / 1000))
}
