import { BANDS, type Band, type Category } from '../vocabulary.ts'
import { antennaPart } from './antenna-part.ts'
import { joinParts, type BandPart } from './band-part.ts'
import { linePart } from './line-part.ts'
import type { Moment } from './moment.ts'
import { radioPower, type RadioPower } from './power-cap.ts'
import { radioPart } from './radio-part.ts'
import { amountText } from './sentences.ts'
import { itemsOf, type FilledPosition } from './slots.ts'
import { transformerPart } from './transformer-part.ts'
import type { BandCapability, Evidence, Reason } from './types.ts'

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
  const power = radioPower(moment.state, filled)
  if (linkIsBroken(filled)) return { bands: promised.map(outOf), reasons: power.reasons, tests: [] }
  const judged = promised.map((band) => ({ band, part: bandPart(moment, filled, power, band) }))
  const level = levelOfLostBands(judged.map(({ part }) => part.state))
  return {
    bands: judged.map(({ band, part }) => capabilityOf(band, part, power)),
    reasons: [...power.reasons, ...judged.flatMap(({ part }) => raise(part, level))],
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
  const nothing = {
    watts: null,
    wattsAtAntenna: null,
    fraction: null,
    lossDb: null,
    testId: null,
    testedOn: null,
  }
  return { band, state: 'out', limit: 'out', ...nothing }
}

function bandPart(
  moment: Moment,
  filled: readonly FilledPosition[],
  power: RadioPower,
  band: Band,
): BandPart {
  return joinParts([
    radioPart(moment, itemsOf(filled, 'radio')[0], power, band),
    linePart(moment, itemsOf(filled, 'feedline', 'jumper', 'filter'), band),
    ...itemsOf(filled, 'transformer').map((item) => transformerPart(moment, item, band)),
    antennaPart(moment, itemsOf(filled, 'antenna'), band),
  ])
}

/** All out: not fit. None left, but some only unproven: not proven. Otherwise a lost band is a limit. */
function levelOfLostBands(states: readonly BandCapability['state'][]): Reason['level'] {
  if (states.some((state) => state === 'proven' || state === 'limited')) return 'limit'
  return states.every((state) => state === 'out') ? 'not-fit' : 'not-proven'
}

/** A band that failed stays a limit beside others that are merely not proven. */
function raise(part: BandPart, level: Reason['level']): readonly Reason[] {
  const weighs = level === 'not-fit' || (level === 'not-proven' && part.state === 'not-proven')
  return weighs ? part.reasons.map((reason) => ({ ...reason, level })) : part.reasons
}

function capabilityOf(band: Band, part: BandPart, power: RadioPower): BandCapability {
  const out = part.state === 'out'
  const watts = Number.isFinite(part.capW) ? part.capW : null
  const fraction = part.lossDb === null ? null : 10 ** (-part.lossDb / 10)
  const oldest = [...part.tests].sort((a, b) => a.performedAt - b.performedAt)[0]
  return {
    band,
    state: part.state,
    watts: out ? null : watts,
    wattsAtAntenna: out || watts === null || fraction === null ? null : watts * fraction,
    fraction: out ? null : fraction,
    lossDb: out ? null : part.lossDb,
    limit: limitText(part, watts, power),
    testId: oldest?.id ?? null,
    testedOn: oldest?.performedOn ?? null,
  }
}

function limitText(part: BandPart, watts: number | null, power: RadioPower): string {
  if (part.state === 'out') return 'out'
  if (part.state === 'not-proven') return 'not proven'
  if (part.state === 'proven') return ''
  if (watts !== null && power.promisedW !== null && watts < power.promisedW)
    return `${amountText(watts)} W at most`
  return 'more loss than its limit'
}
