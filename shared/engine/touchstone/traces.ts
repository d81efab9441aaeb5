import type { RecordBlock } from './network-data.ts'
import type { OnePortFile, Trace, TwoPortFile } from './touchstone-file.ts'

type Traces = Pick<OnePortFile, 'ports' | 's11'> | Pick<TwoPortFile, 'ports' | 's11' | 's21' | 's12' | 's22'>

/** Two ports stand as S11 S21 S12 S22 in version 1, unlike every larger count, or as S11 S12 S21 S22. */
export function splitTraces(block: RecordBlock, ports: 1 | 2, isS21First: boolean): Traces {
  const trace = (position: number): Trace => pickTrace(block, position, ports * ports)
  if (ports === 1) return { ports, s11: trace(0) }
  const s21 = trace(isS21First ? 1 : 2)
  const s12 = trace(isS21First ? 2 : 1)
  return { ports, s11: trace(0), s21, s12, s22: trace(3) }
}

function pickTrace({ points, values }: RecordBlock, position: number, perPoint: number): Trace {
  const re = new Float64Array(points)
  const im = new Float64Array(points)
  for (let point = 0; point < points; point++) {
    const at = 2 * (point * perPoint + position)
    re[point] = values[at] as number
    im[point] = values[at + 1] as number
  }
  return { re, im }
}
