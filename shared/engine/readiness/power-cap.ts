import { replaceAction, strongerAction } from './actions.ts'
import { reasonAbout } from './reason.ts'
import { leadText, ratedBelowText } from './sentences.ts'
import { vitalItemsOf, type FilledPosition } from './slots.ts'
import type { Reason } from './period-types.ts'
import type { ReadinessItem } from './types.ts'

/** A radio's output before any loss, and what holds it down. */
export interface RadioPower {
  /** Null: nobody promised or entered watts. */
  readonly allowedW: number | null
  readonly reasons: readonly Reason[]
}

/**
 * The kind's promised watts, within the radio's rating, capped by the weakest lead, fuse or box that feeds it: the
 * highest power setting whose current the weakest part carries.
 */
export function radioPower(
  promisedW: number | null,
  radio: ReadinessItem,
  weakest: ReadinessItem | undefined,
): RadioPower {
  const ratedW = radio.facts.ratedWatts
  const wantedW = promisedW ?? ratedW ?? null
  if (wantedW === null) return { allowedW: null, reasons: [] }
  const settingW = Math.min(wantedW, ratedW ?? Infinity)
  const reasons = settingW < wantedW ? [ratedBelow(radio, settingW, wantedW)] : []
  const carriedW = weakest ? carriedBy(radio, weakest.facts.ratedA!, settingW) : settingW
  if (!weakest || carriedW >= settingW) return { allowedW: settingW, reasons }
  return { allowedW: carriedW, reasons: [...reasons, tooWeak(weakest, carriedW)] }
}

/** The lead or box with the lowest rating on record, of those that the kit cannot go without: a spare caps nothing. */
export function weakestFeed(filled: readonly FilledPosition[]): ReadinessItem | undefined {
  return vitalItemsOf(filled, 'dc-lead', 'distribution-box')
    .filter(({ facts }) => facts.ratedA !== undefined)
    .sort((a, b) => a.facts.ratedA! - b.facts.ratedA!)[0]
}

/**
 * Watts at which the radio draws no more than the rating. Currents are on record for some settings only: a power in
 * between is taken to draw what the next setting above it does, and one above all of them is not known to be too much.
 */
function carriedBy(radio: ReadinessItem, ratedA: number, settingW: number): number {
  const settings = [...(radio.facts.drawA ?? [])].sort((a, b) => a.watts - b.watts)
  const top = settings.findIndex(({ watts }) => watts >= settingW)
  const within = top === -1 ? settings : settings.slice(0, top + 1)
  const tooMuch = within.findIndex(({ amps }) => amps > ratedA)
  if (tooMuch === -1) return settingW
  return within[tooMuch - 1]?.watts ?? 0
}

function tooWeak(part: ReadinessItem, watts: number): Reason {
  return reasonAbout(part, {
    code: 'lead-rated-low',
    level: watts > 0 ? 'limit' : 'not-fit',
    text: leadText(part.designation, watts, part.facts.ratedA!),
    action: strongerAction(part.designation),
  })
}

function ratedBelow(radio: ReadinessItem, ratedW: number, wantedW: number): Reason {
  return reasonAbout(radio, {
    code: 'radio-rated-low',
    level: 'limit',
    text: ratedBelowText(radio.designation, ratedW, wantedW),
    action: replaceAction(radio.designation),
  })
}
