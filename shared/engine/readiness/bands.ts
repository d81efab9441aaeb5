import { BANDS, type Band, type Category } from '../vocabulary.ts'
import { antennaPart } from './antenna-part.ts'
import { asSupporting, joinParts, type BandPart } from './band-part.ts'
import { linePart } from './line-part.ts'
import type { Moment } from './moment.ts'
import { weakestFeed } from './power-cap.ts'
import { radioPart } from './radio-part.ts'
import { atAntennaText, bandLimitText } from './sentences.ts'
import { isSupportingOnly, itemsOf, vitalItemsOf, type FilledPosition } from './slots.ts'
import { transformerPart } from './transformer-part.ts'
import type { BandCapability, Reason } from './period-types.ts'
import type { Evidence, ReadinessItem } from './types.ts'

export interface JudgedBands {
  readonly bands: readonly BandCapability[]
  readonly reasons: readonly Reason[]
  readonly tests: readonly Evidence[]
}

/**
 * Judges every promised band end to end: radio, feedline, transformer, antenna. Where no promised band is left, what
 * limits a band weighs on the whole kit.
 */
export function judgeBands(moment: Moment, filled: readonly FilledPosition[]): JudgedBands {
  const promised = BANDS.filter((band) => moment.state.promise.bands.includes(band))
  if (promised.length === 0) return { bands: [], reasons: [], tests: [] }
  if (linkIsBroken(filled)) return { bands: promised.map(outOf), reasons: [], tests: [] }
  const chain = chainOf(filled)
  const judged = promised.map((band) => ({ band, part: bandPart(moment, chain, band) }))
  const heaviest = weightOfLostBands(judged.map(({ part }) => part.state))
  return {
    bands: judged.map(({ band, part }) => capabilityOf(band, part, moment.state.promise.watts)),
    reasons: judged.flatMap(({ part }) => reasonsOf(part, heaviest)),
    tests: judged.flatMap(({ part }) => part.tests),
  }
}

const CHAIN: readonly Category[] = ['radio', 'transformer', 'feedline', 'antenna']

/** A link of the transmit chain that the load plan calls vital does not work: the position itself says why. */
function linkIsBroken(filled: readonly FilledPosition[]): boolean {
  return filled.some(
    ({ position, working }) =>
      position.vital && CHAIN.includes(position.category) && working.length < position.quantity,
  )
}

function outOf(band: Band): BandCapability {
  const nothing = { watts: null, wattsAtAntenna: null, fraction: null, lossDb: null }
  return {
    band,
    state: 'out',
    limit: bandLimitText('out', null, null),
    ...nothing,
    testId: null,
    testedOn: null,
  }
}

/** What transmits, sorted once for all bands. */
interface Chain {
  readonly filled: readonly FilledPosition[]
  readonly radios: readonly ReadinessItem[]
  readonly feed: ReadinessItem | undefined
  readonly lines: readonly ReadinessItem[]
  readonly transformers: readonly ReadinessItem[]
  readonly antennas: readonly ReadinessItem[]
}

const LINES: readonly Category[] = ['feedline', 'jumper', 'filter']

function chainOf(filled: readonly FilledPosition[]): Chain {
  return {
    filled,
    radios: itemsOf(filled, 'radio'),
    feed: weakestFeed(filled),
    // Lines follow each other, so a spare one counts only where no other does the work.
    lines: LINES.flatMap((category) =>
      isSupportingOnly(filled, category) ? itemsOf(filled, category) : vitalItemsOf(filled, category),
    ),
    transformers: itemsOf(filled, 'transformer'),
    antennas: itemsOf(filled, 'antenna'),
  }
}

function bandPart(moment: Moment, chain: Chain, band: Band): BandPart {
  const weigh = (category: Category, part: BandPart) =>
    isSupportingOnly(chain.filled, category) ? asSupporting(part) : part
  return joinParts([
    weigh('radio', radioPart(moment, chain, band)),
    ...chain.lines.map((line) => weigh(line.category, linePart(moment, [line], band))),
    weigh('transformer', transformerPart(moment, chain.transformers, band)),
    weigh('antenna', antennaPart(moment, chain.antennas, band)),
  ])
}

/** All out: not fit. None left, but some only unproven: not proven. Otherwise a lost band is a limit. */
function weightOfLostBands(states: readonly BandCapability['state'][]): Reason['level'] {
  if (states.some((state) => state === 'proven' || state === 'limited')) return 'limit'
  return states.every((state) => state === 'out') ? 'not-fit' : 'not-proven'
}

const WEIGHT = { 'not-fit': 3, 'not-proven': 2, limit: 1, note: 0 } as const

/** No reason weighs more than the bands that are left allow: a band that failed is a limit beside others that work. */
function reasonsOf(part: BandPart, heaviest: Reason['level']): readonly Reason[] {
  const watts = wattsOf(part)
  return part.reasons.map((reason) => ({
    ...reason,
    level: WEIGHT[reason.level] > WEIGHT[heaviest] ? 'limit' : reason.level,
    text: TELLS_WATTS.has(reason.code) ? atAntennaText(reason.text, watts.wattsAtAntenna) : reason.text,
  }))
}

/** Failures that leave fewer watts: the sentence says how many reach the antenna. */
const TELLS_WATTS: ReadonlySet<string> = new Set([
  'efficiency-low',
  'feedline-failed',
  'heat-capped',
  'radio-power-low',
])

function wattsOf({ state, capW, lossDb }: BandPart) {
  const watts = state !== 'out' && Number.isFinite(capW) ? capW : null
  const fraction = state === 'out' || lossDb === null ? null : 10 ** (-lossDb / 10)
  return { watts, fraction, wattsAtAntenna: watts === null || fraction === null ? null : watts * fraction }
}

function capabilityOf(band: Band, part: BandPart, promisedW: number | null): BandCapability {
  const watts = wattsOf(part)
  const oldest = [...part.tests].sort((a, b) => a.performedAt - b.performedAt)[0]
  return {
    band,
    state: part.state,
    ...watts,
    lossDb: part.state === 'out' ? null : part.lossDb,
    limit: bandLimitText(part.state, watts.watts, promisedW),
    testId: oldest?.id ?? null,
    testedOn: oldest?.performedOn ?? null,
  }
}
