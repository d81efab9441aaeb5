/** A thousand tags as a PDF, beside the bare loop that draws as many codes and two lines of text (performance P1). */
import { monitorEventLoopDelay } from 'node:perf_hooks'
import PDFDocument from 'pdfkit'
import { create } from 'qrcode'
import { isFailure } from '#shared/engine/outcome.ts'
import { nextTag } from '#shared/engine/tag.ts'
import { tagAddress } from '#shared/engine/tag-address.ts'
import type { Label } from '#server/services/tag-sheet/draw-face.ts'
import { printFormat } from '#server/services/tag-sheet/print-format.ts'
import { renderTags } from '#server/services/tag-sheet/render-tags.ts'

const LABELS = 1000
const PUBLIC_URL = 'https://kits.example.org'
const ADDRESS = 'If found: Alder Reach Auxiliary Radio Group, Station 4, Pell Harbor'

export interface TagSheetRound {
  readonly labels: number
  readonly floorMs: number
  readonly ms: number
  readonly bytes: number
  /** Longest time in which nothing else got its turn, ms. */
  readonly blockMs: number
}

/** One round of both, the floor first or last by turns; run several and take medians of the ratios. */
export async function measureTagSheet(round: number): Promise<TagSheetRound> {
  const labels = labelsOf(LABELS)
  const steps = [() => timed(() => floor(labels)), () => timed(() => product(labels))]
  const first = await steps[round % 2]!()
  const second = await steps[(round + 1) % 2]!()
  const [bare, own] = round % 2 === 0 ? [first, second] : [second, first]
  return {
    labels: LABELS,
    floorMs: bare.ms,
    ms: own.ms,
    bytes: own.bytes,
    blockMs: own.blockMs,
  }
}

function product(labels: readonly Label[]): Promise<Buffer> {
  const format = { kind: 'sheet', paper: 'a4', size: 'item', startCell: 1, cropMarks: true } as const
  const plan = printFormat(format, PUBLIC_URL)
  return renderTags({ labels, format: plan, publicUrl: PUBLIC_URL, address: ADDRESS, now: new Date(0) })
}

async function floor(labels: readonly Label[]): Promise<Buffer> {
  const doc = new PDFDocument({ size: 'A4', margin: 0, autoFirstPage: false })
  const chunks: Buffer[] = []
  const end = new Promise((resolve) => doc.on('end', resolve))
  doc.on('data', (chunk: Buffer) => chunks.push(chunk))
  for (const [index, label] of labels.entries()) {
    const cell = index % 24
    if (cell === 0) doc.addPage()
    const [x, y] = [20 + (cell % 3) * 190, 30 + Math.floor(cell / 3) * 96]
    doc.addContent(`q 1.8 0 0 1.8 ${x} ${y} cm\n${runs(tagAddress(PUBLIC_URL, label.tag))}\nf Q`)
    doc
      .font('Helvetica-Bold')
      .fontSize(16)
      .text(label.designation, x + 62, y, { lineBreak: false })
    doc.fontSize(10).text(label.tag, x, y + 60, { lineBreak: false })
  }
  doc.end()
  await end
  return Buffer.concat(chunks)
}

function runs(text: string): string {
  const { modules } = create(text, { errorCorrectionLevel: 'Q' })
  let path = ''
  for (let row = 0; row < modules.size; row += 1) {
    for (let from = 0; from < modules.size; from += 1) {
      if (!modules.get(row, from)) continue
      let to = from + 1
      while (to < modules.size && modules.get(row, to)) to += 1
      path += `${from} ${row} ${to - from} 1 re\n`
      from = to
    }
  }
  return path
}

interface Timing {
  readonly ms: number
  readonly bytes: number
  readonly blockMs: number
}

async function timed(work: () => Promise<Buffer>): Promise<Timing> {
  const delay = monitorEventLoopDelay({ resolution: 1 })
  delay.enable()
  const startedAt = performance.now()
  const pdf = await work()
  const ms = performance.now() - startedAt
  delay.disable()
  return { ms, bytes: pdf.length, blockMs: delay.max / 1e6 }
}

function labelsOf(count: number): Label[] {
  const labels: Label[] = []
  for (let serial = 0; labels.length < count;) {
    const next = nextTag('XF', serial)
    if (isFailure(next)) throw new Error(next.message)
    serial = next.serial + 1
    const designation = `XFM-${String(labels.length + 1).padStart(3, '0')}`
    labels.push({ designation, tag: next.tag, kind: 'Transformer' })
  }
  return labels
}
