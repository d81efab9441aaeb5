/**
 * How large a QR label must be: version and error-correction level from the text, side from the module.
 * Source: ISO/IEC 18004 (codewords, quiet zone of 4 modules); module size from a phone camera's pixels,
 * our arithmetic (calculation sheet, section 13). Versions below 3 are not used: a label has room for 3.
 */
import { checkNumber, failure, isFailure, type Outcome, type Warning } from './outcome.ts'

export type QrVersion = 3 | 4 | 5 | 6
/** Q (about 25 % of codewords recoverable) for labels that get dirty; M (about 15 %) for clean ones. */
export type QrLevel = 'M' | 'Q'
export type QrMode = 'alphanumeric' | 'byte'

export interface QrLabel {
  readonly version: QrVersion
  readonly level: QrLevel
  readonly mode: QrMode
  /** Modules along one side, without the quiet zone. */
  readonly modules: number
  readonly moduleMm: number
  /** Side of the square to keep free, quiet zone included, mm. */
  readonly sideMm: number
  readonly warnings: readonly Warning[]
}

export const QUIET_ZONE_MODULES = 4
export const DEFAULT_MODULE_MM = 0.6
/** A phone at arm's length wants 0.51 mm; below 0.4 mm no label is made. */
export const ARMS_LENGTH_MODULE_MM = 0.5
export const SMALLEST_MODULE_MM = 0.4

const VERSIONS: readonly QrVersion[] = [3, 4, 5, 6]
const DATA_CODEWORDS: Readonly<Record<QrVersion, Readonly<Record<QrLevel, number>>>> = {
  3: { M: 44, Q: 34 },
  4: { M: 64, Q: 48 },
  5: { M: 86, Q: 62 },
  6: { M: 108, Q: 76 },
}

/** Characters (alphanumeric) or UTF-8 bytes that fit; 4 mode bits and the count indicator of versions 1 to 9. */
export function qrCapacity(version: QrVersion, level: QrLevel, mode: QrMode): number {
  const bits = 8 * DATA_CODEWORDS[version][level]
  if (mode === 'byte') return Math.floor((bits - 12) / 8)
  const pairs = Math.floor((bits - 13) / 11)
  const rest = bits - 13 - 11 * pairs
  return 2 * pairs + (rest >= 6 ? 1 : 0)
}

/** Upper case letters, digits and `space $ % * + - . / :` take 5.5 bits each; any other text 8 a byte. */
export function qrMode(text: string): QrMode {
  return /^[0-9A-Z $%*+\-./:]*$/.test(text) ? 'alphanumeric' : 'byte'
}

/**
 * The smallest version from 3 to 6 that holds the text. `moduleMm` 0.4 to 10, default 0.6.
 * `E_MISSING`, `QR_TOO_LONG`, `E_RANGE`; `W_QR_SMALL` under 0.5 mm.
 */
export function planQrLabel(label: { text: string; level?: QrLevel; moduleMm?: number }): Outcome<QrLabel> {
  const { text, level = 'Q', moduleMm = DEFAULT_MODULE_MM } = label
  if (typeof text !== 'string' || text === '')
    return failure('E_MISSING', 'text is missing: a label needs the address it opens.', { field: 'text' })
  const mode = qrMode(text)
  const length = mode === 'byte' ? utf8Length(text) : text.length
  const version = VERSIONS.find((candidate) => length <= qrCapacity(candidate, level, mode))
  if (version === undefined) {
    const most = qrCapacity(6, level, mode)
    return failure('QR_TOO_LONG', `The text takes ${length} characters; a label holds ${most}.`, {
      field: 'text',
    })
  }
  const sideMm = qrSideMm(version, moduleMm)
  if (isFailure(sideMm)) return sideMm
  return {
    version,
    level,
    mode,
    modules: 17 + 4 * version,
    moduleMm,
    sideMm,
    warnings: sizeWarnings(moduleMm),
  }
}

/** Side with quiet zone, mm: `(17 + 4 v + 8) X`. Version 1 to 40, module X 0.4 to 10 mm. `E_RANGE`. */
export function qrSideMm(version: number, moduleMm: number): Outcome<number> {
  const bad =
    checkNumber('version', version, 1, 40) ?? checkNumber('moduleMm', moduleMm, SMALLEST_MODULE_MM, 10)
  if (bad) return bad
  if (!Number.isInteger(version))
    return failure('E_RANGE', 'version must be a whole number from 1 to 40.', { field: 'version' })
  return (17 + 4 * version + 2 * QUIET_ZONE_MODULES) * moduleMm
}

/**
 * The smallest module a phone camera resolves at a distance, mm: 4 pixels a module, 4000 pixels across
 * 65 degrees. Distance 1 to 100,000 mm. `E_RANGE`. Our arithmetic.
 */
export function readableModuleMm(distanceMm: number): Outcome<number> {
  const bad = checkNumber('distanceMm', distanceMm, 1, 100_000)
  if (bad) return bad
  const halfAngle = (32.5 * Math.PI) / 180
  return (4 * 2 * distanceMm * Math.tan(halfAngle)) / 4000
}

/** The large label: a tenth of the reading distance. Common practice, no source; generous. `E_RANGE`. */
export function largeLabelSideMm(distanceMm: number): Outcome<number> {
  return checkNumber('distanceMm', distanceMm, 1, 100_000) ?? distanceMm / 10
}

function sizeWarnings(moduleMm: number): Warning[] {
  if (moduleMm >= ARMS_LENGTH_MODULE_MM) return []
  return [
    {
      code: 'W_QR_SMALL',
      message: `Modules of ${moduleMm} mm need the phone closer than arm's length.`,
    },
  ]
}

function utf8Length(text: string): number {
  let bytes = 0
  for (const character of text) {
    const point = character.codePointAt(0) ?? 0
    bytes += point < 0x80 ? 1 : point < 0x800 ? 2 : point < 0x10000 ? 3 : 4
  }
  return bytes
}
