import { failure, type Failure, type Outcome } from '../outcome.ts'
import { readKeyword, Version2Header } from './keywords.ts'
import { OptionCollector, type Layout } from './layout.ts'
import type { DataLine, Lexed } from './lex.ts'

type Section = 'header' | 'reference' | 'network' | 'noise' | 'end'

/** True when the first line that is not a comment is `[Version]`. */
export function isVersion2(lexed: Lexed): boolean {
  const first = lexed.lines[0]
  return first?.kind === 'keyword' && readKeyword(first.text).name === 'version'
}

/**
 * Version 2.0 and 2.1: keywords, then `[Network Data]`, then perhaps `[Noise Data]`, then `[End]`.
 * Fails with `TS_V2_KEYWORD`, `TS_V2_UNSUPPORTED`, `TS_V2_ORDER`, `TS_V2_REFERENCE`, `TS_V2_COUNT`,
 * `TS_PORTS` or the option line's codes; what is wrong below the network data waits in `failureAfterData`.
 */
export function layOutVersion2(lexed: Lexed): Outcome<Layout> {
  return new Version2Reader(lexed).run()
}

class Version2Reader {
  private readonly header = new Version2Header()
  private readonly options = new OptionCollector()
  private readonly data: DataLine[] = []
  private section: Section = 'header'
  private noisePoints = 0

  constructor(private readonly lexed: Lexed) {}

  run(): Outcome<Layout> {
    let failureAfterData: Failure | undefined
    let isDataOpen = true
    for (const source of this.lexed.lines) {
      const bad = source.kind === 'data' ? this.takeData(source) : this.takeText(source)
      if (this.section === 'noise' || this.section === 'end') isDataOpen = false
      if (!bad) continue
      if (this.section === 'header' || this.section === 'reference') return bad
      failureAfterData = bad
      break
    }
    const { stoppedBy, lastLine } = this.lexed
    if (this.section === 'header' || this.section === 'reference') {
      return stoppedBy ?? failure('TS_EMPTY', 'The file has no [Network Data].', { line: lastLine })
    }
    failureAfterData ??= stoppedBy ?? this.header.checkNoiseCount(this.noisePoints)
    return this.layout(failureAfterData, isDataOpen ? failureAfterData : undefined)
  }

  private layout(failureAfterData: Failure | undefined, stoppedBy: Failure | undefined): Layout {
    const { option, warnings } = this.options.result()
    if (this.section !== 'end') {
      warnings.push({
        code: 'TS_W_NO_END',
        message: 'The file does not close with [End]: it may be cut short.',
      })
    }
    return {
      ...this.header.result(),
      option,
      warnings,
      isScaleKnown: stoppedBy?.code !== 'TS_OPTION_LATE',
      data: this.data,
      stoppedBy,
      markedNoise: this.noisePoints,
      failureAfterData,
    }
  }

  private takeData(source: DataLine): Failure | undefined {
    const { line } = source
    if (this.section === 'reference') {
      this.header.addReference(this.lexed.numbers.slice(source.start, source.start + source.count))
    } else if (this.section === 'network') this.data.push(source)
    else if (this.section === 'noise') {
      if (source.count !== 5) return failure('TS_NOISE', 'A noise line has exactly five numbers.', { line })
      this.noisePoints++
    } else return failure('TS_COLUMNS', 'Numbers stand before [Network Data].', { line })
    return undefined
  }

  private takeText(source: { kind: 'option' | 'keyword'; line: number; text: string }): Failure | undefined {
    const inHeader = this.section === 'header' || this.section === 'reference'
    if (this.section === 'reference') {
      const bad = this.header.closeReference()
      if (bad) return bad
      this.section = 'header'
    }
    if (source.kind === 'option') return this.options.take(source, !inHeader)
    const { name, value } = readKeyword(source.text)
    if (name === 'end') this.section = 'end'
    else if (name === 'noise data' && !inHeader) return this.openNoise(source.line)
    else if (name === 'network data' && inHeader) return this.openNetwork(source.line)
    else if (!inHeader) return this.strayKeyword(source)
    else if (name === 'reference') return this.openReference(value, source.line)
    else return this.header.take(name, value, source)
    return undefined
  }

  private openReference(value: string, line: number): Failure | undefined {
    this.section = 'reference'
    return this.header.openReference(value, line)
  }

  private openNetwork(line: number): Failure | undefined {
    const bad = this.header.checkComplete(line)
    if (!bad) this.section = 'network'
    return bad
  }

  private openNoise(line: number): Failure | undefined {
    if (this.section === 'noise') return failure('TS_V2_KEYWORD', '[Noise Data] stands twice.', { line })
    this.section = 'noise'
    return this.header.checkNoiseAllowed(line)
  }

  private strayKeyword({ line, text }: { line: number; text: string }): Failure {
    return failure('TS_V2_KEYWORD', `${text.slice(0, 40)} does not belong below [Network Data].`, { line })
  }
}
