import { failure, type Failure, type Outcome } from '../outcome.ts'
import { quoted, type TextLine } from './lex.ts'
import { readNumber } from './read-number.ts'

export type NumberFormat = 'MA' | 'DB' | 'RI'
export type FrequencyUnit = 'Hz' | 'kHz' | 'MHz' | 'GHz'

/** What the option line says about the numbers below it. */
export interface OptionLine {
  readonly unitHz: number
  readonly format: NumberFormat
  readonly referenceOhm: number
}

export const UNIT_HZ: Readonly<Record<FrequencyUnit, number>> = { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9 }

/** `GHz S MA R 50`: Touchstone File Format Specification 1.1, confirmed. */
export const DEFAULT_OPTION: OptionLine = { unitHz: 1e9, format: 'MA', referenceOhm: 50 }

type Kind = 'unit' | 'parameter' | 'format' | 'resistance'

const UNITS: Readonly<Record<string, number>> = { HZ: 1, KHZ: 1e3, MHZ: 1e6, GHZ: 1e9 }
const PARAMETERS = ['S', 'Y', 'Z', 'H', 'G']
const FORMATS: readonly string[] = ['MA', 'DB', 'RI']

/**
 * Reads `# <unit> <parameter> <format> R <n>`: any order, any case, each part may be missing.
 * `TS_OPTION` for an unknown token or two that contradict each other, `TS_OPTION_R` for a resistance that is
 * missing, not a number or not above 0, `TS_PARAM` for Y, Z, H or G data.
 */
export function readOptionLine(source: TextLine): Outcome<OptionLine> {
  const tokens = source.text
    .toUpperCase()
    .split(/[ \t]+/)
    .filter((token) => token !== '')
  const seen = new Map<Kind, string | number>()
  for (let at = 0; at < tokens.length; at++) {
    const part = readPart(tokens, at)
    if ('code' in part) return { ...part, line: source.line }
    const before = seen.get(part.kind)
    if (before !== undefined && before !== part.value) return contradiction(before, part.value, source.line)
    seen.set(part.kind, part.value)
    if (tokens[at] === 'R') at++
  }
  return optionFrom(seen, source.line)
}

function optionFrom(seen: ReadonlyMap<Kind, string | number>, line: number): Outcome<OptionLine> {
  const parameter = seen.get('parameter') ?? 'S'
  if (parameter !== 'S') {
    return failure('TS_PARAM', `The file holds ${parameter}-parameters: save it as S-parameters.`, { line })
  }
  return {
    unitHz: UNITS[seen.get('unit') ?? ''] ?? DEFAULT_OPTION.unitHz,
    format: (seen.get('format') as NumberFormat | undefined) ?? DEFAULT_OPTION.format,
    referenceOhm: (seen.get('resistance') as number | undefined) ?? DEFAULT_OPTION.referenceOhm,
  }
}

function readPart(tokens: readonly string[], at: number): { kind: Kind; value: string | number } | Failure {
  const token = tokens[at] ?? ''
  if (Object.hasOwn(UNITS, token)) return { kind: 'unit', value: token }
  if (PARAMETERS.includes(token)) return { kind: 'parameter', value: token }
  if (FORMATS.includes(token)) return { kind: 'format', value: token }
  if (token === 'R') return readResistance(tokens[at + 1])
  // Some analyzers leave out the space: R50.
  if (/^R[-+.\d]/.test(token)) return readResistance(token.slice(1))
  return failure('TS_OPTION', `${quoted(token)} has no meaning on the option line.`)
}

function readResistance(token: string | undefined): { kind: Kind; value: number } | Failure {
  if (token === undefined) return failure('TS_OPTION_R', 'R needs a resistance in ohm after it.')
  const ohm = readNumber(token)
  if (ohm === undefined) return failure('TS_OPTION_R', `The resistance ${quoted(token)} is not a number.`)
  if (ohm <= 0) return failure('TS_OPTION_R', `The resistance is ${ohm} ohm: it must be above 0.`)
  return { kind: 'resistance', value: ohm }
}

function contradiction(before: string | number, now: string | number, line: number): Failure {
  return failure('TS_OPTION', `The option line says both ${before} and ${now}.`, { line })
}
