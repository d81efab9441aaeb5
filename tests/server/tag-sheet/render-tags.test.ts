import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { nextTag } from '#shared/engine/tag.ts'
import { cellAt, cellsPerSheet, PAPERS, TAG_SHEETS, TAG_SIZES, type Cell } from '#shared/engine/tag-layout.ts'
import type { Label } from '#server/services/tag-sheet/draw-face.ts'
import { printFormat, type TagFormat } from '#server/services/tag-sheet/print-format.ts'
import { renderTags } from '#server/services/tag-sheet/render-tags.ts'
import { readPdf, readPdfWords, type PdfWord } from '../../support/read-pdf.ts'

const PUBLIC_URL = 'https://kits.example.org'
const ADDRESS = 'If found: Alder Reach Auxiliary Radio Group, Station 4, Pell Harbor, (555) 555-0142'
const NAMES = [
  'K-07',
  'XFM-10',
  'WWWWWWWWWWWWWWWWWWWWWWWW',
  'Feedline 12 spare (wet)',
  'Q',
  'Łódź-4 Привет',
  '電池😀-1',
  'e\u0301'.repeat(12),
  '&<b>"%s" \\(x) Tj',
  'iiiiiiiiiiiiiiiiiiiiiiii',
]

function labelsOf(count: number): Label[] {
  const labels: Label[] = []
  for (let serial = 0; labels.length < count;) {
    const next = nextTag('XF', serial)
    if (isFailure(next)) throw new Error(next.message)
    serial = next.serial + 1
    labels.push({ designation: NAMES[labels.length % NAMES.length]!, tag: next.tag, kind: 'Transformer' })
  }
  return labels
}

async function print(labels: readonly Label[], format: TagFormat, publicUrl = PUBLIC_URL): Promise<Buffer> {
  const now = new Date('2026-10-31T18:00:00Z')
  return renderTags({ labels, format: printFormat(format, publicUrl), publicUrl, address: ADDRESS, now })
}

const codesOf = (labels: readonly Label[]) =>
  labels.map((label) => `HTTPS://KITS.EXAMPLE.ORG/T/${label.tag}`).sort()

/** Half a millimetre for what a font's box holds beyond its letters. */
function isInside(word: PdfWord, cell: Cell): boolean {
  const air = 0.5
  return (
    word.leftMm >= cell.xMm - air &&
    word.rightMm <= cell.xMm + cell.widthMm + air &&
    word.topMm >= cell.yMm - air &&
    word.bottomMm <= cell.yMm + cell.heightMm + air
  )
}

const SHEETS = PAPERS.flatMap((paper) => TAG_SIZES.map((size) => ({ paper, size })))

describe('printed sheets', { timeout: 60_000 }, () => {
  it.each(SHEETS)(
    '$paper $size: every code decodes to its tag, from the first free cell on',
    async ({ paper, size }) => {
      const sheet = TAG_SHEETS[paper][size]
      const perPage = cellsPerSheet(sheet)
      const startCell = 3
      const labels = labelsOf(perPage + 1)
      const faces = size === 'flag' ? 2 : 1
      const pdf = await print(labels, { kind: 'sheet', paper, size, startCell, cropMarks: true })
      const pages = await readPdf(pdf, labels.length * faces)
      expect(pages).toHaveLength(2)
      const first = labels.slice(0, perPage - startCell + 1)
      const expected = [first, labels.slice(first.length)].map((part) =>
        codesOf(part.flatMap((label) => Array<Label>(faces).fill(label))),
      )
      expect(pages.map((page) => page.codes)).toEqual(expected)
      expect(pages[0]!.widthMm).toBeCloseTo(sheet.pageWidthMm, 1)
      expect(pages[0]!.heightMm).toBeCloseTo(sheet.pageHeightMm, 1)
    },
  )

  it.each(SHEETS)(
    '$paper $size: no word leaves its cell, whatever the designation',
    async ({ paper, size }) => {
      const sheet = TAG_SHEETS[paper][size]
      const labels = labelsOf(Math.min(cellsPerSheet(sheet), NAMES.length))
      const pdf = await print(labels, { kind: 'sheet', paper, size, startCell: 1, cropMarks: false })
      const [page] = await readPdfWords(pdf)
      const cells = labels.map((_, index) => cellAt(sheet, index))
      const outside = page!.words.filter((word) => !cells.some((cell) => isInside(word, cell)))
      expect(outside).toEqual([])
      for (const label of labels) expect(page!.words.map((word) => word.text)).toContain(label.tag)
    },
  )

  it('draws a short and a long name in the sizes their cells allow', async () => {
    const format = { kind: 'sheet', paper: 'a4', size: 'item', startCell: 1, cropMarks: false } as const
    const [page] = await readPdfWords(await print(labelsOf(3), format))
    const heightOf = (text: string) => {
      const word = page!.words.find((candidate) => candidate.text.startsWith(text))!
      return word.bottomMm - word.topMm
    }
    expect(heightOf('K-07')).toBeGreaterThan(12)
    expect(heightOf('WWWW')).toBeGreaterThan(2.5)
    expect(heightOf('XF222')).toBeGreaterThan(4)
  })
})

describe('label rolls', { timeout: 60_000 }, () => {
  it.each([
    [50, 30],
    [62, 29],
    [60, 25.4],
    [40, 60],
    [22, 33],
    [38, 22],
    [120, 80],
  ])('%s by %s mm: one label a page, each decoded, nothing over the edge', async (widthMm, heightMm) => {
    const labels = labelsOf(NAMES.length)
    const pages = await readPdf(await print(labels, { kind: 'roll', widthMm, heightMm }), labels.length)
    expect(pages.map((page) => page.codes)).toEqual(labels.map((label) => codesOf([label])))
    const cell = { xMm: 0, yMm: 0, widthMm, heightMm }
    expect(pages.flatMap((page) => page.words).filter((word) => !isInside(word, cell))).toEqual([])
  })

  it('refuses a label too small for its code and says what would do', async () => {
    expect(() => printFormat({ kind: 'roll', widthMm: 20, heightMm: 20 }, PUBLIC_URL)).toThrow(
      /20 by 20 mm has no room .*22 by 33 mm or 38 by 22 mm would do/,
    )
  })
})

describe('the address in the code', { timeout: 60_000 }, () => {
  it('keeps small letters below a path and decodes all the same', async () => {
    const labels = labelsOf(24)
    const publicUrl = 'https://example.org/some/halyard'
    const format = { kind: 'sheet', paper: 'a4', size: 'item', startCell: 1, cropMarks: false } as const
    const [page] = await readPdf(await print(labels, format, publicUrl), labels.length)
    expect(page!.codes).toEqual(labels.map((label) => `${publicUrl}/t/${label.tag}`).sort())
  })

  it('refuses a size that its code does not fit', () => {
    const long = `https://${'a'.repeat(70)}.example.org`
    const format = { kind: 'sheet', paper: 'letter', size: 'item', startCell: 1, cropMarks: false } as const
    expect(() => printFormat(format, long)).toThrow(/request-invalid|state-conflict/)
  })
})
