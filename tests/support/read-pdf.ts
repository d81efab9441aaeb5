/** Reads a PDF as a printer and a phone would: Debian's poppler-utils and zbar-tools. */
import { execFile } from 'node:child_process'
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'

const run = promisify(execFile)

export interface PdfWord {
  readonly text: string
  /** In millimetres from the upper left corner of the page. */
  readonly leftMm: number
  readonly topMm: number
  readonly rightMm: number
  readonly bottomMm: number
}

export interface PdfPage {
  readonly widthMm: number
  readonly heightMm: number
  /** What the codes of the page say, sorted. */
  readonly codes: readonly string[]
  readonly words: readonly PdfWord[]
}

/** The reader overlooks one code in some hundred on a full page, at one resolution this, at another that one. */
const RESOLUTIONS_DPI = [200, 250, 400]

/** Every page with its words, and its codes decoded from a picture of the whole page until `codes` of them are found. */
export async function readPdf(pdf: Buffer, codes: number): Promise<PdfPage[]> {
  return inFolder(pdf, async (file, folder) => {
    const texts = await readWords(file)
    const readings: string[][][] = []
    for (const dpi of RESOLUTIONS_DPI) {
      readings.push(await decodePages(file, folder, dpi))
      const pages = texts.map((page, index) => ({ ...page, codes: most(readings, index) }))
      if (pages.flatMap((page) => page.codes).length >= codes || dpi === RESOLUTIONS_DPI.at(-1)) return pages
    }
    return []
  })
}

/** Every page with its words only: quicker. */
export async function readPdfWords(pdf: Buffer): Promise<Omit<PdfPage, 'codes'>[]> {
  return inFolder(pdf, readWords)
}

async function inFolder<T>(pdf: Buffer, work: (file: string, folder: string) => Promise<T>): Promise<T> {
  const folder = mkdtempSync(join(tmpdir(), 'halyard-pdf-'))
  try {
    const file = join(folder, 'tags.pdf')
    writeFileSync(file, pdf)
    return await work(file, folder)
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

async function decodePages(file: string, folder: string, dpi: number): Promise<string[][]> {
  const prefix = `at-${dpi}`
  await run('pdftoppm', ['-r', String(dpi), '-gray', '-png', file, join(folder, prefix)])
  const pictures = readdirSync(folder).filter((name) => name.startsWith(prefix))
  return Promise.all(pictures.sort().map((picture) => decode(join(folder, picture))))
}

/** The codes of a page, each as often as the reading that saw it most often. */
function most(readings: readonly string[][][], page: number): string[] {
  const count = (codes: readonly string[], code: string) => codes.filter((other) => other === code).length
  const ofPage = readings.map((pages) => pages[page] ?? [])
  const all = [...new Set(ofPage.flat())].sort()
  return all.flatMap((code) =>
    Array<string>(Math.max(...ofPage.map((codes) => count(codes, code)))).fill(code),
  )
}

async function decode(picture: string): Promise<string[]> {
  const args = ['--raw', '--quiet', '-Sdisable', '-Sqrcode.enable', picture]
  const { stdout } = await run('zbarimg', args).catch(nothingFound)
  return stdout.split('\n').filter((line) => line !== '')
}

/** Exit code 4 says that the picture holds no code. */
function nothingFound(error: unknown): { stdout: string } {
  if ((error as { code?: number }).code === 4) return { stdout: '' }
  throw error
}

const MM_PER_POINT = 25.4 / 72

async function readWords(file: string): Promise<Omit<PdfPage, 'codes'>[]> {
  const { stdout } = await run('pdftotext', ['-bbox', file, '-'])
  return stdout
    .split('<page ')
    .slice(1)
    .map((page) => {
      const [widthMm = 0, heightMm = 0] = millimetres(page, /width="([\d.]+)" height="([\d.]+)"/)
      const words = [...page.matchAll(/<word ([^>]+)>(.*?)<\/word>/g)].map(([, box = '', text = '']) => {
        const pattern = /xMin="([-\d.]+)" yMin="([-\d.]+)" xMax="([-\d.]+)" yMax="([-\d.]+)"/
        const [leftMm = 0, topMm = 0, rightMm = 0, bottomMm = 0] = millimetres(box, pattern)
        return { text, leftMm, topMm, rightMm, bottomMm }
      })
      return { widthMm, heightMm, words }
    })
}

function millimetres(text: string, pattern: RegExp): number[] {
  return (pattern.exec(text) ?? []).slice(1).map((value) => Number(value) * MM_PER_POINT)
}
