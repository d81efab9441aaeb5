import { failure, isFailure, type Outcome } from '../outcome.ts'
import { decodeText } from './decode-text.ts'
import { layOutVersion1, type Layout } from './layout.ts'
import { lexTouchstone, type Lexed } from './lex.ts'
import { readRecords, type RecordBlock } from './network-data.ts'
import { settlePorts } from './port-count.ts'
import {
  UPLOAD_LIMITS,
  type FileNote,
  type TouchstoneFile,
  type TouchstoneLimits,
} from './touchstone-file.ts'
import { splitTraces } from './traces.ts'
import { isVersion2, layOutVersion2 } from './version-2.ts'

export interface ReadTouchstoneOptions {
  /** Its ending tells the ports: `.s1p`, `.s2p`. */
  readonly fileName?: string
  /** Default: what may be uploaded. */
  readonly limits?: TouchstoneLimits
}

/**
 * Reads a one- or two-port Touchstone file, version 1.x or the common parts of 2.0 and 2.1.
 *
 * Answers frequencies in Hz and S-parameters as real and imaginary parts, or the first fault with its
 * 1-based physical line: `TS_EMPTY`, `TS_ENCODING`, `TS_OPTION`, `TS_OPTION_R`, `TS_PARAM`,
 * `TS_OPTION_LATE`, `TS_NUMBER`, `TS_COLUMNS`, `TS_TRUNCATED`, `TS_PORTS`, `TS_FREQ_NEG`, `TS_FREQ_ORDER`,
 * `TS_FREQ_RANGE` (above 100 GHz), `TS_MAG` (above 10), `TS_NOISE`, `TS_V2_KEYWORD`, `TS_V2_UNSUPPORTED`,
 * `TS_V2_ORDER`, `TS_V2_COUNT`, `TS_V2_REFERENCE`; beyond the limits `TS_TOO_BIG`, `TS_TOO_MANY_POINTS`. On
 * one line the order is encoding, number, columns, range, order. Warnings: `TS_W_NO_OPTION`,
 * `TS_W_EXTRA_OPTION`, `TS_W_NO_END`, `TS_W_DC`, `TS_W_ACTIVE`; information: `TS_I_NOISE`. Time grows in
 * proportion to the size.
 *
 * Source: Touchstone File Format Specification 1.1 (2002), 2.0 (2009), 2.1 (2024): defaults, two-port order,
 * noise columns, keywords confirmed; "later option lines are ignored" from memory, verify.
 */
export function readTouchstone(
  source: string | Uint8Array,
  options: ReadTouchstoneOptions = {},
): Outcome<TouchstoneFile> {
  const limits = options.limits ?? UPLOAD_LIMITS
  const decoded = decodeText(source, limits.maxBytes)
  if (isFailure(decoded)) return decoded
  const lexed = lexTouchstone(decoded.text)
  const layout = isVersion2(lexed) ? layOutVersion2(lexed) : layOutVersion1(lexed)
  if (isFailure(layout)) return layout
  if (layout.data.length === 0) return noData(layout, lexed)
  const settled = settlePorts(layout, options.fileName)
  if (isFailure(settled)) return settled
  return readNetwork({ lexed, layout, ports: settled.ports, maxPoints: limits.maxPoints })
}

interface Network {
  readonly lexed: Lexed
  readonly layout: Layout
  readonly ports: 1 | 2
  readonly maxPoints: number
}

function readNetwork({ lexed, layout, ports, maxPoints }: Network): Outcome<TouchstoneFile> {
  const { option, isScaleKnown, stoppedBy } = layout
  const hasUnmarkedNoise = layout.version === '1' && ports === 2
  const { data: lines } = layout
  const { numbers } = lexed
  const block = readRecords({
    lines,
    numbers,
    ports,
    option,
    isScaleKnown,
    stoppedBy,
    hasUnmarkedNoise,
    maxPoints,
  })
  if (isFailure(block)) return block
  return checkPointCount(layout, block.points) ?? layout.failureAfterData ?? assemble(layout, ports, block)
}

function assemble(layout: Layout, ports: 1 | 2, block: RecordBlock): TouchstoneFile {
  const common = {
    version: layout.version,
    referenceOhm: layout.referenceOhm ?? Array.from({ length: ports }, () => layout.option.referenceOhm),
    frequencyHz: block.frequencyHz,
    noisePoints: block.noisePoints + layout.markedNoise,
    warnings: [...layout.warnings.map((note) => withSpan(note, block.frequencyHz)), ...valueWarnings(block)],
    info: noiseInfo(block.noisePoints + layout.markedNoise),
  }
  return { ...common, ...splitTraces(block, ports, layout.isS21First) }
}

/** Without an option line the unit is a guess, so a person is shown what it makes of the frequencies. */
function withSpan(note: FileNote, frequencyHz: Float64Array): FileNote {
  if (note.code !== 'TS_W_NO_OPTION') return note
  const [first, last] = [frequencyHz[0], frequencyHz.at(-1)].map((hz = 0) =>
    Number((hz / 1e6).toPrecision(9)),
  )
  return { ...note, message: `${note.message} It runs from ${first} to ${last} MHz.` }
}

function noData({ stoppedBy, failureAfterData }: Layout, { lastLine }: Lexed): Outcome<never> {
  const empty = failure('TS_EMPTY', 'The file holds no measurement.', { line: lastLine })
  return stoppedBy ?? failureAfterData ?? empty
}

function checkPointCount({ expectedPoints }: Layout, found: number): Outcome<never> | undefined {
  if (!expectedPoints || expectedPoints.count === found) return undefined
  const { count, line } = expectedPoints
  return failure('TS_V2_COUNT', `The file promises ${count} frequencies and holds ${found}.`, { line })
}

function valueWarnings({ dcLine, active }: RecordBlock): FileNote[] {
  const notes: FileNote[] = []
  if (dcLine !== undefined) {
    notes.push({ code: 'TS_W_DC', message: 'The first point is at frequency 0.', line: dcLine })
  }
  if (active.count > 0) {
    const message = `${active.count} reflection(s) lie above 1: check the calibration.`
    notes.push({ code: 'TS_W_ACTIVE', message, ...active })
  }
  return notes
}

function noiseInfo(count: number): FileNote[] {
  if (count === 0) return []
  return [{ code: 'TS_I_NOISE', message: `${count} noise line(s) were skipped.`, count }]
}
