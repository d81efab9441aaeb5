/**
 * Where the cells of a printed tag sheet lie. The grids are those of common pre-cut label sheets and centred on the
 * page, so that they work on plain paper too; common practice, no source. All lengths in millimetres.
 */

export const PAPERS = ['a4', 'letter'] as const
export type Paper = (typeof PAPERS)[number]

/** A lid tag is read from across the room, an item tag at arm's length, a flag folds around a cable. */
export const TAG_SIZES = ['lid', 'item', 'flag'] as const
export type TagSize = (typeof TAG_SIZES)[number]

export interface TagSheet {
  readonly pageWidthMm: number
  readonly pageHeightMm: number
  readonly columns: number
  readonly rows: number
  readonly cellWidthMm: number
  readonly cellHeightMm: number
  readonly gapXMm: number
}

export interface Cell {
  readonly xMm: number
  readonly yMm: number
  readonly widthMm: number
  readonly heightMm: number
}

const A4 = { pageWidthMm: 210, pageHeightMm: 297 }
const LETTER = { pageWidthMm: 215.9, pageHeightMm: 279.4 }
const FLAG = { columns: 2, cellWidthMm: 98, cellHeightMm: 30, gapXMm: 0 }

export const TAG_SHEETS: Readonly<Record<Paper, Readonly<Record<TagSize, TagSheet>>>> = {
  a4: {
    lid: { ...A4, columns: 2, rows: 4, cellWidthMm: 99.1, cellHeightMm: 67.7, gapXMm: 2.5 },
    item: { ...A4, columns: 3, rows: 8, cellWidthMm: 63.5, cellHeightMm: 33.9, gapXMm: 2.5 },
    flag: { ...A4, ...FLAG, rows: 9 },
  },
  letter: {
    lid: { ...LETTER, columns: 2, rows: 3, cellWidthMm: 101.6, cellHeightMm: 84.67, gapXMm: 4.76 },
    item: { ...LETTER, columns: 3, rows: 10, cellWidthMm: 66.675, cellHeightMm: 25.4, gapXMm: 3.175 },
    flag: { ...LETTER, ...FLAG, rows: 8 },
  },
}

/** The middle of a flag that goes around the cable; the two faces beside it end up back to back. */
export const FLAG_WRAP_MM = 15

/** Labels on one sheet. */
export function cellsPerSheet(sheet: TagSheet): number {
  return sheet.columns * sheet.rows
}

/** A cell of a sheet by its number along the rows, from 0 to `cellsPerSheet - 1`. */
export function cellAt(sheet: TagSheet, index: number): Cell {
  const pitchX = sheet.cellWidthMm + sheet.gapXMm
  const left = (sheet.pageWidthMm - (sheet.columns - 1) * pitchX - sheet.cellWidthMm) / 2
  const top = (sheet.pageHeightMm - sheet.rows * sheet.cellHeightMm) / 2
  return {
    xMm: left + (index % sheet.columns) * pitchX,
    yMm: top + Math.floor(index / sheet.columns) * sheet.cellHeightMm,
    widthMm: sheet.cellWidthMm,
    heightMm: sheet.cellHeightMm,
  }
}
