/** Analyzer files for tests of procedures, as text. */
import { add, divide, multiply, ONE, subtract, type Complex } from '#shared/engine/complex.ts'
import { reflectionOfStrayOpen, solveIdealTerminations } from '#shared/engine/terminations.ts'
import { valueOf } from './value-of.ts'
import { readVectors } from './vectors.ts'

type Pair = readonly [number, number]

interface TransformerVector {
  readonly name: string
  readonly loadOhm: number
  readonly points: readonly {
    readonly mhz: number
    readonly readings: { readonly open: Pair; readonly short: Pair; readonly load: Pair }
    readonly efficiency: number
    readonly pair: { readonly s11: Pair; readonly s21: Pair; readonly lossDb: number }
  }[]
}

/** The transformer of the calculation sheet, section 4: ngspice, see `scripts/vectors/spice-transformers.py`. */
export const TRANSFORMER = readVectors<readonly TransformerVector[]>('spice-transformers')[0]!

const HEAD = '# MHz S RI R 50\n'

export function onePort(points: readonly { mhz: number; gamma: Pair }[]): string {
  return HEAD + points.map(({ mhz, gamma: [re, im] }) => `${mhz} ${re} ${im}\n`).join('')
}

/** One termination of the sheet's transformer. */
export function termination(name: 'open' | 'short' | 'load'): string {
  return onePort(TRANSFORMER.points.map(({ mhz, readings }) => ({ mhz, gamma: readings[name] })))
}

/** The open trace with a stray capacitance on the open alone, which the other two do not have. */
export function strayOpen(pf: number): string {
  const complex = ([re, im]: Pair): Complex => ({ re, im })
  const points = TRANSFORMER.points.map(({ mhz, readings: { open, short, load } }) => {
    const ideal = { open: complex(open), short: complex(short), load: complex(load) }
    const { s11, s22, p } = valueOf(solveIdealTerminations(ideal))
    const stray = reflectionOfStrayOpen(mhz * 1e6, pf, TRANSFORMER.loadOhm)
    const { re, im } = add(s11, divide(multiply(p, stray), subtract(ONE, multiply(s22, stray))))
    return { mhz, gamma: [re, im] as Pair }
  })
  return onePort(points)
}

/** Two of the sheet's transformers back to back; `weaken` makes the way back worse than the way there. */
export function pairFile(weaken = 1): string {
  const lines = TRANSFORMER.points.map(({ mhz, pair: { s11, s21 } }) => {
    const back = s21.map((part) => part * weaken)
    return [mhz, ...s11, ...s21, ...back, ...s11].join(' ')
  })
  return `${HEAD}${lines.join('\n')}\n`
}

/** The sheet's resonant antenna, section 7: `Z = R + j R Q (f/f0 - f0/f)`, every 10 kHz unless told. */
export function antennaFile(
  { ohm, q, mhz }: { ohm: number; q: number; mhz: number },
  [from, to, step]: readonly [number, number, number] = [6.8, 7.5, 0.01],
): string {
  const count = Math.round((to - from) / step)
  const points = Array.from({ length: count + 1 }, (_, n) => {
    const f = Number((from + n * step).toFixed(6))
    const x = ohm * q * (f / mhz - mhz / f)
    const size = (ohm + 50) ** 2 + x * x
    const gamma: Pair = [((ohm - 50) * (ohm + 50) + x * x) / size, (2 * 50 * x) / size]
    return { mhz: f, gamma }
  })
  return onePort(points)
}

/** A line of this loss with its far end open, as its near end reflects: the size falls with twice the loss. */
export function openLineFile(lossDb: number, mhz: readonly number[] = [144, 145, 146, 147, 148]): string {
  const size = 10 ** (-lossDb / 10)
  return onePort(mhz.map((f) => ({ mhz: f, gamma: [size * Math.cos(f), size * Math.sin(f)] })))
}

/** A matched line between two ports. */
export function throughLineFile(lossDb: number, mhz: readonly number[] = [144, 146, 148]): string {
  const through = 10 ** (-lossDb / 20)
  return HEAD + mhz.map((f) => `${f} 0 0 ${through} 0 ${through} 0 0 0\n`).join('')
}
