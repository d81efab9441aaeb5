import { failure, type Failure } from '../outcome.ts'
import { isBlank, NumberScanner } from './read-number.ts'

/**
 * First pass over a Touchstone file: physical lines become option lines, keyword lines and data lines with
 * their numbers. It stops at the first bad character or token and leaves that failure in `stoppedBy`, so
 * that the second pass can still report an earlier line. Both passes look at each character a fixed number
 * of times.
 */
export interface DataLine {
  readonly kind: 'data'
  readonly line: number
  /** Where the line's numbers begin in `Lexed.numbers`. */
  readonly start: number
  readonly count: number
}

export interface TextLine {
  readonly kind: 'option' | 'keyword'
  readonly line: number
  readonly text: string
}

export interface Lexed {
  readonly lines: (DataLine | TextLine)[]
  readonly numbers: number[]
  /** Number of physical lines, 1 for an empty file. */
  readonly lastLine: number
  readonly stoppedBy?: Failure
}

const OPTION = '#'.charCodeAt(0)
const BRACKET = '['.charCodeAt(0)
/** Control characters other than tab and line ends. */
const CONTROL = new RegExp('[\\0-\\x08\\x0b\\x0c\\x0e-\\x1f\\x7f]')

export function lexTouchstone(text: string): Lexed {
  return new Lexer(text).run()
}

class Lexer {
  private readonly lines: (DataLine | TextLine)[] = []
  private readonly numbers: number[] = []
  private line = 0
  private at = 0
  /** Inside an information block, or after `[End]`: only the characters are checked. */
  private skipping: 'no' | 'information' | 'rest' = 'no'
  private readonly lineFeeds: NextPlace
  private readonly carriageReturns: NextPlace
  private readonly comments: NextPlace
  private readonly scanner: NumberScanner
  private readonly firstControl: number

  constructor(private readonly text: string) {
    this.lineFeeds = new NextPlace(text, '\n')
    this.carriageReturns = new NextPlace(text, '\r')
    this.comments = new NextPlace(text, '!')
    this.scanner = new NumberScanner(text)
    this.firstControl = text.search(CONTROL)
  }

  run(): Lexed {
    while (this.at < this.text.length) {
      this.line++
      const stoppedBy = this.takeLine()
      if (stoppedBy) return { ...this.result(), stoppedBy }
    }
    return this.result()
  }

  private result(): Lexed {
    return { lines: this.lines, numbers: this.numbers, lastLine: Math.max(this.line, 1) }
  }

  private takeLine(): Failure | undefined {
    const { text } = this
    let from = this.at
    const lineFeed = this.lineFeeds.from(from)
    const carriageReturn = this.carriageReturns.from(from)
    const end = Math.min(lineFeed, carriageReturn)
    if (this.firstControl >= from && this.firstControl < end) return this.badCharacter()
    this.at = carriageReturn + 1 === lineFeed ? lineFeed + 1 : end + 1
    const to = Math.min(end, this.comments.from(from))
    while (from < to && isBlank(text.charCodeAt(from))) from++
    return from < to ? this.takeContent(from, to) : undefined
  }

  private takeContent(from: number, to: number): Failure | undefined {
    const code = this.text.charCodeAt(from)
    if (code === BRACKET) {
      this.takeKeyword(this.text.slice(from, to).trimEnd())
      return undefined
    }
    if (this.skipping !== 'no') return undefined
    if (code === OPTION) {
      this.lines.push({ kind: 'option', line: this.line, text: this.text.slice(from + 1, to).trim() })
      return undefined
    }
    return this.takeNumbers(from, to)
  }

  private takeKeyword(text: string): void {
    const isInformationEnd = /^\[\s*end\s+information\s*\]/i.test(text)
    if (this.skipping === 'information' && isInformationEnd) this.skipping = 'no'
    else if (this.skipping === 'no') {
      this.lines.push({ kind: 'keyword', line: this.line, text })
      if (/^\[\s*begin\s+information\s*\]/i.test(text)) this.skipping = 'information'
      if (/^\[\s*end\s*\]/i.test(text)) this.skipping = 'rest'
    }
  }

  private takeNumbers(from: number, to: number): Failure | undefined {
    const { text, numbers, scanner } = this
    const start = numbers.length
    let at = from
    while (at < to) {
      const value = scanner.scan(at, to)
      if (value === undefined) return this.badNumber(text.slice(at, scanner.end))
      numbers.push(value)
      at = scanner.end
      while (at < to && isBlank(text.charCodeAt(at))) at++
    }
    this.lines.push({ kind: 'data', line: this.line, start, count: numbers.length - start })
    return undefined
  }

  private badCharacter(): Failure {
    const code = this.text.charCodeAt(this.firstControl)
    const message = `Character ${code} does not belong in a text file: this is not a Touchstone file.`
    return failure('TS_ENCODING', message, { line: this.line })
  }

  private badNumber(token: string): Failure {
    const hint = token.includes(',') ? ' Write decimals with a point, not a comma.' : ''
    return failure('TS_NUMBER', `${quoted(token)} is not a number.${hint}`, { line: this.line })
  }
}

/** A piece of the file fit to stand in a message: short, and ASCII only. */
export function quoted(token: string): string {
  const plain = token.replace(/[^\x20-\x7e]/g, '?')
  return `"${plain.length > 24 ? `${plain.slice(0, 24)}...` : plain}"`
}

/** Where a character stands next, asked at rising places: each part of the text is searched once. */
class NextPlace {
  private found = -1

  constructor(
    private readonly text: string,
    private readonly character: string,
  ) {}

  /** The length of the text when there is none. */
  from(at: number): number {
    if (this.found < at) {
      const found = this.text.indexOf(this.character, at)
      this.found = found < 0 ? this.text.length : found
    }
    return this.found
  }
}
