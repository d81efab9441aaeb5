import { failure, type Failure, type Outcome } from '../outcome.ts'
import type { Layout } from './layout.ts'

/** Numbers in a record: the frequency and two for each S-parameter. */
export const recordSize = (ports: number): number => 1 + 2 * ports * ports

/** `unit-7.s2p` -> 2. Undefined for `.ts`, `.txt` and the like, which say nothing about ports. */
export function portsFromFileName(fileName: string): number | undefined {
  const digits = /\.s(\d{1,6})p$/i.exec(fileName.trim())?.[1]
  return digits === undefined ? undefined : Number(digits)
}

/**
 * One or two ports, from the file's name, its `[Number of Ports]` and its first record; `TS_PORTS` when they
 * disagree or name more than two. Without a name the first record decides: 3 numbers one port, 9 two.
 */
export function settlePorts(layout: Layout, fileName: string | undefined): Outcome<{ ports: 1 | 2 }> {
  const named = fileName === undefined ? undefined : portsFromFileName(fileName)
  const declared = layout.declaredPorts
  if (declared && named !== undefined && named !== declared.ports) {
    const message = `The name says ${named} port(s), [Number of Ports] says ${declared.ports}.`
    return failure('TS_PORTS', message, { line: declared.line })
  }
  const expected = declared?.ports ?? named
  if (expected !== undefined && expected !== 1 && expected !== 2) return tooManyPorts(expected, layout)
  return checkFirstRecord(layout, expected)
}

function checkFirstRecord(layout: Layout, expected: 1 | 2 | undefined): Outcome<{ ports: 1 | 2 }> {
  const record = measureFirstRecord(layout)
  const found = portsOfSize(record.size)
  if (found === undefined) return { ports: expected ?? guessPorts(layout) }
  if (found > 2) return tooManyPorts(found, layout)
  if (expected !== undefined && found !== expected) {
    // The next line cannot be read, so the record may yet be a wrapped one: that line's fault comes first.
    if (record.isOpen && record.size < recordSize(expected)) return { ports: expected }
    const message = `The first record is that of ${found} port(s), the file's name or header says ${expected}.`
    return failure('TS_PORTS', message, { line: layout.data[0]?.line ?? 1 })
  }
  return { ports: found === 1 ? 1 : 2 }
}

/** The record fits no port count, so a line of it is wrong: one or three numbers look like one port. */
function guessPorts({ data }: Layout): 1 | 2 {
  return (data[0]?.count ?? 0) <= 3 ? 1 : 2
}

/** Real files put at most four pairs on a line that continues a record. */
const MAX_CONTINUATION = 8

/** The first line and the lines with an even count that continue it. */
function measureFirstRecord({ data, stoppedBy }: Layout): { size: number; isOpen: boolean } {
  let size = data[0]?.count ?? 0
  if (size % 2 === 0) return { size: 0, isOpen: false }
  for (let at = 1; at < data.length; at++) {
    const count = data[at]?.count ?? 0
    if (count % 2 === 1 || count > MAX_CONTINUATION) return { size, isOpen: false }
    size += count
  }
  return { size, isOpen: stoppedBy !== undefined }
}

function portsOfSize(size: number): number | undefined {
  const ports = Math.round(Math.sqrt((size - 1) / 2))
  return ports > 0 && recordSize(ports) === size ? ports : undefined
}

function tooManyPorts(ports: number, layout: Layout): Failure {
  const message = `The file is of ${ports} ports: one or two can be read.`
  return failure('TS_PORTS', message, { line: layout.data[0]?.line ?? 1 })
}
