/** `early.js` asks for the first board and the session while the application loads, and leaves the answers here. */
interface EarlyAnswers {
  readonly path: string
  readonly answer: Promise<Response>
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
