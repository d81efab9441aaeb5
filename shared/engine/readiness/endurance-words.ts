import { MOST_CAPACITY_FRACTION, type BatteryShare } from '../battery-energy.ts'
import type { LoadShare } from '../load-profile.ts'
import { listText } from '../plain-words.ts'
import type { PlainDate } from '../plain-date.ts'
import type { CurrentOf } from '../procedures/radio-currents.ts'
import type { StationUse } from './station-use.ts'
import { amountText, dayText } from './words.ts'

/** What the hours rest on, in words: every factor in order, each with where it comes from. */

/** Two digits after the point: currents of receiving are of the order of one ampere. */
const amps = (value: number) => `${Math.round(value * 100) / 100} A`
const celsius = (value: number) => `${String(value).replace('-', '−')} °C`
const percent = (share: number) => `${Math.round(share * 1000) / 10} %`

/** One battery's share of the hours. */
export function batteryText(
  name: string,
  share: BatteryShare,
  { atC, testedOn }: { readonly atC: number; readonly testedOn: PlainDate },
): string {
  const tooGood = share.capacityFraction > MOST_CAPACITY_FRACTION
  const counted = tooGood ? `, counted as ${Math.round(MOST_CAPACITY_FRACTION * 100)} %` : ''
  const measured = `${percent(share.capacityFraction)} measured on ${dayText(testedOn)}${counted}`
  const usable = `${Math.round(share.depth * 100)} % of it usable`
  const left = `${Math.round(share.temperatureFactor * 100)} % at ${celsius(atC)}`
  return `${name}: ${amountText(share.ratedAh)} Ah, ${measured}, ${usable}, ${left}`
}

/** How much of the time, in which mode, at which currents. */
export function useText(
  { transmitShare, stated, emission, currentFactor }: StationUse,
  profile: readonly LoadShare[],
): string {
  const [full, rest] = profile as readonly [LoadShare, LoadShare]
  const told = stated ? '' : ', as its kind says nothing else'
  const peaks = currentFactor < 1 ? ` with ${percent(currentFactor)} of that at full current` : ''
  const drawn = `${amps(full.currentA)} for ${percent(full.share)} of the time, ${amps(rest.currentA)} for the rest`
  return `Transmitting ${percent(transmitShare)} of the time${told}, ${emission}${peaks}: ${drawn}`
}

export const loadText = (loadA: number) => `Mean load ${amps(loadA)}`

export type LoadBasis =
  | {
      readonly kind: 'measured'
      readonly radio: string
      readonly on: PlainDate
      readonly of: CurrentOf
      readonly settingW?: number
    }
  | { readonly kind: 'rated'; readonly radio: string; readonly settingW?: number }
  | { readonly kind: 'stated'; readonly radio: string; readonly settingW?: number }

export function loadBasisText(basis: LoadBasis): string {
  const at = basis.settingW === undefined ? '' : ` at ${amountText(basis.settingW)} W`
  if (basis.kind === 'stated') return `as written down with ${basis.radio}, undated`
  if (basis.kind === 'rated') return `from the rated currents of ${basis.radio}${at}, not measured`
  const where = basis.of === 'station' ? 'with the whole station running' : 'in the lead of the radio'
  return `from currents measured${at} on ${basis.radio} on ${dayText(basis.on)}, ${where}`
}

export function extrasText(name: string, supplyW: number | undefined, busV: number): string {
  if (supplyW === undefined) return `${name}: what it draws is not on record and not in the load`
  return `${name}: ${amps(supplyW / busV)} all the time, its rated ${amountText(supplyW)} W at ${busV} V`
}

/** Lead-acid gives less the faster it empties. */
export function equivalentText(loadA: number, exponent: number): string {
  return `Lead-acid empties as if ${amps(loadA)} were drawn steadily (Peukert exponent ${exponent})`
}

export const HIGH_RATE = 'Lead-acid would be empty within the hour: the estimate is poor there'

export function overCurrentText(names: readonly string[], drawnA: number, carriesA: number): string {
  return `${listText(names)} may cut off while transmitting: ${amps(drawnA)} drawn, ${amps(carriesA)} rated`
}

/** The conditions that the hours hold for, on one line beside them. */
export function conditionsText(use: StationUse, atC: number, basis: LoadBasis): string {
  const draw =
    basis.kind === 'measured'
      ? `currents measured ${dayText(basis.on)}`
      : basis.kind === 'rated'
        ? 'rated currents'
        : 'a mean load written down, undated'
  return `transmitting ${percent(use.transmitShare)} of the time, ${use.emission}, at ${celsius(atC)}, ${draw}`
}
