import { magnitude, type Complex } from '../complex.ts'
import { failure, type Outcome } from '../outcome.ts'
import { UNIT_HZ, type FrequencyUnit, type NumberFormat } from './option-line.ts'
import { valueAt, type TouchstoneFile, type Trace } from './touchstone-file.ts'

export interface WriteTouchstoneOptions {
  /** Default Hz: only then is every frequency written without rounding. */
  readonly unit?: FrequencyUnit
  /** Default RI: only then is every value written without rounding. */
  readonly format?: NumberFormat
  /** Lines for the head of the file; control characters in them become spaces. */
  readonly comments?: readonly string[]
}

/** Stands for no signal at all, whose decibels would be minus infinity. */
const FLOOR_DB = -999

/**
 * Writes a version 1 file with LF ends; in Hz and RI, reading it gives the same numbers bit for bit.
 * The noise block is not kept. `E_REFERENCE` when the two ports have different references, which only
 * version 2 can say.
 */
export function writeTouchstone(
  file: TouchstoneFile,
  { unit = 'Hz', format = 'RI', comments = [] }: WriteTouchstoneOptions = {},
): Outcome<string> {
  const [first, second = first] = file.referenceOhm
  if (first === undefined || first !== second) {
    return failure('E_REFERENCE', 'The ports have different references: version 1 has room for one.')
  }
  const lines = comments.map((comment) => `! ${comment.replace(/\p{Cc}/gu, ' ')}`)
  lines.push(`# ${unit} S ${format} R ${first}`)
  const traces = file.ports === 1 ? [file.s11] : [file.s11, file.s21, file.s12, file.s22]
  file.frequencyHz.forEach((hz, point) => {
    lines.push(`${hz / UNIT_HZ[unit]} ${writeValues(traces, point, format)}`)
  })
  return `${lines.join('\n')}\n`
}

function writeValues(traces: readonly Trace[], point: number, format: NumberFormat): string {
  return traces.map((trace) => writeValue(valueAt(trace, point), format)).join(' ')
}

function writeValue(value: Complex, format: NumberFormat): string {
  if (format === 'RI') return `${value.re} ${value.im}`
  const size = magnitude(value)
  const degrees = (Math.atan2(value.im, value.re) * 180) / Math.PI
  if (format === 'MA') return `${size} ${degrees}`
  return `${size > 0 ? 20 * Math.log10(size) : FLOOR_DB} ${degrees}`
}
