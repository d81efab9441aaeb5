/**
 * A tag as somebody heard it and typed it: characters, words of the spelling alphabet, or both. Variants that people
 * say and type besides the official words are taken too (common practice, no source).
 */
import { normaliseTag, TAG_CHARACTERS } from './tag.ts'
import { spokenWords } from './tag-speech.ts'

const VARIANTS: Readonly<Record<string, string>> = {
  alpha: 'A',
  juliet: 'J',
  xray: 'X',
  whisky: 'W',
  nine: '9',
  tree: '3',
  fower: '4',
  fife: '5',
  ait: '8',
}

const CHARACTER_OF: ReadonlyMap<string, string> = new Map([
  ...[...TAG_CHARACTERS].flatMap((character) =>
    spokenWords(character).map((word) => [word.toLowerCase().replace('-', ''), character] as const),
  ),
  ...Object.entries(VARIANTS),
])

/** 'Kilo Tango four Zulu seven six' and 'kt 4z-76' are both 'KT4Z76'. What is no spelling word stays as it was typed. */
export function heardTag(text: string): string {
  const words = text.replace(/x[\s-]ray/gi, 'xray').split(/[\s,.;/]+/)
  return normaliseTag(words.map((word) => CHARACTER_OF.get(word.toLowerCase()) ?? word).join(''))
}
