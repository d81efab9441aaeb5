import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import type { Complex } from '#shared/engine/complex.ts'
import { lineLossFromReflection } from '#shared/engine/feedline-measured.ts'
import { lossWithSwr } from '#shared/engine/feedline-loss.ts'
import { gammaFromImpedance, reflectionFromImpedance } from '#shared/engine/impedance.ts'
import { pairLoss } from '#shared/engine/pair-loss.ts'
import { renormaliseGamma } from '#shared/engine/renormalise.ts'
import { threeTermination } from '#shared/engine/three-termination.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import { efficiencyIntoLoad } from '#shared/engine/two-port-power.ts'
import { expectClose } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

/** Vectors made by scripts/vectors: rf-networks.py (scikit-rf) and spice-transformers.py (ngspice). */
type Pair = [number, number]
type Readings<T> = Record<'open' | 'short' | 'load', T>

interface RfNetworks {
  loadOhm: number
  twoPorts: {
    s11: Pair
    s22: Pair
    p: Pair
    readings: Readings<Pair>
    readingsAt75Ohm: Readings<Pair>
    openWith3Pf: Pair
    efficiency: number
    otherLoads: { ohm: Pair; efficiency: number }[]
    gMax: number
  }[]
  pairs: { s11: Pair; s21: Pair; s12: Pair; s22: Pair; forwardDb: number; reverseDb: number }[]
  lines: {
    matchedDb: number
    swrAtLoad: number
    totalDb: number
    swrAtTransmitter: number
    farEndOpen: Pair
    farEndShort: Pair
    s: { s11: Pair; s21: Pair }
  }[]
  reflections: { z: Pair; z0Ohm: number; gamma: Pair; swr: number; returnLossDb: number }[]
  touchstone: { ports: number; ohm: number; text: string; frequencyHz: number[]; traces: Pair[][] }[]
}

interface SpiceTransformer {
  name: string
  loadOhm: number
  points: {
    mhz: number
    readings: Readings<Pair>
    efficiency: number
    otherLoads: { ohm: number; efficiency: number }[]
    pair: { s11: Pair; s21: Pair; lossDb: number }
  }[]
}

const vectors = (name: string): unknown =>
  JSON.parse(readFileSync(`tests/fixtures/vectors/${name}.json`, 'utf8'))
const networks = vectors('rf-networks') as RfNetworks
const transformers = vectors('spice-transformers') as SpiceTransformer[]

const complex = ([re, im]: Pair): Complex => ({ re, im })
const complexReadings = ({ open, short, load }: Readings<Pair>): Readings<Complex> => ({
  open: complex(open),
  short: complex(short),
  load: complex(load),
})

/** The vectors carry twelve digits; what amplifies their rounding is a small |Go - Gs|, here 0.2 at least. */
const RELATIVE = 1e-6
function expectPair(actual: Complex, [re, im]: Pair): void {
  expectClose(actual.re, re, RELATIVE)
  expectClose(actual.im, im, RELATIVE)
}

describe('random reciprocal passive two-ports of scikit-rf', () => {
  const { loadOhm } = networks
  const setup = { frequencyHz: 7.1e6, loadOhm }

  it.each(networks.twoPorts)('number %# is recovered from its three terminations', (network) => {
    const found = valueOf(threeTermination(complexReadings(network.readings), setup))
    expectPair(found.s11, network.s11)
    expectPair(found.s22, network.s22)
    expectPair(found.p, network.p)
    expectClose(found.efficiency, network.efficiency, RELATIVE)
    expectClose(found.gMax, network.gMax, RELATIVE)
    for (const { ohm, efficiency } of network.otherLoads) {
      const other = valueOf(efficiencyIntoLoad(found, complex(ohm), loadOhm))
      expectClose(other.efficiency, efficiency, RELATIVE)
    }
  })

  it.each(networks.twoPorts)('number %# is recovered through an open with 3 pF', (network) => {
    const readings = { ...complexReadings(network.readings), open: complex(network.openWith3Pf) }
    const found = valueOf(threeTermination(readings, { ...setup, openStrayPf: 3 }))
    expectPair(found.s22, network.s22)
    expectPair(found.p, network.p)
    expectClose(found.efficiency, network.efficiency, RELATIVE)
  })

  it.each(networks.twoPorts)('number %# reads the same from 75 ohm', (network) => {
    for (const name of ['open', 'short', 'load'] as const) {
      const at50 = renormaliseGamma(complex(network.readingsAt75Ohm[name]), 75, 50)
      expectPair(valueOf(at50), network.readings[name])
    }
  })
})

describe('pairs of unlike two-ports of scikit-rf', () => {
  it.each(networks.pairs)('number %# loses the same in both directions', (joined) => {
    const reading = {
      s11: complex(joined.s11),
      s21: complex(joined.s21),
      s12: complex(joined.s12),
      s22: complex(joined.s22),
    }
    const found = valueOf(pairLoss(reading))
    expectClose(found.forward.lossDb, joined.forwardDb, RELATIVE)
    expectClose(found.reverse.lossDb, joined.reverseDb, RELATIVE)
    expectClose(found.differenceDb, joined.forwardDb - joined.reverseDb, RELATIVE)
    expect(found.warnings.map((warning) => warning.code)).not.toContain('W_NOT_RECIPROCAL')
  })
})

describe('lossy lines of scikit-rf', () => {
  it.each(networks.lines)('number %# has the total loss and the SWR of the simulation', (line) => {
    const found = valueOf(lossWithSwr(line.matchedDb, { swrAtLoad: line.swrAtLoad }))
    expectClose(found.totalDb, line.totalDb, RELATIVE)
    expectClose(found.swrAtTransmitter, line.swrAtTransmitter, RELATIVE)
  })

  it.each(networks.lines)('number %# is measured from one end', (line) => {
    for (const gamma of [line.farEndOpen, line.farEndShort]) {
      expectClose(valueOf(lineLossFromReflection(complex(gamma))).lossDb, line.matchedDb, RELATIVE)
    }
  })
})

describe('impedances of scikit-rf', () => {
  it.each(networks.reflections)(
    'number %# has the same reflection',
    ({ z, z0Ohm, gamma, swr, returnLossDb }) => {
      expectPair(valueOf(gammaFromImpedance(complex(z), z0Ohm)), gamma)
      const found = valueOf(reflectionFromImpedance(complex(z), z0Ohm))
      expectClose(found.swr, swr, RELATIVE)
      expectClose(found.returnLossDb, returnLossDb, RELATIVE)
    },
  )
})

describe('Touchstone text of scikit-rf', () => {
  it.each(networks.touchstone)('number %# reads back', ({ ports, ohm, text, frequencyHz, traces }) => {
    const file = valueOf(readTouchstone(text))
    expect(file.ports).toBe(ports)
    expect(file.referenceOhm).toEqual(Array.from({ length: ports }, () => ohm))
    frequencyHz.forEach((hz, point) => expectClose(file.frequencyHz[point], hz, 1e-12))
    const found = file.ports === 1 ? [file.s11] : [file.s11, file.s21, file.s12, file.s22]
    traces.forEach((trace, at) =>
      trace.forEach(([re, im], point) => {
        expectClose(found[at]?.re[point], re, RELATIVE)
        expectClose(found[at]?.im[point], im, RELATIVE)
      }),
    )
  })
})

describe.each(transformers)('the $name transformer of ngspice', ({ loadOhm, points }) => {
  it.each(points)('has its simulated efficiency at $mhz MHz', ({ mhz, readings, efficiency, otherLoads }) => {
    const found = valueOf(threeTermination(complexReadings(readings), { frequencyHz: mhz * 1e6, loadOhm }))
    expectClose(found.efficiency, efficiency, RELATIVE)
    expect(found.gMax).toBeGreaterThan(found.efficiency)
    for (const other of otherLoads) {
      const into = valueOf(efficiencyIntoLoad(found, { re: other.ohm, im: 0 }, loadOhm))
      expectClose(into.efficiency, other.efficiency, RELATIVE)
    }
  })

  it.each(points)('loses in a pair what was simulated at $mhz MHz', ({ pair }) => {
    const [reflected, through] = [complex(pair.s11), complex(pair.s21)]
    const found = valueOf(pairLoss({ s11: reflected, s22: reflected, s21: through, s12: through }))
    expectClose(found.lossDb, pair.lossDb, RELATIVE)
  })
})
