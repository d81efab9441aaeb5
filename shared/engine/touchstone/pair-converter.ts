import { failure, type Failure } from '../outcome.ts'
import type { RecordSource } from './network-data.ts'

const RADIANS_PER_DEGREE = Math.PI / 180
/** A larger value is a mixed-up unit or format, not a passive part. */
const MAX_MAGNITUDE = 10
/** Above 1 by more than the rounding of a file with nine digits. */
const ACTIVE_MAGNITUDE = 1 + 1e-9

/** Turns pairs of numbers in the file's format into real and imaginary parts. */
export class PairConverter {
  readonly values: Float64Array
  private written = 0
  private activeCount = 0
  private activeLine = 0
  private readonly partsPerPoint: number

  constructor(
    private readonly source: Pick<RecordSource, 'numbers' | 'option' | 'ports' | 'isScaleKnown'>,
    capacity: number,
  ) {
    this.partsPerPoint = 2 * source.ports * source.ports
    this.values = new Float64Array(capacity * this.partsPerPoint)
  }

  get active(): { count: number; line: number } {
    return { count: this.activeCount, line: this.activeLine }
  }

  /** Converts the pairs from `first` up to `end` in the list of numbers: `TS_MAG` for an impossible size. */
  take(first: number, end: number, line: number): Failure | undefined {
    for (let at = first; at < end; at += 2) {
      const size = this.convert(this.source.numbers[at] as number, this.source.numbers[at + 1] as number)
      if (this.source.isScaleKnown && !(size >= 0 && size <= MAX_MAGNITUDE)) return badSize(size, line)
      if (size > ACTIVE_MAGNITUDE && this.isReflection()) this.noteActive(line)
      this.written += 2
    }
    return undefined
  }

  /** Writes one value and answers its magnitude, below 0 for a negative one. Adding 0 turns -0 into 0. */
  private convert(first: number, second: number): number {
    const { values, written } = this
    if (this.source.option.format === 'RI') {
      values[written] = first + 0
      values[written + 1] = second + 0
      return Math.sqrt(first * first + second * second)
    }
    const size = this.source.option.format === 'DB' ? 10 ** (first / 20) : first
    const radians = second * RADIANS_PER_DEGREE
    values[written] = size * Math.cos(radians) + 0
    values[written + 1] = size * Math.sin(radians) + 0
    return size
  }

  /** S11 and S22 stand first and last in a record. */
  private isReflection(): boolean {
    const part = this.written % this.partsPerPoint
    return part === 0 || part === this.partsPerPoint - 2
  }

  private noteActive(line: number): void {
    if (this.activeCount === 0) this.activeLine = line
    this.activeCount++
  }
}

function badSize(size: number, line: number): Failure {
  const message =
    size < 0
      ? 'A magnitude is negative: check the format on the option line.'
      : 'A value is above 10 (20 dB): check the format on the option line.'
  return failure('TS_MAG', message, { line })
}
