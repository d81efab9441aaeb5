import type PDFDocument from 'pdfkit'
import { runsOf, type Weight } from './fonts.ts'
import { CAP_HEIGHT, LINE_HEIGHT, type Fitted, type Measure } from './fit-text.ts'

type Doc = InstanceType<typeof PDFDocument>

export const POINTS_PER_MM = 72 / 25.4
export const points = (mm: number) => mm * POINTS_PER_MM

/** In points from the upper left corner of the page. */
export interface Area {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
  readonly align: 'left' | 'center'
}

interface Style {
  readonly weight: Weight
  /** Between two characters, in sizes. */
  readonly spacing?: number
  readonly stand: 'top' | 'middle' | 'bottom'
}

const EXACT = { lineBreak: false, baseline: 'alphabetic' } as const

/** Draws text at exact places: no paragraphs, no page breaks. */
export class Pen {
  /** Widths at size 1: address and kinds stand on every label, and measuring costs more than drawing. */
  readonly #widths: Readonly<Record<Weight, Map<string, number>>> = { regular: new Map(), bold: new Map() }

  constructor(readonly doc: Doc) {}

  /** Widths at size 1, for fitting. */
  measure(weight: Weight, spacing = 0): Measure {
    return (text) => this.#width(text, weight) + spacing * text.length
  }

  #width(text: string, weight: Weight): number {
    const known = this.#widths[weight].get(text)
    if (known !== undefined) return known
    const widths = runsOf(text, weight).map(
      (run) => this.doc.font(run.font).fontSize(1000).widthOfString(run.text) / 1000,
    )
    const width = widths.reduce((sum, part) => sum + part, 0)
    this.#widths[weight].set(text, width)
    return width
  }

  /** Lines that were fitted into an area, the height of their capitals standing in it as asked. */
  write({ lines, size }: Fitted, area: Area, { weight, spacing = 0, stand }: Style): void {
    const height = size * (CAP_HEIGHT + LINE_HEIGHT * (lines.length - 1))
    const spare = area.height - height
    const top = area.y + (stand === 'top' ? 0 : stand === 'middle' ? spare / 2 : spare)
    const measure = this.measure(weight, spacing)
    for (const [index, line] of lines.entries()) {
      const width = (measure(line) - spacing) * size
      const x = area.align === 'center' ? area.x + (area.width - width) / 2 : area.x
      const baseline = top + size * (CAP_HEIGHT + LINE_HEIGHT * index)
      this.#line(line, { x, baseline, size, weight, spacing })
    }
  }

  #line(
    text: string,
    {
      x,
      baseline,
      size,
      weight,
      spacing,
    }: { x: number; baseline: number; size: number; weight: Weight; spacing: number },
  ): void {
    let left = x
    const runs = runsOf(text, weight)
    for (const [index, run] of runs.entries()) {
      // With a width given, the library does not measure once more what was measured for fitting.
      const options = { ...EXACT, characterSpacing: spacing * size, textWidth: 0 }
      this.doc.font(run.font).fontSize(size).text(run.text, left, baseline, options)
      if (index < runs.length - 1) left += this.doc.widthOfString(run.text, options)
    }
  }
}
