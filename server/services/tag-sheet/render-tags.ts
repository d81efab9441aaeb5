import PDFDocument from 'pdfkit'
import { setImmediate } from 'node:timers/promises'
import { tagAddress } from '#shared/engine/tag-address.ts'
import { drawFace, type Label } from './draw-face.ts'
import { drawCropMarks, drawFoldMarks } from './draw-marks.ts'
import { Pen, points } from './pen.ts'
import type { PrintFormat } from './print-format.ts'
import { qrPath } from './qr-path.ts'

interface Print {
  readonly labels: readonly Label[]
  readonly format: PrintFormat
  readonly publicUrl: string
  /** The group's return address line. */
  readonly address: string
  readonly now: Date
}

/** A single-label page is small: so many of them are drawn before others get their turn. */
const ROLL_PAGES_AT_ONCE = 12

/** The PDF. Others get their turn after each page: a thousand labels take a third of a second in all. */
export async function renderTags(print: Print): Promise<Buffer> {
  const { labels, format, now } = print
  const size = [points(format.pageWidthMm), points(format.pageHeightMm)]
  const doc = new PDFDocument({
    size,
    margin: 0,
    autoFirstPage: false,
    lang: 'en',
    displayTitle: true,
    info: { Title: 'Tags', Creator: 'Halyard', Producer: 'Halyard', CreationDate: now },
  })
  const finished = collect(doc)
  const pen = new Pen(doc)
  const pages = pagesOf(labels, format)
  for (const [index, page] of pages.entries()) {
    doc.addPage()
    drawPage(pen, page, print)
    if (format.cellsPerPage > 1 || index % ROLL_PAGES_AT_ONCE === 0) await setImmediate()
  }
  doc.end()
  return finished
}

interface Page {
  readonly firstCell: number
  readonly labels: readonly Label[]
}

function pagesOf(labels: readonly Label[], { cellsPerPage, skip }: PrintFormat): Page[] {
  const pages: Page[] = [{ firstCell: skip, labels: labels.slice(0, cellsPerPage - skip) }]
  for (let from = cellsPerPage - skip; from < labels.length; from += cellsPerPage) {
    pages.push({ firstCell: 0, labels: labels.slice(from, from + cellsPerPage) })
  }
  return pages
}

function drawPage(pen: Pen, { firstCell, labels }: Page, { format, publicUrl, address }: Print): void {
  if (format.marks.crop) drawCropMarks(pen, format.marks.crop)
  for (const [index, label] of labels.entries()) {
    const cell = format.cell(firstCell + index)
    const path = qrPath(tagAddress(publicUrl, label.tag), format.qr)
    for (const face of format.faces(cell)) drawFace(pen, face, format.layout, { label, path, address })
    if (format.marks.fold) drawFoldMarks(pen, cell)
  }
}

function collect(doc: InstanceType<typeof PDFDocument>): Promise<Buffer> {
  const chunks: Buffer[] = []
  return new Promise((resolve, reject) => {
    doc.on('data', (chunk: Buffer) => chunks.push(chunk))
    doc.on('end', () => resolve(Buffer.concat(chunks)))
    doc.on('error', reject)
  })
}
