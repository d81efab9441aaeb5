import { reasonOf } from './reason.ts'
import { amountText, FETCH_MINUTES } from './sentences.ts'
import { itemsOf, type FilledPosition } from './slots.ts'
import type { KitState, ReadinessItem, Reason } from './types.ts'

/** The radio's output before any loss, and what holds it down. */
export interface RadioPower {
  /** Null: the kit has no radio that works, or nobody entered its watts. */
  readonly promisedW: number | null
  readonly allowedW: number | null
  readonly reasons: readonly Reason[]
}

/**
 * The kind's promised watts, within the radio's rating, capped by the weakest lead, fuse or box that feeds it: the
 * highest power setting whose current the weakest part carries.
 */
export function radioPower(state: KitState, filled: readonly FilledPosition[]): RadioPower {
  const radio = itemsOf(filled, 'radio')[0]
  if (!radio) return { promisedW: null, allowedW: null, reasons: [] }
  const promisedW = state.promise.watts ?? radio.facts.ratedWatts ?? null
  if (promisedW === null) return { promisedW, allowedW: null, reasons: [] }
  const ratedW = Math.min(promisedW, radio.facts.ratedWatts ?? Infinity)
  const reasons = ratedW < promisedW ? [ratedBelowPromise(radio, ratedW, promisedW)] : []
  const weakest = weakestPart(filled)
  const carriedW = weakest && carriedBy(radio, weakest.facts.ratedA!, ratedW)
  if (!weakest || carriedW === undefined || carriedW >= ratedW)
    return { promisedW, allowedW: ratedW, reasons }
  return { promisedW, allowedW: carriedW, reasons: [...reasons, leadReason(weakest, carriedW)] }
}

function weakestPart(filled: readonly FilledPosition[]): ReadinessItem | undefined {
  return itemsOf(filled, 'dc-lead', 'distribution-box')
    .filter(({ facts }) => facts.ratedA !== undefined)
    .sort((a, b) => a.facts.ratedA! - b.facts.ratedA!)[0]
}

/** Undefined: the radio's currents are not on record, so nothing can be said. */
function carriedBy(radio: ReadinessItem, ratedA: number, ratedW: number): number | undefined {
  const settings = (radio.facts.drawA ?? []).filter(({ watts }) => watts <= ratedW)
  if (settings.length === 0) return undefined
  return Math.max(0, ...settings.filter(({ amps }) => amps <= ratedA).map(({ watts }) => watts))
}

function leadReason(part: ReadinessItem, watts: number): Reason {
  return reasonOf({
    code: 'lead-rated-low',
    level: watts > 0 ? 'limit' : 'not-fit',
    text: `${amountText(watts)} W at most: ${part.designation} carries ${amountText(part.facts.ratedA!)} A`,
    positionId: part.positionId,
    itemId: part.id,
    action: { kind: 'buy', text: `Fit a stronger part than ${part.designation}`, minutes: FETCH_MINUTES },
  })
}

function ratedBelowPromise(radio: ReadinessItem, ratedW: number, promisedW: number): Reason {
  return reasonOf({
    code: 'radio-rated-low',
    level: 'limit',
    text: `${amountText(ratedW)} W at most: ${radio.designation} is rated below the ${amountText(promisedW)} W promised`,
    positionId: radio.positionId,
    itemId: radio.id,
  })
}
