import { failure, type Failure, type Outcome } from '../outcome.ts'
import type { DataLine } from './lex.ts'
import type { OptionLine } from './option-line.ts'
import { recordSize } from './port-count.ts'
import { PairConverter } from './pair-converter.ts'

/**
 * Second pass: data lines become records. Numbers come in pairs after the frequency and a pair is never
 * split, so an odd count starts a frequency and an even count continues the last one (the rule of the
 * forum's own checker, confirmed). Each line is judged with one line of lookahead; the first failure ends
 * the pass.
 */
export interface RecordSource {
  readonly lines: readonly DataLine[]
  readonly numbers: readonly number[]
  readonly ports: 1 | 2
  readonly option: OptionLine
  /** False when an option line comes too late: then nothing that hangs on the scale is judged. */
  readonly isScaleKnown: boolean
  /** True for version 1 with two ports, where only a frequency that goes back marks the noise block. */
  readonly hasUnmarkedNoise: boolean
  readonly maxPoints: number
  /** A failure on a later line; whether that line would have gone on with the record is not known. */
  readonly stoppedBy?: Failure
}

export interface RecordBlock {
  readonly points: number
  readonly frequencyHz: Float64Array
  /** Real and imaginary parts in file order, `2 * ports^2` a point. */
  readonly values: Float64Array
  readonly noisePoints: number
  /** Line of a point at frequency 0. */
  readonly dcLine?: number
  /** Points with a reflection above 1, and the line of the first. */
  readonly active: { readonly count: number; readonly line: number }
}

const MAX_FREQUENCY_HZ = 100e9

export function readRecords(source: RecordSource): Outcome<RecordBlock> {
  return new RecordReader(source).run()
}

class RecordReader {
  private readonly size: number
  private readonly frequencyHz: Float64Array
  private readonly pairs: PairConverter
  private points = 0
  /** Numbers of the open record read so far, 0 when none is open, and where it began. */
  private filled = 0
  private recordLine = 0
  private lastHz = -1
  private noisePoints = 0
  private dcLine: number | undefined

  constructor(private readonly source: RecordSource) {
    this.size = recordSize(source.ports)
    const capacity = Math.min(source.lines.length, source.maxPoints + 1)
    this.frequencyHz = new Float64Array(capacity)
    this.pairs = new PairConverter(source, capacity)
  }

  run(): Outcome<RecordBlock> {
    const { lines, stoppedBy } = this.source
    for (let at = 0; at < lines.length; at++) {
      const bad = this.take(at)
      if (bad) return bad
    }
    return stoppedBy ?? this.block()
  }

  private block(): RecordBlock {
    return {
      points: this.points,
      frequencyHz: this.frequencyHz.slice(0, this.points),
      values: this.pairs.values,
      noisePoints: this.noisePoints,
      dcLine: this.dcLine,
      active: this.pairs.active,
    }
  }

  private take(at: number): Failure | undefined {
    const line = this.source.lines[at] as DataLine
    if (this.noisePoints > 0 || this.startsNoise(line, at)) return this.takeNoise(line)
    const isContinuation = line.count % 2 === 0
    if (isContinuation && this.filled === 0)
      return columns(line.line, 'An even count of numbers continues no record.')
    if (!isContinuation) {
      this.recordLine = line.line
      this.filled = 0
    }
    this.filled += line.count
    return this.checkColumns(line, at) ?? this.takeValues(line, isContinuation)
  }

  private takeValues(line: DataLine, isContinuation: boolean): Failure | undefined {
    const first = line.start + (isContinuation ? 0 : 1)
    const end = line.start + line.count
    const bad =
      (isContinuation ? undefined : this.checkFrequencyRange(line)) ??
      this.pairs.take(first, end, line.line) ??
      (isContinuation ? undefined : this.takeFrequency(line))
    if (!bad && this.filled === this.size) this.filled = 0
    return bad
  }

  private checkColumns(line: DataLine, at: number): Failure | undefined {
    const { filled, size, recordLine } = this
    if (filled === size) return undefined
    if (filled > size)
      return columns(line.line, `A record has ${size} numbers, this line makes it ${filled}.`)
    const next = this.source.lines[at + 1]
    if (next) {
      const isShort = next.count % 2 === 1
      return isShort ? columns(recordLine, `A record has ${size} numbers, this one ${filled}.`) : undefined
    }
    if (this.source.stoppedBy) return undefined
    const message = `The file ends inside a record: ${filled} of ${size} numbers.`
    return failure('TS_TRUNCATED', message, { line: recordLine })
  }

  private checkFrequencyRange({ start, line }: DataLine): Failure | undefined {
    const hz = this.hzAt(start)
    if (hz < 0) return failure('TS_FREQ_NEG', 'The frequency is negative.', { line })
    if (hz > MAX_FREQUENCY_HZ && this.source.isScaleKnown) {
      return failure('TS_FREQ_RANGE', 'The frequency is above 100 GHz: check the unit on the option line.', {
        line,
      })
    }
    return undefined
  }

  private takeFrequency({ start, line }: DataLine): Failure | undefined {
    const hz = this.hzAt(start)
    if (hz <= this.lastHz) {
      return failure('TS_FREQ_ORDER', 'The frequency is not above the one before it.', { line })
    }
    if (this.points === this.source.maxPoints) {
      const message = `The file has more than ${this.points} points, the most that is read.`
      return failure('TS_TOO_MANY_POINTS', message, { line, field: 'maxPoints' })
    }
    if (hz === 0) this.dcLine = line
    this.lastHz = hz
    this.frequencyHz[this.points++] = hz
    return undefined
  }

  /** Five numbers whose frequency goes back, unless the next line goes on with them. */
  private startsNoise(line: DataLine, at: number): boolean {
    if (!this.source.hasUnmarkedNoise || line.count !== 5 || this.filled > 0) return false
    if (this.hzAt(line.start) > this.lastHz) return false
    const next = this.source.lines[at + 1]
    return next === undefined || next.count % 2 === 1
  }

  private takeNoise({ start, count, line }: DataLine): Failure | undefined {
    if (count !== 5) return failure('TS_NOISE', 'A noise line has exactly five numbers.', { line })
    if (this.hzAt(start) < 0) return failure('TS_FREQ_NEG', 'The frequency is negative.', { line })
    this.noisePoints++
    return undefined
  }

  private hzAt(index: number): number {
    // Adding 0 turns -0 into 0.
    return (this.source.numbers[index] as number) * this.source.option.unitHz + 0
  }
}

function columns(line: number, message: string): Failure {
  return failure('TS_COLUMNS', message, { line })
}
