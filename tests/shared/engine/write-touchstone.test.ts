import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isFailure } from '#shared/engine/outcome.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import type { OnePortFile, TouchstoneFile, Trace } from '#shared/engine/touchstone/touchstone-file.ts'
import { writeTouchstone, type WriteTouchstoneOptions } from '#shared/engine/touchstone/write-touchstone.ts'

function parsed(text: string): TouchstoneFile {
  const file = readTouchstone(text)
  if (isFailure(file)) throw new Error(`${file.code} line ${file.line}: ${file.message}\n${text}`)
  return file
}

function written(file: TouchstoneFile, options?: WriteTouchstoneOptions): string {
  const text = writeTouchstone(file, options)
  if (isFailure(text)) throw new Error(text.message)
  return text
}

const number = fc
  .double({ min: -5, max: 5, noNaN: true })
  .map((value) => String(value))
  .filter((text) => text !== '-0')
const hertz = fc.uniqueArray(
  fc.double({ min: 0, max: 99e9, noNaN: true }).map((hz) => hz + 0),
  {
    minLength: 1,
    maxLength: 20,
  },
)

/** The text of a random file: random format, unit, ports, line ends, wraps and comments. */
const fileText = fc
  .record({
    unit: fc.constantFrom('Hz', 'kHz', 'MHz', 'GHz'),
    format: fc.constantFrom('MA', 'DB', 'RI'),
    ports: fc.constantFrom(1, 2),
    ohm: fc.double({ min: 0.1, max: 1e4, noNaN: true }),
    hertz,
    eol: fc.constantFrom('\n', '\r\n', '\r'),
    isWrapped: fc.boolean(),
    numbers: fc.array(number, { minLength: 8, maxLength: 8 }),
  })
  .map(({ unit, format, ports, ohm, hertz, eol, isWrapped, numbers }) => {
    const factor = { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9 }[unit]
    const values = numbers.slice(0, 2 * ports * ports)
    if (format === 'MA')
      for (let at = 0; at < values.length; at += 2) values[at] = values[at]?.replace('-', '') ?? ''
    const cut = isWrapped && ports === 2 ? 4 : values.length
    const scaled = [...new Set(hertz.map((hz) => hz / factor))].sort((a, b) => a - b)
    const rows = scaled.map((frequency) => {
      const tail = values.slice(cut)
      return [
        `${frequency} ${values.slice(0, cut).join(' ')} ! ${ports}`,
        ...(tail.length ? [tail.join('\t')] : []),
      ]
    })
    return [`# ${unit} S ${format} R ${ohm}`, ...rows.flat()].join(eol)
  })
  // Two frequencies may fall together when they are scaled up again.
  .filter((text) => !isFailure(readTouchstone(text)))

describe('writeTouchstone', () => {
  it('gives back the same file bit for bit, whatever the file was', () => {
    fc.assert(
      fc.property(fileText, (text) => {
        const file = parsed(text)
        // The warnings speak of lines, and a wrapped record or a comment moves those.
        expect({ ...parsed(written(file)), warnings: [] }).toEqual({ ...file, warnings: [] })
      }),
      { numRuns: 300 },
    )
  })

  it('gives back the same values to rounding in every unit and format', () => {
    const unit = fc.constantFrom('Hz', 'kHz', 'MHz', 'GHz')
    const format = fc.constantFrom('MA', 'DB', 'RI')
    const spread =
      '# MHz S RI R 50\n1.8 0.1 0.2 0 0 -0.5 1e-9 0.3 -0.3\n7.1 0.1 0.2 0.7 0 -0.5 1e-9 0.3 -0.3\n'
    fc.assert(
      fc.property(unit, format, (unit, format) => {
        const file = parsed(spread)
        const again = parsed(written(file, { unit, format }))
        if (file.ports !== 2 || again.ports !== 2) throw new Error('two ports')
        expectClose(again.s11, file.s11)
        expectClose(again.s21, file.s21)
        expectClose(again.s12, file.s12)
        expectClose(again.s22, file.s22)
        expect(again.frequencyHz[1]).toBeCloseTo(7.1e6, 3)
      }),
    )
  })

  it('keeps a comment on its own line', () => {
    const file = parsed('# MHz S RI R 50\n7 0.5 0')
    const text = written(file, { comments: ['unit 7\n9 0.5 0\u0000'] })
    expect(text).toBe('! unit 7 9 0.5 0 \n# Hz S RI R 50\n7000000 0.5 0\n')
    expect(parsed(text)).toEqual(file)
  })

  it('refuses two different references, which version 1 cannot say', () => {
    const file = parsed('# MHz S RI R 50\n7 0 0 1 0 1 0 0 0')
    expect(writeTouchstone({ ...file, referenceOhm: [50, 75] })).toMatchObject({ code: 'E_REFERENCE' })
  })
})

function expectClose(ours: Trace, theirs: Trace): void {
  for (const part of ['re', 'im'] as const) {
    ours[part].forEach((value, point) => expect(value).toBeCloseTo(theirs[part][point] ?? NaN, 12))
  }
}

describe('readTouchstone on any input', () => {
  const piece = fc.constantFrom(
    ...['# MHz S RI R 50', '#', '[Version] 2.0', '[Number of Ports] 2', '[Two-Port Data Order] 12_21'],
    ...['[Number of Frequencies] 2', '[Reference] 50', '[Network Data]', '[Noise Data]', '[End]', '[', ']'],
    ...[
      '[Begin Information]',
      '[End Information]',
      '[Matrix Format] Full',
      'R 50',
      '1e999',
      '-',
      '!',
      '\r',
      '\n',
    ],
    ...['\t', ' ', '7', '8 0.1 0', '9 1 0 1 0 1 0 1 0', '2 1 1 1 1', '0.5 0', '\0', '\ufeff', 'é', '1,5'],
  )
  const source = fc.oneof(
    fc.array(piece, { maxLength: 30 }).map((pieces) => pieces.join('\n')),
    fc.array(piece, { maxLength: 30 }).map((pieces) => pieces.join(' ')),
    fc.string({ unit: 'binary', maxLength: 200 }),
    fc.uint8Array({ maxLength: 200 }),
  )
  const fileName = fc.constantFrom(undefined, 'a.s1p', 'a.s2p', 'a.s3p', '.s2p', 'a.ts', 'a.s999999p')

  it('answers with finite values or with a failure on a line of the file', () => {
    fc.assert(
      fc.property(source, fileName, (source, fileName) => {
        const file = readTouchstone(source, { fileName })
        if (isFailure(file)) {
          expect(file.code).toMatch(/^TS_[A-Z0-9_]+$/)
          expect(file.line).toBeGreaterThanOrEqual(1)
        } else expectFinite(file)
      }),
      { numRuns: 1500 },
    )
  })

  function expectFinite(file: TouchstoneFile | OnePortFile): void {
    const traces = file.ports === 1 ? [file.s11] : [file.s11, file.s21, file.s12, file.s22]
    const arrays = [file.frequencyHz, ...traces.flatMap((trace) => [trace.re, trace.im])]
    for (const array of arrays) {
      expect(array).toHaveLength(file.frequencyHz.length)
      expect(array.every((value) => Number.isFinite(value))).toBe(true)
    }
  }
})
