/** Where the parts of one printed face lie, in millimetres from its upper left corner. Pure geometry. */
import { QUIET_ZONE_MODULES } from '#shared/engine/qr-label.ts'
import { SMALLEST_MODULE_MM, stepsDown } from './printer-steps.ts'

export interface Box {
  readonly xMm: number
  readonly yMm: number
  readonly widthMm: number
  readonly heightMm: number
  readonly align: 'left' | 'center'
}

export interface FaceLayout {
  /** The corner of the quiet zone, and the side of one module. */
  readonly code: { readonly xMm: number; readonly yMm: number; readonly moduleMm: number }
  readonly designation: Box
  readonly tag: Box
  /** What the thing is, and whom to send it to; absent where there is no room. */
  readonly kind?: Box
  readonly address?: Box
}

interface Face {
  readonly widthMm: number
  readonly heightMm: number
  /** Modules along a side of the code, without the quiet zone. */
  readonly modules: number
  readonly largestModuleMm: number
}

/** Wider than this many heights: the text stands beside the code, else below it. A roomy face may be wider. */
const WIDE = 1.25
const WIDE_AND_ROOMY = 1.6
const ROOMY_MM = 50
const TAG_HEIGHT = 0.16
/** Most of a wide face's width, and of a tall one's height, that its code takes. */
const CODE_SHARE = 0.55
const TALL_CODE_SHARE = 0.64

/**
 * The layout of a face, or undefined when it has no room for modules of 0.5 mm, which a phone reads at arm's length.
 * Beside the code where the face is wide, below where it is tall; the tag stands under the code if that fits.
 */
export function faceLayout(face: Face): FaceLayout | undefined {
  const padMm = Math.min(3, Math.max(1, Math.min(face.widthMm, face.heightMm) * 0.045))
  const room = { ...face, widthMm: face.widthMm - 2 * padMm, heightMm: face.heightMm - 2 * padMm }
  const wide = face.heightMm >= ROOMY_MM ? WIDE_AND_ROOMY : WIDE
  const layout = face.widthMm > wide * face.heightMm ? beside(room) : below(room)
  return layout && moved(layout, padMm)
}

const sideModules = ({ modules }: Face) => modules + 2 * QUIET_ZONE_MODULES

function moduleFor(face: Face, sideMm: number): number {
  return stepsDown(Math.min(face.largestModuleMm, sideMm / sideModules(face)))
}

function beside(face: Face): FaceLayout | undefined {
  const { widthMm, heightMm } = face
  const tagMm = Math.max(3.6, heightMm * TAG_HEIGHT)
  const underMm = moduleFor(face, Math.min(heightMm - tagMm, widthMm * CODE_SHARE))
  const under = underMm >= SMALLEST_MODULE_MM - 1e-9
  const moduleMm = under ? underMm : moduleFor(face, Math.min(heightMm, widthMm * CODE_SHARE))
  if (moduleMm < SMALLEST_MODULE_MM - 1e-9) return undefined
  const sideMm = sideModules(face) * moduleMm
  const blockMm = under ? sideMm + tagMm : sideMm
  const topMm = (heightMm - blockMm) / 2
  const quietMm = QUIET_ZONE_MODULES * moduleMm
  const column = {
    xMm: sideMm,
    yMm: topMm + quietMm,
    widthMm: widthMm - sideMm,
    heightMm: blockMm - quietMm - (under ? 0 : quietMm),
  }
  const code = { xMm: 0, yMm: topMm, moduleMm }
  if (!under) return { code, ...columnWithTag(column) }
  const tag = {
    xMm: quietMm,
    yMm: topMm + sideMm,
    widthMm: sideMm - 2 * quietMm,
    heightMm: tagMm,
    align: 'center' as const,
  }
  return { code, tag, ...columnWithoutTag(column) }
}

type Column = Omit<Box, 'align'>

function columnWithoutTag(column: Column): Omit<FaceLayout, 'code' | 'tag'> {
  const [designation, kind, address] = split(column, [0.5, 0.16, 0.34])
  return { designation: designation!, kind: kind!, address: address! }
}

function columnWithTag(column: Column): Omit<FaceLayout, 'code'> {
  const [designation, tag, address] = split(column, [0.44, 0.24, 0.32])
  return { designation: designation!, tag: tag!, address: address! }
}

/** Parts of a column from top to bottom with a little air between them. */
function split({ xMm, yMm, widthMm, heightMm }: Column, shares: readonly number[]): Box[] {
  let topMm = yMm
  return shares.map((share) => {
    const box = { xMm, yMm: topMm, widthMm, heightMm: heightMm * share * 0.86, align: 'left' as const }
    topMm += heightMm * share
    return box
  })
}

function below(face: Face): FaceLayout | undefined {
  const { widthMm, heightMm } = face
  const moduleMm = moduleFor(face, Math.min(widthMm, heightMm * TALL_CODE_SHARE))
  if (moduleMm < SMALLEST_MODULE_MM - 1e-9) return undefined
  const sideMm = sideModules(face) * moduleMm
  const textMm = Math.min(heightMm - sideMm, sideMm * 0.9)
  const topMm = (heightMm - sideMm - textMm) / 2
  const part = (from: number, to: number): Box => ({
    xMm: 0,
    yMm: topMm + sideMm + textMm * from,
    widthMm,
    heightMm: textMm * (to - from),
    align: 'center',
  })
  const code = { xMm: (widthMm - sideMm) / 2, yMm: topMm, moduleMm }
  return { code, ...textBelow(part, textMm) }
}

/** The parts under the code, as far as there is room for them to be read. */
function textBelow(part: (from: number, to: number) => Box, textMm: number): Omit<FaceLayout, 'code'> {
  if (textMm < 12) return { tag: part(0, 0.36), designation: part(0.46, 1) }
  if (textMm < 20) return { tag: part(0, 0.2), designation: part(0.28, 0.68), address: part(0.76, 1) }
  return { tag: part(0, 0.18), designation: part(0.26, 0.63), kind: part(0.7, 0.81), address: part(0.86, 1) }
}

function moved(layout: FaceLayout, byMm: number): FaceLayout {
  const box = <B extends { xMm: number; yMm: number }>(part: B): B => ({
    ...part,
    xMm: part.xMm + byMm,
    yMm: part.yMm + byMm,
  })
  return {
    code: box(layout.code),
    designation: box(layout.designation),
    tag: box(layout.tag),
    ...(layout.kind && { kind: box(layout.kind) }),
    ...(layout.address && { address: box(layout.address) }),
  }
}
