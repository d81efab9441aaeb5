import { failure, type Failure } from '../outcome.ts'
import type { Layout } from './layout.ts'
import { quoted } from './lex.ts'
import { readNumber } from './read-number.ts'

interface Counted {
  readonly count: number
  readonly line: number
}

/** `[Number of Ports] 2` -> `number of ports`, `2`. The name is empty when the bracket does not close. */
export function readKeyword(text: string): { name: string; value: string } {
  const match = /^\[([^\]]*)\](.*)$/.exec(text)
  const name = (match?.[1] ?? '').trim().toLowerCase().replace(/\s+/g, ' ')
  return { name, value: (match?.[2] ?? '').trim() }
}

/** The keywords above `[Network Data]` (specification 2.0 and 2.1; keyword list confirmed). */
export class Version2Header {
  private version: '2.0' | '2.1' | undefined
  private ports: { ports: 1 | 2; line: number } | undefined
  private dataOrder: '12_21' | '21_12' | undefined
  private points: Counted | undefined
  private noisePoints: Counted | undefined
  private reference: { values: number[]; line: number } | undefined

  take(name: string, value: string, source: { line: number; text: string }): Failure | undefined {
    const { line } = source
    switch (name) {
      case 'version':
        return this.takeVersion(value, line)
      case 'number of ports':
        return this.takePorts(value, line)
      case 'two-port data order':
        return this.takeOrder(value, line)
      case 'number of frequencies':
        return this.takeCount(value, line, (counted) => (this.points = counted))
      case 'number of noise frequencies':
        return this.takeCount(value, line, (counted) => (this.noisePoints = counted))
      case 'matrix format':
        return value.toLowerCase() === 'full' ? undefined : unsupported(source, 'Full')
      case 'mixed-mode order':
        return unsupported(source, 'single-ended ports')
      case 'begin information':
        return undefined
      default:
        return failure('TS_V2_KEYWORD', `The keyword ${quoted(source.text)} is not known here.`, { line })
    }
  }

  openReference(value: string, line: number): Failure | undefined {
    const values: number[] = []
    for (const token of value.split(/\s+/).filter((part) => part !== '')) {
      const ohm = readNumber(token)
      if (ohm === undefined) return failure('TS_NUMBER', `${quoted(token)} is not a number.`, { line })
      values.push(ohm)
    }
    this.reference = { values, line }
    return undefined
  }

  addReference(values: readonly number[]): void {
    for (const ohm of values) this.reference?.values.push(ohm)
  }

  /** Runs where the list ends; when the number of ports is not known yet, `checkComplete` runs it again. */
  closeReference(): Failure | undefined {
    if (!this.reference) return undefined
    const { values, line } = this.reference
    const lowest = values.find((ohm) => ohm <= 0)
    if (lowest !== undefined) {
      return failure('TS_V2_REFERENCE', `A reference of ${lowest} ohm: each must be above 0.`, { line })
    }
    if (!this.ports || values.length === this.ports.ports) return undefined
    const message = `[Reference] lists ${values.length} resistances for ${this.ports.ports} port(s).`
    return failure('TS_V2_REFERENCE', message, { line })
  }

  /** Before the data begin: ports known, their order known, a resistance for each. */
  checkComplete(line: number): Failure | undefined {
    if (!this.ports) return failure('TS_PORTS', '[Number of Ports] is missing above the data.', { line })
    if (this.ports.ports === 2 && !this.dataOrder) {
      return failure('TS_V2_ORDER', '[Two-Port Data Order] is missing: write 12_21 or 21_12.', { line })
    }
    return this.closeReference()
  }

  checkNoiseAllowed(line: number): Failure | undefined {
    if (this.ports?.ports === 2) return undefined
    return failure('TS_NOISE', 'Only a two-port file can hold noise data.', { line })
  }

  checkNoiseCount(found: number): Failure | undefined {
    if (!this.noisePoints || this.noisePoints.count === found) return undefined
    const { count, line } = this.noisePoints
    return failure('TS_V2_COUNT', `The file promises ${count} noise lines and holds ${found}.`, { line })
  }

  result(): Pick<Layout, 'version' | 'declaredPorts' | 'referenceOhm' | 'isS21First' | 'expectedPoints'> {
    return {
      version: this.version ?? '2.0',
      declaredPorts: this.ports,
      referenceOhm: this.reference?.values,
      isS21First: this.dataOrder !== '12_21',
      expectedPoints: this.points,
    }
  }

  private takeVersion(value: string, line: number): Failure | undefined {
    if (this.version) return failure('TS_V2_KEYWORD', '[Version] stands twice.', { line })
    if (value !== '2.0' && value !== '2.1') {
      return failure('TS_V2_UNSUPPORTED', `Version ${quoted(value)} is not read: 2.0 and 2.1 are.`, { line })
    }
    this.version = value
    return undefined
  }

  private takePorts(value: string, line: number): Failure | undefined {
    const ports = readNumber(value)
    if (ports === undefined) return failure('TS_NUMBER', `${quoted(value)} is not a number.`, { line })
    if (ports !== 1 && ports !== 2) {
      return failure('TS_PORTS', `The file has ${ports} ports: one or two can be read.`, { line })
    }
    this.ports = { ports, line }
    return undefined
  }

  private takeOrder(value: string, line: number): Failure | undefined {
    if (value !== '12_21' && value !== '21_12') {
      return failure('TS_V2_ORDER', `${quoted(value)} is no data order: write 12_21 or 21_12.`, { line })
    }
    this.dataOrder = value
    return undefined
  }

  private takeCount(value: string, line: number, keep: (counted: Counted) => void): Failure | undefined {
    const count = readNumber(value)
    if (count === undefined) return failure('TS_NUMBER', `${quoted(value)} is not a number.`, { line })
    if (!Number.isInteger(count) || count < 0) {
      return failure('TS_V2_COUNT', `A count of ${count} makes no sense.`, { line })
    }
    keep({ count, line })
    return undefined
  }
}

function unsupported({ line, text }: { line: number; text: string }, supported: string): Failure {
  return failure('TS_V2_UNSUPPORTED', `${quoted(text)} is not read: only ${supported}.`, { line })
}
