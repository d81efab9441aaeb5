import { failure, type Outcome } from '../outcome.ts'

const CHUNK_BYTES = 8192

/**
 * Turns the bytes of a file into text for the reader, or refuses them: `TS_TOO_BIG` above `maxBytes`,
 * `TS_ENCODING` for a UTF-16 or UTF-32 mark. A UTF-8 mark is dropped.
 *
 * Each byte becomes one character. Touchstone data is ASCII and anything else may only stand in comments,
 * which are not kept, so decoding UTF-8 would buy nothing and a Latin-1 comment would be damaged by it.
 */
export function decodeText(source: string | Uint8Array, maxBytes: number): Outcome<{ text: string }> {
  if (typeof source !== 'string' && !(source instanceof Uint8Array)) {
    return failure('E_MISSING', 'There is no file to read.', { field: 'source' })
  }
  const bytes = typeof source === 'string' ? utf8Length(source) : source.length
  if (bytes > maxBytes) {
    const message = `The file has ${bytes} bytes: the limit is ${maxBytes} bytes (${maxBytes / 1_048_576} MiB).`
    return failure('TS_TOO_BIG', message, { field: 'maxBytes' })
  }
  return typeof source === 'string' ? checkMark(source) : decodeBytes(source)
}

function decodeBytes(source: Uint8Array): Outcome<{ text: string }> {
  const [first, second, third] = source
  if ((first === 0xff && second === 0xfe) || (first === 0xfe && second === 0xff)) return wideText()
  const start = first === 0xef && second === 0xbb && third === 0xbf ? 3 : 0
  let text = ''
  for (let at = start; at < source.length; at += CHUNK_BYTES) {
    text += Reflect.apply(String.fromCharCode, undefined, source.subarray(at, at + CHUNK_BYTES))
  }
  return { text }
}

function checkMark(source: string): Outcome<{ text: string }> {
  const first = source.charCodeAt(0)
  if (first === 0xfffe) return wideText()
  return { text: first === 0xfeff ? source.slice(1) : source }
}

function wideText(): Outcome<never> {
  const message = 'The file is UTF-16 or UTF-32 text: save it again as plain text (ASCII or UTF-8).'
  return failure('TS_ENCODING', message, { line: 1 })
}

/** Bytes the text takes in UTF-8; a half pair counts 3, as an encoder writes a replacement character. */
function utf8Length(text: string): number {
  let bytes = text.length
  for (let at = 0; at < text.length; at++) {
    const code = text.charCodeAt(at)
    if (code < 0x80) continue
    // A surrogate pair is two code units and four bytes, so each half adds one.
    bytes += code < 0x800 || (code >= 0xd800 && code <= 0xdfff) ? 1 : 2
  }
  return bytes
}
