import type { Sharp } from 'sharp'
import { MAX_PIXELS } from '#shared/contracts/attachments.ts'
import { AppError } from '../../errors.ts'
import { WorkGate } from '../work-gate.ts'
import { fileFault, otherKind, type CheckedFile } from './checked-file.ts'

/** The longer side of what is kept: enough to read a label by, and a page can carry it. */
const LONGEST_SIDE = 2560
const QUALITY = 82
const DECODE_SECONDS = 10

/** One picture at a time leaves a core to everything else (promise P26: decoding stalls no request). */
const gate = new WorkGate({
  atOnce: 1,
  longestQueue: 16,
  longestWaitMs: 10_000,
  busy: 'Many pictures are coming in just now. Try again in a moment.',
})

/**
 * Decodes a JPEG, PNG or WebP and writes it anew as a JPEG: turned upright, scaled, and without anything that the
 * camera wrote beside the picture, such as where it was taken.
 */
export async function cleanPhoto(bytes: Buffer): Promise<CheckedFile> {
  if (!isPicture(bytes)) throw otherKind('This is not a JPEG, PNG or WebP picture.')
  const content = await gate.run(() => redrawn(bytes))
  return { content, mediaType: 'image/jpeg' }
}

function isPicture(bytes: Buffer): boolean {
  const head = bytes.subarray(0, 12).toString('latin1')
  return (
    head.startsWith('\xff\xd8\xff') ||
    head.startsWith('\x89PNG\r\n\x1a\n') ||
    (head.startsWith('RIFF') && head.endsWith('WEBP'))
  )
}

async function redrawn(bytes: Buffer): Promise<Buffer> {
  const open = await picturesOnly()
  try {
    return await open(bytes)
      .timeout({ seconds: DECODE_SECONDS })
      .autoOrient()
      .resize({ width: LONGEST_SIDE, height: LONGEST_SIDE, fit: 'inside', withoutEnlargement: true })
      .flatten({ background: '#ffffff' })
      .toColourspace('srgb')
      .jpeg({ quality: QUALITY })
      .toBuffer()
  } catch (error) {
    throw refused(error)
  }
}

let opening: Promise<(bytes: Buffer) => Sharp> | undefined

/** Loaded with the first picture. Of all that libvips can open, only the three decoders are left switched on. */
function picturesOnly(): Promise<(bytes: Buffer) => Sharp> {
  opening ??= import('sharp').then(({ default: sharp }) => {
    sharp.cache(false)
    sharp.concurrency(1)
    sharp.block({ operation: ['VipsForeignLoad'] })
    sharp.unblock({
      operation: ['VipsForeignLoadJpegBuffer', 'VipsForeignLoadPngBuffer', 'VipsForeignLoadWebpBuffer'],
    })
    return (bytes) =>
      sharp(bytes, { limitInputPixels: MAX_PIXELS, failOn: 'error', sequentialRead: true, pages: 1 })
  })
  return opening
}

function refused(error: unknown): AppError {
  const message = error instanceof Error ? error.message : ''
  if (/pixel limit/i.test(message))
    return fileFault(`The picture has more than ${MAX_PIXELS / 1e6} megapixels.`)
  if (/timeout/i.test(message)) return fileFault('The picture takes too long to decode.')
  return fileFault('The picture is damaged or of a kind that is not taken: take it again or save it as JPEG.')
}
