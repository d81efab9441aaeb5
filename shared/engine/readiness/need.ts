import type { Availability, Band, Mode, Verdict } from '../vocabulary.ts'
import type { BandCapability, Capability } from './period-types.ts'

/** What is asked of a station. Null and empty: not asked for. */
export interface Need {
  /** All of them must work. */
  readonly bands: readonly Band[]
  readonly mode: Mode | null
  /** At the antenna, on every band asked for; without one, on any. */
  readonly watts: number | null
  readonly hours: number | null
  /** Mains or a vehicle feeds the station: its own batteries need not last. */
  readonly mains: boolean
  readonly placeId: string | null
}

/** What of a kit answers a need: one period, and what its kind was built for. */
export interface NeedKit {
  readonly verdict: Verdict
  readonly availability: Availability
  readonly capability: Pick<Capability, 'bands' | 'modes' | 'hours'>
  readonly promisedModes: readonly Mode[]
  readonly placeId: string | null
}

/** One thing that a kit lacks for a need, with its amounts. A band is null where any would do. */
export type Shortfall =
  | { readonly kind: 'not-built'; readonly what: Band | Mode | 'transmit' }
  | { readonly kind: 'availability'; readonly availability: Exclude<Availability, 'available'> }
  | { readonly kind: 'verdict'; readonly verdict: 'not-proven' | 'not-fit' }
  | { readonly kind: 'band'; readonly band: Band | null; readonly state: 'out' | 'not-proven' }
  | Amount<'watts'>
  | Amount<'hours'>
  | { readonly kind: 'mode'; readonly mode: Mode }
  | { readonly kind: 'place' }

interface Amount<Kind extends string> {
  readonly kind: Kind
  readonly band: Band | null
  readonly needed: number
  /** Null: nobody knows, or nothing counts. */
  readonly has: number | null
}

/** Everything that the kit lacks for the need; empty: it can do it. */
export function shortfallsOf(kit: NeedKit, need: Need): readonly Shortfall[] {
  return [
    ...standingShortfalls(kit),
    ...bandShortfalls(kit.capability.bands, need),
    ...modeShortfalls(kit, need.mode),
    ...hoursShortfalls(kit.capability.hours, need),
    ...placeShortfalls(kit, need.placeId),
  ]
}

/** Whether the kit can do what is needed as it stands. */
export function meetsNeed(kit: NeedKit, need: Need): boolean {
  return shortfallsOf(kit, need).length === 0
}

function standingShortfalls({ availability, verdict }: NeedKit): Shortfall[] {
  return [
    ...(availability === 'available' ? [] : [{ kind: 'availability', availability } as const]),
    ...(verdict === 'not-proven' || verdict === 'not-fit' ? [{ kind: 'verdict', verdict } as const] : []),
  ]
}

function bandShortfalls(has: readonly BandCapability[], { bands, watts }: Need): Shortfall[] {
  if (bands.length === 0) return watts === null ? [] : anyBandShortfall(has, watts)
  return bands.flatMap((band) => {
    const one = has.find((capability) => capability.band === band)
    return one ? oneBandShortfall(one, watts) : [{ kind: 'not-built', what: band }]
  })
}

function oneBandShortfall(
  { band, state, wattsAtAntenna }: BandCapability,
  watts: number | null,
): Shortfall[] {
  if (state === 'out' || state === 'not-proven') return [{ kind: 'band', band, state }]
  if (watts === null || (wattsAtAntenna !== null && wattsAtAntenna >= watts)) return []
  return [{ kind: 'watts', band, needed: watts, has: wattsAtAntenna }]
}

/** Power asked for on no band by name: the strongest band that stands answers. */
function anyBandShortfall(has: readonly BandCapability[], watts: number): Shortfall[] {
  if (has.length === 0) return [{ kind: 'not-built', what: 'transmit' }]
  const standing = has.filter(({ state }) => state === 'proven' || state === 'limited')
  const [strongest] = [...standing].sort((a, b) => (b.wattsAtAntenna ?? 0) - (a.wattsAtAntenna ?? 0))
  if (strongest) return oneBandShortfall(strongest, watts)
  const state = has.every((one) => one.state === 'out') ? 'out' : 'not-proven'
  return [{ kind: 'band', band: null, state }]
}

function modeShortfalls({ capability, promisedModes }: NeedKit, mode: Mode | null): Shortfall[] {
  if (mode === null || capability.modes.includes(mode)) return []
  return promisedModes.includes(mode) ? [{ kind: 'mode', mode }] : [{ kind: 'not-built', what: mode }]
}

function hoursShortfalls(has: number | null, { hours, mains }: Need): Shortfall[] {
  if (hours === null || mains || (has !== null && has >= hours)) return []
  return [{ kind: 'hours', band: null, needed: hours, has }]
}

function placeShortfalls(kit: NeedKit, placeId: string | null): Shortfall[] {
  return placeId === null || kit.placeId === placeId ? [] : [{ kind: 'place' }]
}
