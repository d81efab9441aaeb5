import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import {
  ENGINE_LIMITS,
  valueAt,
  type TouchstoneFile,
  type Trace,
} from '#shared/engine/touchstone/touchstone-file.ts'

type Pair = [number, number]

interface ValidCase {
  ports: number
  points: number
  firstHz: number
  lastHz: number
  s11?: Pair
  s21?: Pair
  s12?: Pair
  referenceOhm?: number[]
  noisePoints?: number
  warnings?: string[]
  warningLines?: number[]
}

interface Corpus {
  valid: Record<string, ValidCase>
  hostile: Record<string, { code: string; line: number }>
}

const folder = 'tests/fixtures/touchstone'
const corpus = JSON.parse(readFileSync(`${folder}/expected.json`, 'utf8')) as Corpus

const bytesOf = (path: string): Uint8Array => new Uint8Array(readFileSync(`${folder}/${path}`))

function accepted(source: string | Uint8Array, fileName?: string): TouchstoneFile {
  const file = readTouchstone(source, { fileName, limits: ENGINE_LIMITS })
  if (isFailure(file)) throw new Error(`${file.code} line ${file.line}: ${file.message}`)
  return file
}

function expectFirst(trace: Trace, [re, im]: Pair): void {
  expect(valueAt(trace, 0).re).toBeCloseTo(re, 6)
  expect(valueAt(trace, 0).im).toBeCloseTo(im, 6)
}

describe('the corpus of Touchstone files', () => {
  it.each(['valid', 'hostile'] as const)('lists every %s file', (kind) => {
    expect(readdirSync(`${folder}/${kind}`).sort()).toEqual(Object.keys(corpus[kind]).sort())
  })

  it.each(Object.entries(corpus.valid))('accepts %s', (name, wanted) => {
    const file = accepted(bytesOf(`valid/${name}`), name)
    expect(file.ports).toBe(wanted.ports)
    expect(file.frequencyHz).toHaveLength(wanted.points)
    expect(file.frequencyHz[0]).toBeCloseTo(wanted.firstHz, 3)
    expect(file.frequencyHz.at(-1)).toBeCloseTo(wanted.lastHz, 3)
    expect(file.referenceOhm).toEqual(wanted.referenceOhm ?? Array.from({ length: wanted.ports }, () => 50))
    expect(file.noisePoints).toBe(wanted.noisePoints ?? 0)
    expect(file.info.map((note) => [note.code, note.count])).toEqual(
      wanted.noisePoints ? [['TS_I_NOISE', wanted.noisePoints]] : [],
    )
    expect(file.warnings.map((note) => note.code)).toEqual(wanted.warnings ?? [])
    expect(file.warnings.flatMap((note) => note.line ?? [])).toEqual(wanted.warningLines ?? [])
    if (wanted.s11) expectFirst(file.s11, wanted.s11)
    if (file.ports === 2 && wanted.s21 && wanted.s12) {
      expectFirst(file.s21, wanted.s21)
      expectFirst(file.s12, wanted.s12)
    }
  })

  it.each(Object.entries(corpus.hostile))('refuses %s', (name, wanted) => {
    expect(readTouchstone(bytesOf(`hostile/${name}`), { fileName: name })).toMatchObject(wanted)
  })

  it.each(Object.keys(corpus.valid))('reads %s alike from text and from bytes', (name) => {
    const bytes = bytesOf(`valid/${name}`)
    const text = new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes)
    expect(accepted(text, name)).toEqual(accepted(bytes, name))
  })
})

// Calculation sheet, section 1, check values (scikit-rf).
describe('the check values', () => {
  it.each([
    ['# MHz S DB R 50\n7.1 -20 45', 7_100_000, 0.0707107, 0.0707107, 50],
    ['# kHz S MA R 75\n3600 0.5 -90', 3_600_000, 0, -0.5, 75],
    ['# HZ S RI R 50\n14200000 0.3 -0.4', 14_200_000, 0.3, -0.4, 50],
    ['#\n0.0071 0.25 180', 7_100_000, -0.25, 0, 50],
  ])('reads %j', (text, hz, re, im, ohm) => {
    const file = accepted(text)
    expect(file.frequencyHz[0]).toBeCloseTo(hz, 3)
    expectFirst(file.s11, [re, im])
    expect(file.referenceOhm).toEqual([ohm])
  })

  it.each([
    ['on one line', '7 0.1 10 0.9 20 0.8 30 0.2 40'],
    ['wrapped', '7 0.1 10 0.9 20\n0.8 30 0.2 40'],
  ])('puts S21 before S12 %s', (_, record) => {
    const file = accepted(`# MHz S MA R 50\n${record}`)
    if (file.ports !== 2) throw new Error('two ports')
    expectFirst(file.s11, [0.0984808, 0.0173648])
    expectFirst(file.s21, [0.845723, 0.307818])
    expectFirst(file.s12, [0.69282, 0.4])
    expectFirst(file.s22, [0.153209, 0.128558])
  })
})

describe('messages and notes', () => {
  it('says in the message how to write a decimal comma', () => {
    const refused = readTouchstone('# MHz S MA R 50\n7 1,25 0')
    expect(refused).toMatchObject({
      message: '"1,25" is not a number. Write decimals with a point, not a comma.',
    })
  })

  it('keeps a hostile token out of its messages', () => {
    const refused = readTouchstone(`7 <b>\u202e${'x'.repeat(5000)} 0`)
    expect(isFailure(refused) && refused.message).toBe('"<b>?xxxxxxxxxxxxxxxxxxxx..." is not a number.')
  })

  it('shows the span that follows from a missing option line', () => {
    expect(accepted('0.007 0.1 0\n0.0073 0.1 0').warnings[0]?.message).toBe(
      'There is no option line: read as GHz, magnitude and angle, 50 ohm. Check that. It runs from 7 to 7.3 MHz.',
    )
  })

  it('counts the reflections above 1', () => {
    const file = accepted('# MHz S RI R 50\n7 1 0\n8 1.01 0\n9 0 1.02\n')
    expect(file.warnings).toMatchObject([{ code: 'TS_W_ACTIVE', line: 3, count: 2 }])
  })

  it('does not count gain from port to port as a reflection', () => {
    expect(accepted('# MHz S RI R 50\n7 0 0 1.5 0 1.5 0 0 0\n').warnings).toEqual([])
  })

  it('counts the ports in the data when the name does not end in .s1p or .s2p', () => {
    for (const name of ['sweep.s2p.txt', 'sweep.ts', 's2p', '']) {
      expect(accepted('# MHz S RI R 50\n7 0 0\n', name).ports).toBe(1)
    }
  })
})

describe('limits', () => {
  const points = (count: number): string =>
    Array.from({ length: count }, (_, at) => `${at + 1} 0.1 0`).join('\n')

  it('takes exactly the number of points allowed for an upload and refuses one more with its line', () => {
    const header = '# kHz S MA R 50\n'
    expect(isFailure(readTouchstone(header + points(20_001)))).toBe(false)
    expect(readTouchstone(header + points(20_002))).toMatchObject({
      code: 'TS_TOO_MANY_POINTS',
      line: 20_003,
      field: 'maxPoints',
      message: 'The file has more than 20001 points, the most that is read.',
    })
  })

  it('takes exactly 2 MiB and refuses one byte more, in bytes and in text', () => {
    const text = '# MHz S MA R 50\n7 0.1 0\n!'.padEnd(2_097_152, 'x')
    expect(isFailure(readTouchstone(text))).toBe(false)
    for (const source of [`${text}x`, new TextEncoder().encode(`${text}x`)]) {
      expect(readTouchstone(source)).toMatchObject({
        code: 'TS_TOO_BIG',
        field: 'maxBytes',
        message: 'The file has 2097153 bytes: the limit is 2097152 bytes (2 MiB).',
      })
    }
  })

  it('measures text by its bytes in UTF-8', () => {
    const limits = { maxBytes: 24, maxPoints: 10 }
    const bytes = (text: string): number => new TextEncoder().encode(text).length
    for (const tail of ['é', '€', '😀']) {
      const text = `# MHz S MA\n7 0 0!${tail}`
      expect(isFailure(readTouchstone(text, { limits }))).toBe(bytes(text) > 24)
      expect(isFailure(readTouchstone(text, { limits: { ...limits, maxBytes: bytes(text) } }))).toBe(false)
      expect(isFailure(readTouchstone(text, { limits: { ...limits, maxBytes: bytes(text) - 1 } }))).toBe(true)
    }
  })

  it('reads a line of 2 MiB within the five seconds an upload may take', () => {
    const line = '1 '.repeat(1_048_000)
    const begun = performance.now()
    expect(readTouchstone(`#\n${line}`)).toMatchObject({ code: 'TS_COLUMNS', line: 2 })
    expect(performance.now() - begun).toBeLessThan(5000)
  })

  it('reads 200,000 points in time proportional to their number', () => {
    const timed = (count: number): number => {
      const text = `# Hz S MA R 50\n${points(count)}`
      const begun = process.cpuUsage()
      expect(accepted(text).frequencyHz).toHaveLength(count)
      const { user, system } = process.cpuUsage(begun)
      return (user + system) / 1000
    }
    timed(20_000)
    const small = Math.min(timed(20_000), timed(20_000))
    // Ten times the points; a quadratic reader would take a hundred times as long.
    expect(timed(200_000)).toBeLessThan(40 * Math.max(small, 5))
  })
})
