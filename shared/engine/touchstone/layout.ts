import { failure, isFailure, type Failure, type Outcome } from '../outcome.ts'
import type { DataLine, Lexed } from './lex.ts'
import { DEFAULT_OPTION, readOptionLine, type OptionLine } from './option-line.ts'
import type { FileNote } from './touchstone-file.ts'

/** Everything around the numbers: what the header says, and which lines are network data. */
export interface Layout {
  readonly version: '1' | '2.0' | '2.1'
  readonly option: OptionLine
  /** False when the option line turned out to come after the data, so their scale is unknown. */
  readonly isScaleKnown: boolean
  /** Ports named in the file itself, with the keyword's line. */
  readonly declaredPorts?: { readonly ports: 1 | 2; readonly line: number }
  /** `[Reference]`, one resistance a port, ohm. */
  readonly referenceOhm?: readonly number[]
  readonly isS21First: boolean
  readonly data: readonly DataLine[]
  /** What ended the data early; the lines in `data` come before it. */
  readonly stoppedBy?: Failure
  /** `[Number of Frequencies]`. */
  readonly expectedPoints?: { readonly count: number; readonly line: number }
  /** Noise lines under `[Noise Data]`; version 1 marks none. */
  readonly markedNoise: number
  /** First failure below the network data of a version 2 file. */
  readonly failureAfterData?: Failure
  readonly warnings: readonly FileNote[]
}

/** Version 1: option line, then data to the end of the file. */
export function layOutVersion1(lexed: Lexed): Outcome<Layout> {
  const options = new OptionCollector()
  const data: DataLine[] = []
  let stoppedBy = lexed.stoppedBy
  for (const source of lexed.lines) {
    if (source.kind === 'data') data.push(source)
    else {
      const bad =
        source.kind === 'option'
          ? options.take(source, data.length > 0)
          : strayKeyword(source.text, source.line)
      if (!bad) continue
      if (data.length === 0) return bad
      stoppedBy = bad
      break
    }
  }
  return {
    version: '1',
    ...options.result(),
    isScaleKnown: stoppedBy?.code !== 'TS_OPTION_LATE',
    isS21First: true,
    data,
    stoppedBy,
    markedNoise: 0,
  }
}

function strayKeyword(text: string, line: number): Failure {
  const message = `${text.slice(0, 40)} belongs in a version 2 file, which begins with [Version] 2.0 or 2.1.`
  return failure('TS_V2_KEYWORD', message, { line })
}

/** Keeps the first option line; a later one counts for nothing. */
export class OptionCollector {
  private option: OptionLine | undefined
  private readonly extraLines: number[] = []

  take(
    source: { kind: 'option' | 'keyword'; line: number; text: string },
    isAfterData: boolean,
  ): Failure | undefined {
    if (this.option) {
      this.extraLines.push(source.line)
      return undefined
    }
    if (isAfterData) {
      const message = 'The option line comes after data: put it above the first frequency.'
      return failure('TS_OPTION_LATE', message, { line: source.line })
    }
    const option = readOptionLine(source)
    if (isFailure(option)) return option
    this.option = option
    return undefined
  }

  result(): { option: OptionLine; warnings: FileNote[] } {
    const warnings: FileNote[] = []
    if (!this.option) {
      const message = 'There is no option line: read as GHz, magnitude and angle, 50 ohm. Check that.'
      warnings.push({ code: 'TS_W_NO_OPTION', message })
    }
    if (this.extraLines[0] !== undefined) {
      const message = 'A second option line was ignored: only the first one counts.'
      const count = this.extraLines.length
      warnings.push({ code: 'TS_W_EXTRA_OPTION', message, line: this.extraLines[0], count })
    }
    return { option: this.option ?? DEFAULT_OPTION, warnings }
  }
}
