export interface SentencePart {
  readonly text: string
  /** Must stay on one line. */
  readonly whole: boolean
}

/** Designations such as K-07, and numbers with the unit after them; years after a month; `3 of 4` is no quantity. */
const WHOLE =
  /([A-Z]{1,5}-\d[\w-]*|[-\u2212]?\d[\d.,]* ?(?:%|°C|°F|K|m|cm|ft|W|Wh|V|A|Ah|h|min|s|dB|MHz|kHz|Hz|ohm|Ω)(?![\w])|\d{1,2} (?:Jan|Feb|Mar|Apr|May|Jun|Jul|Aug|Sep|Oct|Nov|Dec)(?: \d{4})?)/

/** A sentence cut into parts that may break anywhere and parts that must not; joined they are the sentence. */
export function unbrokenParts(sentence: string): SentencePart[] {
  return sentence
    .split(WHOLE)
    .map((text, index) => ({ text, whole: index % 2 === 1 }))
    .filter(({ text }) => text !== '')
}
