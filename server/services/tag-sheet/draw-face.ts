import type { Cell } from '#shared/engine/tag-layout.ts'
import { QUIET_ZONE_MODULES } from '#shared/engine/qr-label.ts'
import { fitName, fitWords } from './fit-text.ts'
import type { Box, FaceLayout } from './face-layout.ts'
import { Pen, points, type Area } from './pen.ts'
import { nearestStep } from './printer-steps.ts'

/** What stands on a printed tag: never anything about a person. */
export interface Label {
  readonly designation: string
  readonly tag: string
  /** "Transformer", or the kind of a kit. */
  readonly kind: string
}

export interface Face {
  readonly label: Label
  /** The code's path, of `qrPath`. */
  readonly path: string
  /** The group's return address line. */
  readonly address: string
}

/** Letters of a tag stand apart, so that nobody reads two as one. */
const TAG_SPACING = 0.06
const LARGEST_DESIGNATION_PT = 64

/** Draws one face of a tag into its cell of the page. */
export function drawFace(pen: Pen, cell: Cell, layout: FaceLayout, { label, path, address }: Face): void {
  drawCode(pen, cell, layout, path)
  const { designation, tag, kind, address: foot } = layout
  writeName(pen, label.designation, areaOf(cell, designation))
  writeTag(pen, label.tag, areaOf(cell, tag))
  if (kind) writeKind(pen, label.kind, areaOf(cell, kind))
  if (foot) writeAddress(pen, address, areaOf(cell, foot))
}

/** One matrix, one path, one fill: the page's y axis points down already, so rows go down too. */
function drawCode(pen: Pen, cell: Cell, { code }: FaceLayout, path: string): void {
  const module = points(code.moduleMm)
  const quietMm = QUIET_ZONE_MODULES * code.moduleMm
  const x = points(nearestStep(cell.xMm + code.xMm + quietMm))
  const y = points(nearestStep(cell.yMm + code.yMm + quietMm))
  const matrix = [module, 0, 0, module, x, y].map((value) => Number(value.toFixed(3))).join(' ')
  pen.doc.addContent(`q ${matrix} cm\n${path}\nf Q`)
}

function areaOf(cell: Cell, box: Box): Area {
  return {
    x: points(cell.xMm + box.xMm),
    y: points(cell.yMm + box.yMm),
    width: points(box.widthMm),
    height: points(box.heightMm),
    align: box.align,
  }
}

function writeName(pen: Pen, text: string, area: Area): void {
  const room = { width: area.width, height: area.height, largest: LARGEST_DESIGNATION_PT, lines: 3 }
  const stand = area.align === 'center' ? 'middle' : 'top'
  pen.write(fitName(text, room, pen.measure('bold')), area, { weight: 'bold', stand })
}

function writeTag(pen: Pen, text: string, area: Area): void {
  const room = { width: area.width, height: area.height, largest: 32, lines: 1 }
  const fitted = fitName(text, room, pen.measure('bold', TAG_SPACING))
  pen.write(fitted, area, { weight: 'bold', spacing: TAG_SPACING, stand: 'bottom' })
}

function writeKind(pen: Pen, text: string, area: Area): void {
  const largest = Math.min(16, Math.max(6, area.height * 0.75))
  const room = { width: area.width, height: area.height, largest, lines: 2, smallest: 4.5 }
  pen.write(fitWords(text, room, pen.measure('regular')), area, { weight: 'regular', stand: 'middle' })
}

function writeAddress(pen: Pen, text: string, area: Area): void {
  const largest = Math.min(10, Math.max(5, area.height * 0.28))
  const room = { width: area.width, height: area.height, largest, lines: 4, smallest: 4 }
  pen.write(fitWords(text, room, pen.measure('regular')), area, { weight: 'regular', stand: 'bottom' })
}
