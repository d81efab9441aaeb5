/**
 * `early.js` asks for the first board and the session while the application loads, and leaves the answers here. What
 * the board says in one sentence it has drawn already.
 */
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
    halyardEarly?: Partial<Record<'board' | 'session', EarlyAnswers>> & { sentence?: Sentence }
  }
}

/** The answer for exactly this address, once: it is as old as the page. */
export function takeEarly(name: 'board' | 'session', path: string): Promise<Response> | undefined {
  const early = window.halyardEarly?.[name]
  if (!early || early.path !== path) return undefined
  delete window.halyardEarly?.[name]
  return early.answer
}

/** The sentence that stands on the screen already, once: it stays there until the board does. */
export function takeEarlySentence(): Sentence | undefined {
  const sentence = window.halyardEarly?.sentence
  delete window.halyardEarly?.sentence
  return sentence
}
