/** `early.js` asks for the first board and the session while the application loads, and leaves the answers here. */
interface EarlyAnswers {
  readonly path: string
  readonly answer: Promise<Response>
}

interface Sentence {
  readonly lead: string
  readonly rest: string
}

declare global {
  interface Window {
    halyardEarly?: Partial<Record<'board' | 'session', EarlyAnswers>>
  }
}

/** The answer for exactly this address, once: it is as old as the page. */
export function takeEarly(name: 'board' | 'session', path: string): Promise<Response> | undefined {
  const early = window.halyardEarly?.[name]
  if (!early || early.path !== path) return undefined
  delete window.halyardEarly?.[name]
  return early.answer
}

/** The board's page comes with its sentence; read before the application takes the page over. */
let standing = sentenceOnPage()

function sentenceOnPage(): Sentence | undefined {
  const heading = document.querySelector('#app .board-sentence h1')
  const [lead, rest] = heading?.childNodes ?? []
  return lead && { lead: lead.textContent ?? '', rest: rest?.textContent?.trim() ?? '' }
}

/** The sentence that stands on the screen already, once: it stays there until the board does. */
export function takeEarlySentence(): Sentence | undefined {
  const sentence = standing
  standing = undefined
  return sentence
}
