import type PDFDocument from 'pdfkit'
import { setImmediate } from 'node:timers/promises'
import { tagAddress } from '#shared/engine/tag-address.ts'
import type { Cell } from '#shared/engine/tag-layout.ts'
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

/** So many faces are drawn before other requests get their turn: some milliseconds of work. */
const FACES_AT_ONCE = 12

/** Read with the first sheet: a start need not wait for it. */
const pdfLibrary = () => import('pdfkit')

/** The PDF. A thousand labels take about half a second of work, of which nobody waits for more than a few faces. */
export async function renderTags(print: Print): Promise<Buffer> {
  const { labels, format, now } = print
  const size = [points(format.pageWidthMm), points(format.pageHeightMm)]
  const { default: Document } = await pdfLibrary()
  const doc = new Document({
    size,
    margin: 0,
    autoFirstPage: false,
    lang: 'en',
    displayTitle: true,
    info: { Title: 'Tags', Creator: 'Halyard', Producer: 'Halyard', CreationDate: now },
  })
  const finished = collect(doc)
  const pen = new Pen(doc)
  let faces = 0
  for (const { firstCell, labels: onPage } of pagesOf(labels, format)) {
    doc.addPage()
    if (format.marks.crop) drawCropMarks(pen, format.marks.crop)
    for (const [index, label] of onPage.entries()) {
      faces += drawLabel(pen, format.cell(firstCell + index), label, print)
      if (faces < FACES_AT_ONCE) continue
      faces = 0
      await setImmediate()
    }
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

/** Draws one label and returns how many faces it has. */
function drawLabel(pen: Pen, cell: Cell, label: Label, { format, publicUrl, address }: Print): number {
  const path = qrPath(tagAddress(publicUrl, label.tag), format.qr)
  const faces = format.faces(cell)
  for (const face of faces) drawFace(pen, face, format.layout, { label, path, address })
  if (format.marks.fold) drawFoldMarks(pen, cell)
  return faces.length
}

function collect(doc: InstanceType<typeof PDFDocument>): Promise<Buffer> {
  const chunks: Buffer[] = []
  return new Promise((resolve, reject) => {
    doc.on('data', (chunk: Buffer) => chunks.push(chunk))
    doc.on('end', () => resolve(Buffer.concat(chunks)))
    doc.on('error', reject)
  })
}
