import { COMMON_PARTS } from './common-passwords.ts'

/** With fewer characters than this of one's own, the rest being common, a password is guessed early. */
const OWN_CHARACTERS = 10

/** A name of fewer letters is part of too many honest words. */
const SHORTEST_NAME = 3

/** A run such as 3456 or zyx counts as one thing from here on. */
const SHORTEST_RUN = 3

/** Signs that stand for letters in passwords. */
const SIGNS: Readonly<Record<string, string>> = {
  '@': 'a', '4': 'a', '3': 'e', '1': 'i', '!': 'i', '0': 'o', '$': 's', '5': 's', '7': 't', '8': 'b',
} // prettier-ignore

export type Weakness = 'common' | 'known-name'

/**
 * Why a password would be guessed early: it is put together from the commonest passwords, runs and repetitions, or
 * from those and the names given (the group's, the product's, the member's own). Undefined when neither.
 */
export function weaknessOf(password: string, names: readonly string[]): Weakness | undefined {
  const known = [...COMMON_PARTS, ...names.flatMap(partsOfName)]
  const own = ownCharacters(password, known)
  if (own >= OWN_CHARACTERS) return undefined
  return own < ownCharacters(password, COMMON_PARTS) ? 'known-name' : 'common'
}

/** The words of a name, and all of it written as one. */
function partsOfName(name: string): string[] {
  const words = name
    .toLowerCase()
    .normalize('NFKC')
    .split(/[^\p{L}\p{N}]+/u)
  return [...words, words.join('')].filter((part) => part.length >= SHORTEST_NAME)
}

/** How many characters no part, run or repetition explains; the least over reading signs as themselves or as letters. */
function ownCharacters(password: string, parts: readonly string[]): number {
  const plain = onlyLettersAndDigits(password.normalize('NFKC').toLowerCase())
  const read = onlyLettersAndDigits(
    [...password.normalize('NFKC').toLowerCase()].map((sign) => SIGNS[sign] ?? sign).join(''),
  )
  return Math.min(...[plain, read].map((text) => unexplained(repeatedUnit(text), parts)))
}

const onlyLettersAndDigits = (text: string) => text.replace(/[^\p{L}\p{N}]+/gu, '')

/** `abcabcabc` says no more than `abc`. */
function repeatedUnit(text: string): string {
  const at = `${text}${text}`.indexOf(text, 1)
  return at > 0 && at < text.length ? text.slice(0, at) : text
}

/** The fewest characters left over when parts and runs are laid on the text without overlap. */
function unexplained(text: string, parts: readonly string[]): number {
  const least = [0]
  for (let end = 1; end <= text.length; end += 1) {
    let best = least[end - 1]! + 1
    for (const part of parts) {
      if (text.endsWith(part, end)) best = Math.min(best, least[end - part.length]!)
    }
    const run = runEndingAt(text, end)
    for (let length = SHORTEST_RUN; length <= run; length += 1) best = Math.min(best, least[end - length]!)
    least.push(best)
  }
  return least[text.length]!
}

/** Length of the run of equal steps (aaa, 1234, zyx) that ends at `end`. */
function runEndingAt(text: string, end: number): number {
  const step = text.charCodeAt(end - 1) - text.charCodeAt(end - 2)
  if (Number.isNaN(step) || Math.abs(step) > 1) return 1
  let start = end - 1
  while (start > 0 && text.charCodeAt(start) - text.charCodeAt(start - 1) === step) start -= 1
  return end - start
}
