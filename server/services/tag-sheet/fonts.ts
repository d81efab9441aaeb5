/**
 * Which font draws which characters. Helvetica needs no embedding but knows the Windows Latin alphabet only; anything
 * else is drawn in Inter, split by the subsets it is shipped in. What no subset has becomes a question mark.
 */
import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'

export type Weight = 'regular' | 'bold'

/** A stretch of text in one font: the name of a standard font or the path of a font file. */
export interface Run {
  readonly font: string
  readonly text: string
}

const STANDARD: Readonly<Record<Weight, string>> = { regular: 'Helvetica', bold: 'Helvetica-Bold' }
const WIN_ANSI = /^[\u0020-\u007E\u00A0-\u00FF€‚ƒ„…†‡ˆ‰Š‹ŒŽ‘’“”•–—˜™š›œžŸ]*$/
const FILE_WEIGHTS: Readonly<Record<Weight, number>> = { regular: 400, bold: 700 }
const UNKNOWN = '?'

/** The text as runs, each in a font that has all its characters. */
export function runsOf(text: string, weight: Weight): Run[] {
  if (WIN_ANSI.test(text)) return [{ font: STANDARD[weight], text }]
  const runs: { font: string; text: string }[] = []
  for (const grapheme of graphemes(text)) {
    const subset = subsetOf(grapheme)
    const font = fontFile(subset ?? 'latin', weight)
    const drawn = subset ? grapheme : UNKNOWN
    const last = runs.at(-1)
    if (last?.font === font) last.text += drawn
    else runs.push({ font, text: drawn })
  }
  return runs
}

/** Each of these is a character of its own: no need to ask the segmenter, which takes its time. */
const PLAIN = /^[\u0020-\u007E]*$/
const segmenter = new Intl.Segmenter('en', { granularity: 'grapheme' })

/** The characters as people count them: a letter with its accents is one. */
export function graphemes(text: string): string[] {
  if (PLAIN.test(text)) return [...text]
  return Array.from(segmenter.segment(text), ({ segment }) => segment)
}

type Range = readonly [from: number, to: number]

const require = createRequire(import.meta.url)

function fontFile(subset: string, weight: Weight): string {
  return require.resolve(`@fontsource/inter/files/inter-${subset}-${FILE_WEIGHTS[weight]}-normal.woff`)
}

/** The plainest subset that has all code points of a character. */
function subsetOf(grapheme: string): string | undefined {
  const points = Array.from(grapheme, (character) => character.codePointAt(0) ?? 0)
  return subsets().find(([, ranges]) => points.every((point) => isIn(ranges, point)))?.[0]
}

const isIn = (ranges: readonly Range[], point: number) =>
  ranges.some(([from, to]) => point >= from && point <= to)

let known: readonly (readonly [subset: string, ranges: readonly Range[]])[] | undefined

/** Read at the first text that needs it; the font's own table of subsets, plainest first. */
function subsets() {
  if (known) return known
  const file = new URL('unicode.json', `file://${require.resolve('@fontsource/inter/LICENSE')}`)
  const table = JSON.parse(readFileSync(file, 'utf8')) as Record<string, string>
  const order = ['latin', 'latin-ext', 'vietnamese', 'cyrillic', 'greek', 'cyrillic-ext', 'greek-ext']
  known = order.map((subset) => [subset, rangesOf(table[subset] ?? '')] as const)
  return known
}

/** "U+0100-02BA,U+2113" as pairs of numbers. */
function rangesOf(list: string): Range[] {
  return [...list.matchAll(/U\+([0-9A-F]+)(?:-([0-9A-F]+))?/gi)].map(([, from = '0', to]) => [
    Number.parseInt(from, 16),
    Number.parseInt(to ?? from, 16),
  ])
}
