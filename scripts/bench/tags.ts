import { monitorEventLoopDelay } from 'node:perf_hooks'
import PDFDocument from 'pdfkit'
import { create } from 'qrcode'
import { makeTag } from '#shared/engine/tag.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { tagAddress } from '#shared/engine/tag-address.ts'
import { printFormat } from '#server/services/tag-sheet/print-format.ts'
import { renderTags } from '#server/services/tag-sheet/render-tags.ts'
import { median, type BenchRow } from './report.ts'

const LABELS = 1000
const ROUNDS = 5
const PUBLIC_URL = 'https://kits.example.org'

/** P1: 1,000 item labels against the barest page that holds the same codes and two lines of text. */
export async function benchTags(): Promise<BenchRow[]> {
  const tags = someTags()
  const own: { ms: number; bytes: number; blockMs: number }[] = []
  const floors: number[] = []
  for (let round = 0; round < ROUNDS; round += 1) {
    floors.push(await floorMs(tags))
    own.push(await render(tags))
  }
  const ms = median(own.map((one) => one.ms))
  return [
    {
      id: 'P1',
      what: '1,000 labels',
      measured: `${ms.toFixed(0)} ms`,
      floor: `${median(floors).toFixed(0)} ms`,
      ratio: median(own.map((one, round) => one.ms / floors[round]!)),
      goal: '<= 1.5x vector_runs_raw',
    },
    {
      id: 'P1',
      what: 'a label',
      measured: `${Math.round(own[0]!.bytes / LABELS)} bytes`,
      floor: '',
      ratio: null,
      goal: '<= 400 bytes',
    },
    {
      id: 'P1',
      what: 'longest block',
      measured: `${median(own.map((one) => one.blockMs)).toFixed(0)} ms`,
      floor: '',
      ratio: null,
      goal: '<= 25 ms',
    },
  ]
}

function someTags(): string[] {
  const tags: string[] = []
  for (let serial = 1; tags.length < LABELS; serial += 1) {
    const tag = makeTag('XF', serial)
    if (typeof tag === 'string') tags.push(tag)
    else if (isFailure(tag)) throw new Error(tag.message)
  }
  return tags
}

async function render(tags: readonly string[]): Promise<{ ms: number; bytes: number; blockMs: number }> {
  const format = printFormat(
    { kind: 'sheet', paper: 'a4', size: 'item', startCell: 1, cropMarks: false },
    PUBLIC_URL,
  )
  const labels = tags.map((tag, place) => ({ designation: `XFM-${place}`, tag, kind: 'Transformer' }))
  const delay = monitorEventLoopDelay({ resolution: 1 })
  delay.enable()
  const began = performance.now()
  const address = 'Station 4, if found'
  const pdf = await renderTags({ labels, format, publicUrl: PUBLIC_URL, address, now: new Date(0) })
  const ms = performance.now() - began
  delay.disable()
  return { ms, bytes: pdf.length, blockMs: delay.max / 1e6 }
}

async function floorMs(tags: readonly string[]): Promise<number> {
  const began = performance.now()
  const doc = new PDFDocument({ size: 'A4', margin: 0, autoFirstPage: false })
  const finished = new Promise((resolve) => doc.on('end', resolve))
  doc.resume()
  for (const [place, tag] of tags.entries()) {
    if (place % 24 === 0) doc.addPage()
    doc.addContent(`q 1 0 0 1 ${(place % 3) * 190} ${(place % 8) * 100} cm`)
    doc.addContent(runsOf(tagAddress(PUBLIC_URL, tag)))
    doc.addContent('f Q')
    doc.fontSize(12).text(tag, 10, 10, { lineBreak: false })
    doc.text(`XFM-${place}`, 10, 30, { lineBreak: false })
  }
  doc.end()
  await finished
  return performance.now() - began
}

function runsOf(text: string): string {
  const { modules } = create(text, { errorCorrectionLevel: 'Q' })
  let path = ''
  for (let row = 0; row < modules.size; row += 1) {
    for (let from = 0; from < modules.size; from += 1) {
      if (!modules.get(row, from)) continue
      let to = from
      while (to < modules.size && modules.get(row, to)) to += 1
      path += `${from} ${row} ${to - from} 1 re\n`
      from = to
    }
  }
  return path
}
