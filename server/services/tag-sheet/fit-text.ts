/** Makes text fit a box: as large as it may be, on one line or several, and cut only where nothing else helps. */
import { graphemes } from './fonts.ts'

export interface Room {
  /** All in points. */
  readonly width: number
  readonly height: number
  readonly largest: number
  readonly lines: number
}

export interface Fitted {
  readonly size: number
  readonly lines: readonly string[]
}

/** Width of a text at size 1. */
export type Measure = (text: string) => number

/** Distance of two baselines in sizes. */
export const LINE_HEIGHT = 1.12
/** Height of capitals in sizes, Helvetica and Inter alike. */
export const CAP_HEIGHT = 0.72
/** How far a Q or a bracket hangs below the baseline, in sizes. */
const DESCENT = 0.22

/** A short name, broken between any two characters if that makes it larger; after a hyphen or space for choice. */
export function fitName(text: string, room: Room, measure: Measure): Fitted {
  const single = { lines: [text], size: sizeOf([text], room, measure) }
  const byHeight = room.height / heightOf([text])
  if (single.size >= Math.min(room.largest, byHeight) * 0.6) return single
  const pieces = graphemes(text).map((piece) => ({ piece, width: measure(piece) }))
  const options: Fitted[] = [single]
  for (let count = 2; count <= Math.min(room.lines, pieces.length); count += 1) {
    const lines = breakEvenly(pieces, count)
    options.push({ lines, size: sizeOf(lines, room, measure) })
  }
  // A further line must be worth it.
  return options.reduce((best, option) => (option.size > best.size * 1.15 ? option : best))
}

/** Words on as many lines as there is room for, not below `smallest`; what is left then ends in an ellipsis. */
export function fitWords(text: string, room: Room & { smallest: number }, measure: Measure): Fitted {
  for (let size = room.largest; size > room.smallest; size -= 0.5) {
    const lines = wrap(text, room.width / size, measure)
    if (lines.length <= room.lines && heightOf(lines) * size <= room.height) return { size, lines }
  }
  const size = room.smallest
  const fitting = Math.max(
    1,
    Math.min(room.lines, Math.floor((room.height / size - CAP_HEIGHT) / LINE_HEIGHT) + 1),
  )
  const lines = wrap(text, room.width / size, measure)
  if (lines.length <= fitting) return { size, lines }
  const kept = lines.slice(0, fitting)
  return { size, lines: [...kept.slice(0, -1), cut(`${kept.at(-1)}…`, room.width / size, measure)] }
}

/** From the top of the first capitals to what hangs below the last baseline. */
function heightOf(lines: readonly string[]): number {
  const hangs = /^[A-PR-Z0-9 .\-/]*$/.test(lines.at(-1) ?? '') ? 0 : DESCENT
  return CAP_HEIGHT + LINE_HEIGHT * (lines.length - 1) + hangs
}

function sizeOf(lines: readonly string[], room: Room, measure: Measure): number {
  const widest = Math.max(...lines.map(measure), 0.001)
  return Math.min(room.largest, room.width / widest, room.height / heightOf(lines))
}

interface Piece {
  readonly piece: string
  readonly width: number
}

const joined = (pieces: readonly Piece[]) =>
  pieces
    .map(({ piece }) => piece)
    .join('')
    .trim()
const widthOf = (pieces: readonly Piece[]) => pieces.reduce((sum, { width }) => sum + width, 0)

/** Splits into `count` lines of about the same width, moving a break to a hyphen or space that is near. */
function breakEvenly(pieces: readonly Piece[], count: number): string[] {
  const lines: string[] = []
  let rest = pieces
  for (let left = count; left > 1; left -= 1) {
    const at = bestBreak(rest, left)
    lines.push(joined(rest.slice(0, at)))
    rest = rest.slice(at)
  }
  return [...lines, joined(rest)]
}

/** Where the first of `count` lines ends. A break inside a word costs as much as a third of the rest. */
function bestBreak(pieces: readonly Piece[], count: number): number {
  const total = widthOf(pieces)
  let best = { at: 1, cost: Infinity }
  let width = 0
  for (let at = 1; at < pieces.length; at += 1) {
    const { piece, width: own } = pieces[at - 1]!
    width += own
    const off = Math.abs(width - total / count)
    const cost = /[\s\-/.]$/.test(piece) ? off : off + total / 3
    if (cost < best.cost) best = { at, cost }
  }
  return best.at
}

function wrap(text: string, width: number, measure: Measure): string[] {
  const lines: string[] = []
  for (const word of text.split(/[ \t\n]+/)) {
    const longer = lines.length > 0 ? `${lines.at(-1)} ${word}` : word
    if (lines.length > 0 && measure(longer) <= width) lines[lines.length - 1] = longer
    else lines.push(...chop(word, width, measure))
  }
  return lines
}

/** A word wider than the line, in pieces that fit. */
function chop(word: string, width: number, measure: Measure): string[] {
  if (measure(word) <= width) return [word]
  const lines: string[] = ['']
  for (const piece of graphemes(word)) {
    const longer = lines.at(-1) + piece
    if (lines.at(-1) === '' || measure(longer) <= width) lines[lines.length - 1] = longer
    else lines.push(piece)
  }
  return lines
}

function cut(text: string, width: number, measure: Measure): string {
  const pieces = graphemes(text.slice(0, -1))
  while (pieces.length > 0 && measure(`${pieces.join('')}…`) > width) pieces.pop()
  return `${pieces.join('').trimEnd()}…`
}
