/**
 * The permanent code of an item: two-letter kind prefix, body, one check character; short enough to read
 * over the air, with typing errors caught. Source: ISO/IEC 7064:2003 (pure system MOD 37-2, computed by
 * cdigit); alphabet, prefix and skipping are our choice (calculation sheet, section 13).
 * MOD 37-2 rather than MOD 37,36: it catches every swap of two characters in up to 36, not only most.
 */
import { mod37_2 } from 'cdigit'
import { failure, isFailure, type Failure, type Outcome } from './outcome.ts'

/** No 0, 1, I, L, O: they are read as each other. */
export const TAG_CHARACTERS = '23456789ABCDEFGHJKMNPQRSTUVWXYZ'
export const MIN_TAG_LENGTH = 3
/** Beyond 36 characters two positions share a weight and a swap could pass. */
export const MAX_TAG_LENGTH = 36

/** Serials are written in base 31 with at least this many characters, so that a tag has at least six. */
const SERIAL_WIDTH = 3
export const MAX_SERIAL = 31 ** 6 - 1

/** Upper case without spaces and hyphens. Only a-z are raised: 'ß' must not become 'SS'. */
export function normaliseTag(input: string): string {
  return input.replace(/[\s\u002d\u2010-\u2014]/gu, '').replace(/[a-z]/g, (letter) => letter.toUpperCase())
}

/**
 * The MOD 37-2 check character of 1 to 35 characters 0-9 A-Z; it can be any of those or `*`.
 * `TAG_LENGTH`, `TAG_ALPHABET`. Published: donation number G123498654321 gives H (ICCBBA ISBT 128).
 */
export function checkCharacter(body: string): Outcome<string> {
  if (typeof body !== 'string' || body.length < 1 || body.length >= MAX_TAG_LENGTH)
    return tagFailure('TAG_LENGTH', 'A tag has 1 to 35 characters before its check character.')
  if (!/^[0-9A-Z]+$/.test(body)) return alphabetFailure()
  return mod37_2.compute(body)
}

/**
 * The tag in its stored form, from what was typed, scanned or heard.
 * `TAG_LENGTH`, `TAG_ALPHABET`, `TAG_CHECK`; never says which character would have been right.
 */
export function verifyTag(input: string): Outcome<string> {
  const tag = typeof input === 'string' ? normaliseTag(input) : ''
  if (tag.length < MIN_TAG_LENGTH) return tagFailure('TAG_LENGTH', 'A tag has at least 3 characters.')
  if (tag.length > MAX_TAG_LENGTH) return tagFailure('TAG_LENGTH', 'A tag has at most 36 characters.')
  if (!isTagText(tag)) return alphabetFailure()
  if (checkCharacter(tag.slice(0, -1)) === tag.slice(-1)) return tag
  return tagFailure('TAG_CHECK', 'This tag has a wrong or swapped character: read it again.')
}

/**
 * The tag of a serial number (0 to 887,503,680) of a kind, or undefined where the serial must be skipped
 * because its check character is outside the alphabet (16 % of serials).
 * Prefix: two letters of the alphabet. `TAG_ALPHABET`, `E_RANGE`.
 */
export function makeTag(prefix: string, serial: number): Outcome<string | undefined> {
  const bad = checkSeries(prefix, serial)
  if (bad) return bad
  const body = prefix + serialText(serial)
  const check = checkCharacter(body)
  if (isFailure(check)) return check
  return isTagText(check) ? body + check : undefined
}

/** The first usable tag at or after a serial number, with the serial it has. `TAG_ALPHABET`, `E_RANGE`. */
export function nextTag(prefix: string, fromSerial: number): Outcome<{ tag: string; serial: number }> {
  for (let serial = fromSerial; ; serial++) {
    const tag = makeTag(prefix, serial)
    if (isFailure(tag)) return tag
    if (tag !== undefined) return { tag, serial }
  }
}

function checkSeries(prefix: string, serial: number): Failure | undefined {
  if (typeof prefix !== 'string' || !/^[A-HJKMNP-Z]{2}$/.test(prefix))
    return failure('TAG_ALPHABET', 'A prefix is two capital letters, not I, L or O.', { field: 'prefix' })
  if (Number.isInteger(serial) && serial >= 0 && serial <= MAX_SERIAL) return undefined
  return failure('E_RANGE', `serial must be a whole number from 0 to ${MAX_SERIAL}.`, { field: 'serial' })
}

/** Base 31 in the tag alphabet; serials beyond three characters start with another than '2', so none repeat. */
function serialText(serial: number): string {
  let text = ''
  for (let rest = serial; rest > 0; rest = Math.floor(rest / 31))
    text = TAG_CHARACTERS.charAt(rest % 31) + text
  return text.padStart(SERIAL_WIDTH, TAG_CHARACTERS.charAt(0))
}

function isTagText(text: string): boolean {
  return /^[2-9A-HJKMNP-Z]+$/.test(text)
}

function alphabetFailure(): Failure {
  return tagFailure('TAG_ALPHABET', 'Tags are letters and digits, and tags never contain 0, 1, I, L or O.')
}

function tagFailure(code: string, message: string): Failure {
  return failure(code, message, { field: 'tag' })
}
