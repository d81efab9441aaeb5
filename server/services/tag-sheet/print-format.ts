/** From what was asked for to pages and faces: which cells a page has, and how each face of a label is laid out. */
import type { z } from 'zod'
import type { tagFormat } from '#shared/contracts/tag-sheets.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { planQrLabel, QUIET_ZONE_MODULES, type QrLabel } from '#shared/engine/qr-label.ts'
import { tagAddress } from '#shared/engine/tag-address.ts'
import {
  cellAt,
  cellsPerSheet,
  FLAG_WRAP_MM,
  TAG_SHEETS,
  type Cell,
  type TagSheet,
  type TagSize,
} from '#shared/engine/tag-layout.ts'
import { AppError, invalidField } from '../../errors.ts'
import { faceLayout, type FaceLayout } from './face-layout.ts'
import { SMALLEST_MODULE_MM } from './printer-steps.ts'

export type TagFormat = z.output<typeof tagFormat>

export interface PrintFormat {
  readonly pageWidthMm: number
  readonly pageHeightMm: number
  readonly cellsPerPage: number
  /** Cells of the first page that stay free. */
  readonly skip: number
  readonly qr: QrLabel
  readonly layout: FaceLayout
  cell(index: number): Cell
  /** One face, or both of a flag. */
  faces(cell: Cell): readonly Cell[]
  readonly marks: { readonly crop?: TagSheet; readonly fold: boolean }
}

/** Largest module by size of tag, mm: a lid is read from farther away (calculation sheet, section 13). */
const LARGEST_MODULE_MM: Readonly<Record<TagSize | 'roll', number>> = {
  lid: 1.2,
  item: 0.75,
  flag: 0.7,
  roll: 2,
}

/** Longest tag that the code must have room for: two letters, six characters of serial and the check character. */
const LONGEST_TAG = 'XF2222222'

/** Throws `request-invalid` for a start cell that the sheet does not have or a label too small for its code. */
export function printFormat(format: TagFormat, publicUrl: string): PrintFormat {
  const qr = planQrLabel({ text: tagAddress(publicUrl, LONGEST_TAG) })
  if (isFailure(qr)) {
    throw new AppError('state-conflict', `The address of this service is too long for a label: ${qr.message}`)
  }
  return format.kind === 'sheet' ? sheetFormat(format, qr) : rollFormat(format, qr)
}

function sheetFormat(format: TagFormat & { kind: 'sheet' }, qr: QrLabel): PrintFormat {
  const { paper, size, startCell, cropMarks } = format
  const sheet = TAG_SHEETS[paper][size]
  const cellsPerPage = cellsPerSheet(sheet)
  if (startCell > cellsPerPage) {
    throw invalidField('#/format/startCell', `This sheet has ${cellsPerPage} labels.`)
  }
  const faces = size === 'flag' ? facesOfFlag : (cell: Cell) => [cell]
  const [face] = faces(cellAt(sheet, 0))
  const layout = faceLayout({ ...face!, modules: qr.modules, largestModuleMm: LARGEST_MODULE_MM[size] })
  if (!layout)
    throw invalidField('#/format/size', 'The address of this service makes a code too large for this size.')
  return {
    pageWidthMm: sheet.pageWidthMm,
    pageHeightMm: sheet.pageHeightMm,
    cellsPerPage,
    skip: startCell - 1,
    qr,
    layout,
    cell: (index) => cellAt(sheet, index),
    faces,
    marks: { fold: size === 'flag', ...(cropMarks && { crop: sheet }) },
  }
}

function rollFormat(format: TagFormat & { kind: 'roll' }, qr: QrLabel): PrintFormat {
  const { widthMm, heightMm } = format
  const cell: Cell = { xMm: 0, yMm: 0, widthMm, heightMm }
  const layout = faceLayout({ ...cell, modules: qr.modules, largestModuleMm: LARGEST_MODULE_MM.roll })
  if (!layout) throw invalidField('#/format/widthMm', tooSmall(format, qr))
  return {
    pageWidthMm: widthMm,
    pageHeightMm: heightMm,
    cellsPerPage: 1,
    skip: 0,
    qr,
    layout,
    cell: () => cell,
    faces: (only) => [only],
    marks: { fold: false },
  }
}

/** Says what sizes would do, with a little to spare. */
function tooSmall({ widthMm, heightMm }: TagFormat & { kind: 'roll' }, { modules }: QrLabel): string {
  const sideMm = (modules + 2 * QUIET_ZONE_MODULES) * SMALLEST_MODULE_MM
  const [least, tall, wide] = [1.12, 1.75, 2].map((times) => Math.ceil(sideMm * times))
  const sizes = `${least} by ${tall} mm or ${wide} by ${least} mm would do.`
  return `${widthMm} by ${heightMm} mm has no room for a code that a phone can read: ${sizes}`
}

/** The same face twice: folded around the cable, they stand back to back. */
function facesOfFlag(cell: Cell): Cell[] {
  const widthMm = (cell.widthMm - FLAG_WRAP_MM) / 2
  return [
    { ...cell, widthMm },
    { ...cell, xMm: cell.xMm + widthMm + FLAG_WRAP_MM, widthMm },
  ]
}
