import { checkPositive } from './check-range.ts'
import { DB_PER_S_UNIT } from './efficiency.ts'
import { lossWithSwr } from './feedline-loss.ts'
import { checkNumber, failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'

/** Everything between the radio and the antenna at one frequency. A link that is not known is null. */
export interface ChainLinks {
  /** Net output of the radio as it is, folded back or not: above 0, up to 1e6 W. */
  readonly transmitterW: number
  /** Matched loss of the line, from its test or its table, 0..1000 dB. */
  readonly lineMatchedDb: number | null
  /** SWR at the transformer's 50 ohm side, or at the antenna where there is none: 1..1e6. */
  readonly swrAtLoad: number | null
  /** Of the transformer: above 0, up to 1; 1 when there is none. */
  readonly efficiency: number | null
  /** 0 unless a person enters one, 0..100 dB. */
  readonly connectorLossDb?: number
  /** Antenna gain, -40..40 dBi; without it there is no EIRP. */
  readonly gainDbi?: number
}

export interface RfChain {
  /** Total loss of line and connectors with the SWR there is, dB. */
  readonly lineDb: number
  readonly lineHeatW: number
  readonly intoTransformerW: number
  readonly transformerHeatW: number
  readonly antennaW: number
  /** From the radio to the antenna, dB and S-units. */
  readonly totalDb: number
  readonly sUnits: number
  readonly eirpW: number | null
  readonly warnings: readonly Warning[]
}

const LINK_NAMES = {
  lineMatchedDb: 'the loss of the line',
  swrAtLoad: 'the SWR',
  efficiency: 'the efficiency of the transformer',
} as const

/**
 * What reaches the antenna and where the rest went: `Px = P 10^(-line/10)`, `Pa = Px eta`. Mismatch loss is
 * not added: the line loss holds what the SWR does. `E_MISSING` names every link that is not known and gives
 * no total; `E_RANGE` outside the ranges of `ChainLinks`. Source: sections 4, 5 and 8 of the calculation
 * sheet.
 */
export function rfChain(links: ChainLinks): Outcome<RfChain> {
  const { transmitterW, lineMatchedDb, swrAtLoad, efficiency, connectorLossDb = 0, gainDbi } = links
  if (lineMatchedDb === null || swrAtLoad === null || efficiency === null) return missingLinks(links)
  const bad = checkLinks({ ...links, swrAtLoad, efficiency })
  if (bad) return bad
  const line = lossWithSwr(lineMatchedDb, { swrAtLoad })
  if (isFailure(line)) return line
  const lineDb = line.totalDb + connectorLossDb
  const intoTransformerW = transmitterW * 10 ** (-lineDb / 10)
  const antennaW = intoTransformerW * efficiency
  const totalDb = lineDb - 10 * Math.log10(efficiency)
  return {
    lineDb,
    lineHeatW: transmitterW - intoTransformerW,
    intoTransformerW,
    transformerHeatW: intoTransformerW - antennaW,
    antennaW,
    totalDb,
    sUnits: totalDb / DB_PER_S_UNIT,
    eirpW: gainDbi === undefined ? null : antennaW * 10 ** (gainDbi / 10),
    warnings: line.warnings,
  }
}

function missingLinks(links: ChainLinks): Failure {
  const missing = (['lineMatchedDb', 'swrAtLoad', 'efficiency'] as const).filter(
    (link) => links[link] === null,
  )
  const names = missing.map((link) => LINK_NAMES[link]).join(' and ')
  return failure('E_MISSING', `No total without ${names}.`, { field: missing[0] })
}

function checkLinks(links: ChainLinks): Failure | undefined {
  return (
    checkPositive('transmitterW', links.transmitterW, 1e6) ??
    checkNumber('lineMatchedDb', links.lineMatchedDb, 0, 1000) ??
    checkNumber('swrAtLoad', links.swrAtLoad, 1, 1e6) ??
    checkPositive('efficiency', links.efficiency, 1) ??
    checkNumber('connectorLossDb', links.connectorLossDb ?? 0, 0, 100) ??
    checkNumber('gainDbi', links.gainDbi ?? 0, -40, 40)
  )
}
