import type { LoadShare } from '../load-profile.ts'
import { currentAtPower } from '../procedures/radio-currents.ts'
import { doubtAbout } from './doubt.ts'
import { extrasText, loadBasisText, loadText, useText, type LoadBasis } from './endurance-words.ts'
import type { Moment } from './moment.ts'
import { itemsOf, type FilledPosition } from './slots.ts'
import { stationUse, type StationUse } from './station-use.ts'
import type { ReadinessItem } from './types.ts'

/**
 * What the station draws over time (calculation sheet, section 10): the current of full power for the share of the time
 * that its kind transmits at it, that of receiving for the rest. Currents that a dated radio check measured come first,
 * then a mean load that somebody wrote down, then what the radio's record says.
 */
export interface StationLoad {
  readonly profile: readonly LoadShare[]
  readonly meanA: number
  readonly use: StationUse
  readonly basis: LoadBasis
  /** What it rests on, a sentence each. */
  readonly factors: readonly string[]
}

/** Computers give their power at a voltage of their own; counted at the lead of a 12 V battery. Our choice. */
const BUS_V = 12

/** Of the radio that draws most; null where nothing on record says what a radio of this kit draws. */
export function stationLoad(moment: Moment, filled: readonly FilledPosition[]): StationLoad | null {
  const station = { use: stationUse(moment.state.promise), computers: itemsOf(filled, 'computer') }
  const loads = itemsOf(filled, 'radio').flatMap((radio) => loadOf(moment, radio, station) ?? [])
  return loads.reduce<StationLoad | null>((most, one) => (most && most.meanA >= one.meanA ? most : one), null)
}

interface Station {
  readonly use: StationUse
  readonly computers: readonly ReadinessItem[]
}

function loadOf(moment: Moment, radio: ReadinessItem, station: Station): StationLoad | null {
  return (
    measuredLoad(moment, radio, station) ??
    statedLoad(moment, radio, station) ??
    ratedLoad(moment, radio, station)
  )
}

/** By the newest check that counts and read both currents. */
function measuredLoad(moment: Moment, radio: ReadinessItem, station: Station): StationLoad | null {
  const test = moment
    .tests(radio.id, 'radio-check')
    .find(
      (one) =>
        one.currents?.receiveA && one.recordedAt <= moment.at && doubtAbout(moment, one, null) === undefined,
    )
  const draw = test?.currents && currentAtPower(test.currents.transmit, moment.state.promise.watts)
  if (!test?.currents?.receiveA || !draw) return null
  const extras = test.currents.of === 'station' ? [] : station.computers
  const basis = {
    kind: 'measured',
    radio: radio.designation,
    on: test.performedOn,
    of: test.currents.of,
  } as const
  return loadOn(station.use, { draw, receiveA: test.currents.receiveA, extras, basis })
}

function ratedLoad(moment: Moment, radio: ReadinessItem, station: Station): StationLoad | null {
  const { receiveA } = radio.facts
  const draw = ratedDraw(moment, radio)
  if (!receiveA || !draw) return null
  const basis = { kind: 'rated', radio: radio.designation } as const
  return loadOn(station.use, { draw, receiveA, extras: station.computers, basis })
}

function ratedDraw(moment: Moment, { facts }: ReadinessItem) {
  const draws = (facts.drawA ?? []).map(({ watts, amps }) => ({ settingW: watts, currentA: amps }))
  return currentAtPower(draws, moment.state.promise.watts)
}

interface Currents {
  readonly draw: { readonly settingW: number; readonly currentA: number }
  readonly receiveA: number
  readonly extras: readonly ReadinessItem[]
  readonly basis: LoadBasis
}

function loadOn(use: StationUse, { draw, receiveA, extras, basis }: Currents): StationLoad {
  const alwaysA = extras.reduce((sum, { facts }) => sum + (facts.supplyW ?? 0) / BUS_V, 0)
  const fullA = draw.currentA + alwaysA
  const profile = profileOf(use, fullA, receiveA + alwaysA)
  const meanA = meanOf(profile)
  const added = extras.map(({ designation, facts }) => extrasText(designation, facts.supplyW, BUS_V))
  const factors = [
    useText(use, profile),
    ...added,
    `${loadText(meanA)}, ${loadBasisText({ ...basis, settingW: draw.settingW })}`,
  ]
  return { profile, meanA, use, basis, factors }
}

/**
 * A mean alone flatters lead-acid, which pays for every hour at full power: it is spread over the time as the radio's
 * record says, and where that says nothing taken as drawn while transmitting only, the least that it can last.
 */
function statedLoad(moment: Moment, radio: ReadinessItem, { use }: Station): StationLoad | null {
  const { meanLoadA } = radio.facts
  if (!meanLoadA) return null
  const share = fullShare(use)
  const mostA = meanLoadA / share
  const fullA = Math.min(Math.max(ratedDraw(moment, radio)?.currentA ?? mostA, meanLoadA), mostA)
  const restA = share === 1 ? 0 : (meanLoadA - share * fullA) / (1 - share)
  const profile = profileOf(use, fullA, Math.max(0, restA))
  const basis = { kind: 'stated', radio: radio.designation } as const
  const factors = [useText(use, profile), `${loadText(meanLoadA)}, ${loadBasisText(basis)}`]
  return { profile, meanA: meanLoadA, use, basis, factors }
}

const fullShare = ({ transmitShare, currentFactor }: StationUse) => transmitShare * currentFactor

function profileOf(use: StationUse, fullA: number, restA: number): LoadShare[] {
  const share = fullShare(use)
  return [
    { share, currentA: fullA },
    { share: 1 - share, currentA: restA },
  ]
}

const meanOf = (profile: readonly LoadShare[]) =>
  profile.reduce((sum, { share, currentA }) => sum + share * currentA, 0)
