import type { BodyInputOf } from '#shared/contracts/endpoint.ts'
import type { printTagSheet } from '#shared/contracts/tag-sheets.ts'
import {
  cellsPerSheet,
  PAPERS,
  TAG_SHEETS,
  TAG_SIZES,
  type Paper,
  type TagSize,
} from '#shared/engine/tag-layout.ts'
import { keep, readKeptJson } from '@/device-storage.ts'

/** How tags are printed, as it is chosen: a sheet with many cells or a roll of single labels. */
export interface TagFormat {
  kind: 'sheet' | 'roll'
  paper: Paper
  size: TagSize
  /** The first free cell, counted along the rows from 1. */
  startCell: number
  cropMarks: boolean
  widthMm: number | string | null
  heightMm: number | string | null
}

const KEY = 'halyard.tag-format'

const USUAL: TagFormat = {
  kind: 'sheet',
  paper: 'a4',
  size: 'item',
  startCell: 1,
  cropMarks: false,
  widthMm: 62,
  heightMm: 29,
}

export const PAPER_WORDS: Readonly<Record<Paper, string>> = { a4: 'A4', letter: 'Letter' }

export const SIZE_WORDS: Readonly<Record<TagSize, { readonly name: string; readonly about: string }>> = {
  lid: { name: 'Lid', about: 'Read from across the room' },
  item: { name: 'Item', about: 'Read at arm’s length' },
  flag: { name: 'Cable flag', about: 'Folds around a cable' },
}

/** The format as the service takes it. What is no number goes as it was typed, and the service says so. */
export function formatBody(format: TagFormat): BodyInputOf<typeof printTagSheet>['format'] {
  const { kind, paper, size, startCell, cropMarks, widthMm, heightMm } = format
  return kind === 'sheet'
    ? { kind, paper, size, startCell, cropMarks }
    : { kind, widthMm: Number(widthMm), heightMm: Number(heightMm) }
}

/** Sheets or labels that a print takes: `2 sheets, the last one with 7 free`. */
export function sheetsNeeded(format: TagFormat, labels: number): { sheets: number; free: number } {
  const cells = cellsPerSheet(TAG_SHEETS[format.paper][format.size])
  const used = format.startCell - 1 + labels
  const sheets = Math.ceil(used / cells)
  return { sheets, free: sheets * cells - used }
}

export function readFormat(): TagFormat {
  const format = { ...USUAL, ...(readKeptJson(KEY) as Partial<TagFormat> | null) }
  const known = PAPERS.includes(format.paper) && TAG_SIZES.includes(format.size)
  return known ? { ...format, startCell: fittingCell(format) } : { ...USUAL }
}

/** The cell itself, or the first where the sheet has fewer. */
export function fittingCell({ paper, size, startCell }: TagFormat): number {
  const cells = cellsPerSheet(TAG_SHEETS[paper][size])
  return Number.isInteger(startCell) && startCell >= 1 && startCell <= cells ? startCell : 1
}

export function keepFormat(format: TagFormat): void {
  keep(KEY, JSON.stringify(format))
}
