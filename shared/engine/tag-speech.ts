/**
 * A tag as it is read over the air. Letters: ITU Radio Regulations, Appendix 14 (the spelling alphabet).
 * Digits: plain words with "niner", common practice, no source.
 */

const WORDS: Readonly<Record<string, string>> = {
  A: 'Alfa',
  B: 'Bravo',
  C: 'Charlie',
  D: 'Delta',
  E: 'Echo',
  F: 'Foxtrot',
  G: 'Golf',
  H: 'Hotel',
  I: 'India',
  J: 'Juliett',
  K: 'Kilo',
  L: 'Lima',
  M: 'Mike',
  N: 'November',
  O: 'Oscar',
  P: 'Papa',
  Q: 'Quebec',
  R: 'Romeo',
  S: 'Sierra',
  T: 'Tango',
  U: 'Uniform',
  V: 'Victor',
  W: 'Whiskey',
  X: 'X-ray',
  Y: 'Yankee',
  Z: 'Zulu',
  '0': 'Zero',
  '1': 'One',
  '2': 'Two',
  '3': 'Three',
  '4': 'Four',
  '5': 'Five',
  '6': 'Six',
  '7': 'Seven',
  '8': 'Eight',
  '9': 'Niner',
}

/** One word per letter or digit, in order; anything else in the text is not spoken. */
export function spokenWords(text: string): string[] {
  return [...text.toUpperCase()].flatMap((character) => WORDS[character] ?? [])
}

/** 'KT4Z76' -> 'Kilo Tango Four Zulu Seven Six'. */
export function spokenTag(tag: string): string {
  return spokenWords(tag).join(' ')
}
